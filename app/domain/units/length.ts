export type Millimetres = number & { readonly __unit: "mm" };
export const mm = (value: number): Millimetres => value as Millimetres;

/** The international inch, exactly 25.4 mm since 1959. */
export const INCH_IN_MM = 25.4;

export const LENGTH_UNITS = ["mm", "cm", "m", "in", "ft"] as const;
export type LengthUnit = (typeof LENGTH_UNITS)[number];
export const MM_PER_UNIT: Readonly<Record<LengthUnit, number>> = {
  mm: 1,
  cm: 10,
  m: 1000,
  in: INCH_IN_MM,
  ft: 12 * INCH_IN_MM,
};
export const inMillimetres = (value: number, unit: LengthUnit): Millimetres => mm(value * MM_PER_UNIT[unit]);

/** How a person reads lengths: the viewer's choice, never the stored value. */
export type ShownUnit = "mm" | "in";

const THIN_SPACE = "\u2009";

/** `1,830.0` */
export function formatMillimetres(length: number, digits = 1): string {
  return length.toLocaleString("en-US", { minimumFractionDigits: digits, maximumFractionDigits: digits });
}

/** `72.047` */
export function formatInches(length: number, digits = 3): string {
  return (length / INCH_IN_MM).toLocaleString("en-US", {
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
  });
}

/** The nearest 1/64 in as a tape reads it: `16 17/32`, `3/4`, `0`. */
export function nearest64th(length: number): string {
  const sixtyFourths = Math.round((Math.abs(length) / INCH_IN_MM) * 64);
  const sign = length < 0 && sixtyFourths > 0 ? "-" : "";
  const whole = Math.floor(sixtyFourths / 64);
  let numerator = sixtyFourths % 64;
  if (numerator === 0) return `${sign}${whole}`;
  let denominator = 64;
  while (numerator % 2 === 0) {
    numerator /= 2;
    denominator /= 2;
  }
  return whole === 0 ? `${sign}${numerator}/${denominator}` : `${sign}${whole} ${numerator}/${denominator}`;
}

/** A length with its unit after a thin space, in the viewer's unit. */
export function formatLength(length: number, shown: ShownUnit): string {
  return shown === "mm"
    ? `${formatMillimetres(length)}${THIN_SPACE}mm`
    : `${formatInches(length)}${THIN_SPACE}in`;
}

/** An area in square millimetres, shown as m² or ft². */
export function formatArea(area: number, shown: ShownUnit): string {
  const value = shown === "mm" ? area / 1e6 : area / (12 * INCH_IN_MM) ** 2;
  return `${value.toFixed(3)}${THIN_SPACE}${shown === "mm" ? "m²" : "ft²"}`;
}
