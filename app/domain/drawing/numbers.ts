/** What a number in the file came to: `mended` when it was not written as the format asks. */
export interface ReadNumber {
  readonly value: number;
  readonly mended: boolean;
}

const PLAIN = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;

/**
 * A finite number, or null. A decimal comma (`1,5`) and the exponent letter D (`1.5D+2`) are mended: no program
 * writes a comma or a D for anything else there. `nan`, infinities and numbers beyond double range are refused.
 */
export function readNumber(text: string): ReadNumber | null {
  const isPlain = PLAIN.test(text);
  const mendable = isPlain ? text : text.replace(",", ".").replace(/[dD](?=[+-]?\d+$)/, "e");
  if (!isPlain && !PLAIN.test(mendable)) return null;
  const value = Number(mendable);
  return Number.isFinite(value) ? { value, mended: !isPlain } : null;
}
