import { SNIFFED_BYTES, sniffContent } from "~/domain/drawing";

export { SNIFFED_BYTES } from "~/domain/drawing";

export type AttachmentType =
  | { readonly ok: true; readonly contentType: string }
  | { readonly ok: false; readonly reason: string };

/** Media types as registered (IANA), each with how its files begin, as Latin-1 text. */
const OPENINGS: readonly (readonly [string, (head: string) => boolean])[] = [
  ["image/png", (head) => head.startsWith("\x89PNG\r\n\x1a\n")],
  ["image/jpeg", (head) => head.startsWith("\xff\xd8\xff")],
  ["image/gif", (head) => head.startsWith("GIF87a") || head.startsWith("GIF89a")],
  ["image/webp", (head) => head.startsWith("RIFF") && head.startsWith("WEBP", 8)],
  ["application/pdf", (head) => head.startsWith("%PDF-")],
];

/** What an attachment is, told from its first bytes, never from its name: a picture, a PDF or a DXF drawing. */
export function attachmentType(firstBytes: Uint8Array): AttachmentType {
  if (firstBytes.length === 0) return { ok: false, reason: "The file is empty." };
  const head = Array.from(firstBytes.subarray(0, 16), (byte) => String.fromCharCode(byte)).join("");
  const known = OPENINGS.find(([, begins]) => begins(head));
  if (known) return { ok: true, contentType: known[0] };
  if (sniffContent(firstBytes.subarray(0, SNIFFED_BYTES)).ok)
    return { ok: true, contentType: "image/vnd.dxf" };
  return {
    ok: false,
    reason: "Attach a picture (PNG, JPEG, GIF, WebP), a PDF or a DXF drawing; this is none of them.",
  };
}
