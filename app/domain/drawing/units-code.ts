import type { LengthUnit } from "../units";

/** `$INSUNITS` codes that name a unit builders draw in (DXF Reference, HEADER variables). */
const UNIT_OF_CODE: Readonly<Record<number, LengthUnit>> = { 1: "in", 2: "ft", 4: "mm", 5: "cm", 6: "m" };

/** Names of the other codes, for telling the builder what the file says. */
const OTHER_UNITS: Readonly<Record<number, string>> = {
  3: "miles",
  7: "kilometres",
  8: "microinches",
  9: "mils",
  10: "yards",
  11: "angstroms",
  12: "nanometres",
  13: "microns",
  14: "decimetres",
  15: "dekametres",
  16: "hectometres",
  17: "gigametres",
  18: "astronomical units",
  19: "light years",
  20: "parsecs",
  21: "US survey feet",
  22: "US survey inches",
  23: "US survey yards",
  24: "US survey miles",
};

export const unitOfCode = (code: number | null): LengthUnit | null => UNIT_OF_CODE[code ?? 0] ?? null;
export const codeOfUnit = (unit: LengthUnit): number =>
  Number(Object.keys(UNIT_OF_CODE).find((code) => UNIT_OF_CODE[Number(code)] === unit));
/** A unit that is declared but not one to draw parts in. */
export const otherUnitOfCode = (code: number | null): string | null => OTHER_UNITS[code ?? 0] ?? null;
