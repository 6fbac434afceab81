const PLAIN = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;

/** What the language reads as numbers though the format does not: nothing at all, and the prefixes of other bases. */
const isForeign = (text: string): boolean =>
  text === "" || (text.charCodeAt(0) === 48 && text.charCodeAt(1) > 57);

/** Whether the text is a finite number written as the format asks. */
export const isPlainNumber = (text: string): boolean => Number.isFinite(Number(text)) && !isForeign(text);

/**
 * A finite number, or null. A decimal comma (`1,5`) and the exponent letter D (`1.5D+2`) are mended: no program
 * writes a comma or a D for anything else there. `nan`, infinities and numbers beyond double range are refused.
 */
export function readNumber(text: string): number | null {
  if (isPlainNumber(text)) return Number(text);
  const mended = text.replace(",", ".").replace(/[dD](?=[+-]?\d+$)/, "e");
  return PLAIN.test(mended) && Number.isFinite(Number(mended)) ? Number(mended) : null;
}
