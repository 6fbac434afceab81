import { describe, expect, it } from "vitest";
import { readDrawing, sniffContent } from "~/domain/drawing";
import { dxf, lineEntity } from "./dxf-text";

const latin = (text: string) => Uint8Array.from(text, (letter) => letter.charCodeAt(0));

describe("what an upload turns out to be", () => {
  // Opening bytes as the formats' publishers give them.
  it.each([
    ["AutoCAD Binary DXF\r\n\x1a\0", /binary DXF.*text \(ASCII\) DXF/],
    ["AC1032\0\0\0\0\0", /DWG.*Export the drawing as DXF/],
    ["AC1015\0\0\0", /DWG/],
    ["%PDF-1.7\n%\xe2\xe3", /PDF.*Export the drawing as DXF/],
    ["\x89PNG\r\n\x1a\n\0\0", /picture/],
    ["\xff\xd8\xff\xe0\0\x10JFIF", /picture/],
    ["GIF89a\x01\0", /picture/],
    ["RIFF\x24\0\n\0WEBPVP8 ", /picture/],
    ["<svg xmlns='http://www.w3.org/2000/svg'/>", /SVG/],
    ["<?xml version='1.0'?>\n<!-- drawn -->\n<svg/>", /SVG/],
    ["PK\x03\x04\x14\0", /zip.*Unpack/],
    ["\x1f\x8b\x08\0", /archive.*Unpack/],
    ["ISO-10303-21;\nHEADER;", /STEP/],
    ["solid part\nfacet normal 0 0 1", /3D model/],
    ["<!DOCTYPE html><html>", /web/],
    ["%!PS-Adobe-3.0", /PostScript/],
    ["part,quantity\nside,2\n", /text file, but not a DXF/],
    ["\0\x01\x02\x03", /not a DXF/],
    ["   \n\n ", /nothing but blanks/],
    ["", /empty/],
  ])("refuses %j with what to send instead", (head, words) => {
    const sniffed = sniffContent(latin(head));
    if (sniffed.ok) throw new Error("taken for a DXF");
    expect(sniffed.reason).toMatch(words);
    expect(readDrawing(latin(head))).toEqual(sniffed);
  });

  const text = dxf({ entities: lineEntity(0, 0, 1, 0) });

  it.each([
    ["as it is", text],
    ["with padded codes and CRLF", text.replace("0\nSECTION\n", "  0\r\nSECTION\r\n")],
    ["after comments", `999\nMade by hand\n999\nAC1015 in a comment\n${text}`],
    ["after blank lines", `\r\n\r\n${text}`],
    ["after a byte order mark", `\xef\xbb\xbf${text}`],
  ])("takes a DXF %s", (_, content) => {
    expect(sniffContent(latin(content))).toEqual({ ok: true });
  });

  it("takes UTF-16", () => {
    const wide = Uint8Array.from(`\xff\xfe${[...text].map((letter) => `${letter}\0`).join("")}`, (c) =>
      c.charCodeAt(0),
    );
    expect(sniffContent(wide)).toEqual({ ok: true });
    expect(readDrawing(wide)).toMatchObject({ ok: true, drawing: { entities: { LINE: 1 } } });
  });

  it("answers on a head made to be slow", () => {
    const heads = [`<${"!-- -->".repeat(1200)}`, " ".repeat(8192), "0\n".repeat(4096)];
    expect(heads.map((head) => sniffContent(latin(head)).ok)).toEqual([false, false, false]);
  });
});
