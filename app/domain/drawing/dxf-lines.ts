/** A number as DXF writes it: at most 15 significant digits, always with a point, never an exponent. */
export function formatReal(value: number): string {
  const rounded = Number(value.toPrecision(15));
  const text = String(rounded === 0 ? 0 : rounded);
  if (!text.includes("e")) return text.includes(".") ? text : `${text}.0`;
  return rounded > 1 || rounded < -1 ? `${BigInt(rounded)}.0` : rounded.toFixed(20);
}

/** Letters beyond ASCII as `\U+` escapes, line breaks as blanks: readable under any code page. */
export const escapeText = (text: string): string =>
  text
    .replace(/[\r\n]+/g, " ")
    .replace(
      /[\u0080-\uffff]/g,
      (letter) => `\\U+${letter.charCodeAt(0).toString(16).toUpperCase().padStart(4, "0")}`,
    );

/** Collects groups, and hands out handles in the order they are asked for. */
export class DxfLines {
  readonly #lines: string[] = [];
  #lastHandle = 0;

  /** A handle never given before, in the hexadecimal form of the format. */
  newHandle(): string {
    this.#lastHandle++;
    return this.#lastHandle.toString(16).toUpperCase();
  }

  text(code: number, value: string): void {
    this.#lines.push(String(code), value);
  }

  integer(code: number, value: number): void {
    this.#lines.push(String(code), String(value));
  }

  real(code: number, value: number): void {
    this.#lines.push(String(code), formatReal(value));
  }

  /** Codes `code`, + 10 and + 20, the height zero. */
  point(code: number, p: { readonly x: number; readonly y: number }): void {
    this.real(code, p.x);
    this.real(code + 10, p.y);
    this.real(code + 20, 0);
  }

  toString(): string {
    return `${this.#lines.join("\n")}\n`;
  }
}
