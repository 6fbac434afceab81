import { describe, expect, test } from "vitest";
import {
  addressFromLines,
  formaldehydeLine,
  gs1CheckDigit,
  isPostOfficeBox,
  labelAddress,
  parcelLimits,
  parcelNotes,
  sscc,
  stackPieces,
} from "~/domain/shipping";
import { INCH_IN_MM, KG_PER_LB } from "~/domain/units";

describe("container codes", () => {
  test("have the check digit of GS1's own worked examples", () => {
    // GS1 check digit calculator's example, 629104150021 -> 3; SSCC 1 0614141 123456789 -> 7.
    expect(gs1CheckDigit("629104150021")).toBe(3);
    expect(gs1CheckDigit("10614141123456789")).toBe(7);
    expect(gs1CheckDigit("00000000000000000")).toBe(0);
  });

  test("are 18 digits, the serial filled up or refused", () => {
    expect(sscc({ extension: 1, prefix: "0614141", serial: 123456789 })).toBe("106141411234567897");
    expect(sscc({ extension: 0, prefix: "0614141", serial: 5 })).toHaveLength(18);
    expect(() => sscc({ extension: 0, prefix: "0614141123", serial: 1_234_567 })).toThrow(RangeError);
  });
});

describe("an address on a label", () => {
  test("has the secondary unit at the end of the delivery line, in capitals (USPS Publication 28)", () => {
    expect(
      labelAddress({
        recipient: "Wren Halloran",
        company: "",
        line1: "12 Towpath Row",
        line2: "Apt. 3",
        city: "Marrow Point",
        region: "WA",
        postcode: "98999-0012",
      }),
    ).toEqual(["WREN HALLORAN", "12 TOWPATH ROW APT 3", "MARROW POINT WA 98999-0012"]);
  });

  test("is told from a post-office box, which private carriers do not serve", () => {
    expect(
      ["PO Box 12", "P.O. Box 9", "Post Office Box 3"].map((line1) => isPostOfficeBox({ line1 })),
    ).toEqual([true, true, true]);
    expect(isPostOfficeBox({ line1: "12 Boxwood Post Road" })).toBe(false);
  });

  test("of the shop is read off its own lines, or not at all", () => {
    expect(addressFromLines(["The Shop", "14 Ferry Slip Road", "Marrow Point, WA 98399"])).toEqual({
      line1: "14 Ferry Slip Road",
      city: "Marrow Point",
      region: "WA",
      postcode: "98399",
    });
    expect(addressFromLines(["14 Ferry Slip Road", "Marrow Point"])).toBeNull();
  });
});

describe("the formaldehyde line (40 CFR 770.45: maker, month and year, the statement)", () => {
  const birch = { kind: "birch-plywood", lot: "L-1", document: "papers/l-1.pdf" };
  test("stands only where every board under the rule has its supplier's paper", () => {
    expect(
      formaldehydeLine([birch, { kind: "acrylic", lot: null, document: null }], "The Shop", "May 2026"),
    ).toEqual({
      line: "TSCA Title VI compliant. Made by The Shop, May 2026.",
      missing: [],
    });
    expect(
      formaldehydeLine([birch, { kind: "mdf", lot: "L-2", document: " " }], "The Shop", "May 2026"),
    ).toEqual({
      line: null,
      missing: ["L-2"],
    });
    expect(formaldehydeLine([{ kind: "hdpe", lot: "L-3", document: null }], "The Shop", "May 2026")).toEqual({
      line: null,
      missing: [],
    });
  });
});

describe("a closed parcel", () => {
  const limits = parcelLimits("private", "2026-12-01");
  if (!limits) throw new Error("No limits.");
  const inches = (length: number, width: number, height: number) => ({
    length: length * INCH_IN_MM,
    width: width * INCH_IN_MM,
    height: height * INCH_IN_MM,
  });

  test("is a team lift over 50 lb and no parcel beyond the carriers' limits", () => {
    // Private carriers in the US: 150 lb, 108 in long, 165 in length and girth (their published rules, 2025).
    expect(parcelNotes(inches(40, 20, 4), 50 * KG_PER_LB, limits)).toMatchObject({
      teamLift: false,
      beyond: [],
    });
    expect(parcelNotes(inches(40, 20, 4), 50.1 * KG_PER_LB, limits)).toMatchObject({
      teamLift: true,
      beyond: [],
    });
    expect(parcelNotes(inches(109, 5, 4), 151 * KG_PER_LB, limits).beyond).toEqual([
      "heavier than 150 lb",
      "longer than 108 in",
    ]);
    expect(parcelNotes(inches(54, 54, 2), 1, limits).beyond).toEqual(["length plus girth over 165 in"]);
  });

  test("has its pieces' stack, and packing on every side", () => {
    const piece = (id: string, width: number, height: number) => ({
      id,
      width,
      height,
      thickness: 18,
      kilograms: 2,
    });
    expect(
      stackPieces([piece("a", 300, 600), piece("b", 500, 200)], limits, {
        around: 10,
        kilogramsPerSquareMetre: 0,
      }),
    ).toMatchObject({ length: 620, width: 320, height: 56, kilograms: 4, oversize: false });
  });
});
