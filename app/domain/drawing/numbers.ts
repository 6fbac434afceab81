const PLAIN = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;

/** What the language reads as numbers though the format does not: nothing at all, and the prefixes of other bases. */
const isForeign = (text: string): boolean =>
  text === "" || (text.charCodeAt(0) === 48 && text.charCodeAt(1) > 57);

/** Beyond this nothing is drawn, and squares of lengths would soon leave double range. */
export const FARTHEST = 1e12;

/** Whether the text is a number within reach, written as the format asks. */
export const isPlainNumber = (text: string): boolean =>
  Math.abs(Number(text)) <= FARTHEST && !isForeign(text);

/**
 * A number within reach, or null. A decimal comma (`1,5`) and the exponent letter D (`1.5D+2`) are mended: no program
 * writes a comma or a D for anything else there. `nan`, infinities and numbers beyond 1e12 are refused.
 */
export function readNumber(text: string): number | null {
  if (isPlainNumber(text)) return Number(text);
  const mended = text.replace(",", ".").replace(/[dD](?=[+-]?\d+$)/, "e");
  return PLAIN.test(mended) && Math.abs(Number(mended)) <= FARTHEST ? Number(mended) : null;
}
