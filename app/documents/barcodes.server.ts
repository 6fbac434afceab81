import bwip from "bwip-js/node";
import { z } from "zod";

const bars = z.array(z.object({ sbs: z.array(z.number()) })).min(1);
const matrix = z.array(z.object({ pixs: z.array(z.number()), pixx: z.int(), pixy: z.int() })).min(1);

const runsOf = (bcid: string, words: string): readonly number[] =>
  bars.parse(bwip.raw({ bcid, text: words }))[0]?.sbs ?? [];

/** Bars and gaps of a Code 128 symbol by turns, in modules (ISO/IEC 15417), without its quiet zones. */
export const code128 = (words: string): readonly number[] => runsOf("code128", words);

/** A serial shipping container code as GS1-128 with its application identifier 00. */
export const gs1Sscc = (sscc: string): readonly number[] => runsOf("gs1-128", `(00)${sscc}`);

/** Rows of a QR code of error correction level M (ISO/IEC 18004), `1` dark, without its quiet zone. */
export function qr(words: string): readonly string[] {
  const [code] = matrix.parse(bwip.raw("qrcode", words, "eclevel=M"));
  if (!code) return [];
  return Array.from({ length: code.pixy }, (_, row) =>
    code.pixs
      .slice(row * code.pixx, (row + 1) * code.pixx)
      .map((dark) => (dark ? "1" : "0"))
      .join(""),
  );
}
