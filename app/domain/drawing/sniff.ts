export type Sniffed = { readonly ok: true } | { readonly ok: false; readonly reason: string };

/** How many bytes are looked at. */
export const SNIFFED_BYTES = 8192;

const EXPORT_DXF = "Export the drawing as DXF (R12 or 2000, text form) and upload that.";

const PICTURE = `This is a picture. ${EXPORT_DXF}`;
const ARCHIVE = "This is an archive. Unpack it and upload the DXF files in it.";
const SOLID_MODEL = "Export the flat outline of each part as DXF and upload that.";

/** Bytes that a kind of file starts with, as Latin-1 text, and what to say of it. */
const SIGNATURES: readonly (readonly [string, string])[] = [
  ["AutoCAD Binary DXF", "This is a binary DXF. Save it again as a text (ASCII) DXF and upload that."],
  ["%PDF", `This is a PDF. ${EXPORT_DXF}`],
  ["\x89PNG", PICTURE],
  ["\xff\xd8\xff", PICTURE],
  ["GIF8", PICTURE],
  ["II*\0", PICTURE],
  ["MM\0*", PICTURE],
  ["PK\x03\x04", "This is a zip archive. Unpack it and upload the DXF files in it."],
  ["PK\x05\x06", "This is an empty zip archive."],
  ["7z\xbc\xaf", ARCHIVE],
  ["Rar!", ARCHIVE],
  ["\x1f\x8b", ARCHIVE],
  ["ISO-10303-21", `This is a STEP model. ${SOLID_MODEL}`],
  ["%!PS", `This is a PostScript drawing. ${EXPORT_DXF}`],
  ["\xc5\xd0\xd3\xc6", `This is a PostScript drawing. ${EXPORT_DXF}`],
  ["\xd0\xcf\x11\xe0", `This is an office or CAD document, not a DXF. ${EXPORT_DXF}`],
];

/** Openings that only a pattern tells; tried after the signatures. */
const OPENINGS: readonly (readonly [RegExp, string])[] = [
  [/^AC10\d\d(?![\r\n])/, `This is a DWG drawing. ${EXPORT_DXF}`],
  [/^RIFF.{4}WEBP/s, PICTURE],
  [/^\s*<([?!].*<)?svg/is, `This is an SVG picture. ${EXPORT_DXF}`],
  [/^solid\s/, `This is a 3D model. ${SOLID_MODEL}`],
  [/^\s*<(!DOCTYPE html|html|\?xml)/i, `This is a web or XML document. ${EXPORT_DXF}`],
];

/** Comments and blank lines, then a section, whose mark and name are two groups. */
const DXF_OPENING = /(^|[\r\n])[ \t]*0[ \t]*(\r\n|\n|\r)[ \t]*SECTION[ \t]*(\r\n|\n|\r)/;

function headText(bytes: Uint8Array): string {
  const head = bytes.subarray(0, SNIFFED_BYTES);
  if (head[0] === 0xff && head[1] === 0xfe) return new TextDecoder("utf-16le").decode(head);
  if (head[0] === 0xfe && head[1] === 0xff) return new TextDecoder("utf-16be").decode(head);
  const start = head[0] === 0xef && head[1] === 0xbb && head[2] === 0xbf ? 3 : 0;
  return Array.from(head.subarray(start), (byte) => String.fromCharCode(byte)).join("");
}

/** Whether the first bytes of an upload are those of a text DXF; if not, a sentence that says what to send instead. */
export function sniffContent(firstBytes: Uint8Array): Sniffed {
  if (firstBytes.length === 0) return { ok: false, reason: "The file is empty." };
  const head = headText(firstBytes);
  const known =
    SIGNATURES.find(([signature]) => head.startsWith(signature)) ??
    OPENINGS.find(([opening]) => opening.test(head));
  if (known) return { ok: false, reason: known[1] };
  if (DXF_OPENING.test(head)) return { ok: true };
  if (head.trim() === "") return { ok: false, reason: "The file holds nothing but blanks." };
  const isText = ![...head].some((character) => character < "\t" || (character > "\r" && character < " "));
  const what = isText ? "This is a text file, but not a DXF drawing." : "This is not a DXF drawing.";
  return { ok: false, reason: `${what} ${EXPORT_DXF}` };
}
