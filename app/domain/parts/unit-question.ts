import { formatLength, INCH_IN_MM, type LengthUnit, MM_PER_UNIT } from "../units";
import type { PartsReport } from "./part";

/** A drawing whose longest part is shorter, or longer, is doubted: half an inch, and twice a sheet of 10 ft. Millimetres. */
export const PLAUSIBLE_LENGTH = { shortest: 0.5 * INCH_IN_MM, longest: 20 * 12 * INCH_IN_MM };

/** How large the parts are if the drawing is in this unit, by the long side of their smallest rectangle, millimetres. */
export interface UnitReading {
  readonly unit: LengthUnit;
  readonly longest: number;
  readonly smallest: number;
  /** Whether parts of that size come from sheets. */
  readonly plausible: boolean;
}

export interface UnitQuestion {
  readonly why: "undeclared" | "implausible";
  /** Millimetres and inches, and before them what the file declares where it is neither; none where there are no parts. */
  readonly readings: readonly UnitReading[];
  readonly words: string;
}

/** The units that builders mean when nothing is said. */
const MEANT: readonly LengthUnit[] = ["mm", "in"];

/**
 * What is to be asked of a drawing's unit: it declares none, or read as declared its longest part comes from no
 * sheet. Null where nothing is. `report` is of the drawing read in `used`.
 */
export function unitQuestion(
  { parts }: Pick<PartsReport, "parts">,
  { declared, used }: { readonly declared: LengthUnit | null; readonly used: LengthUnit },
): UnitQuestion | null {
  const sizes = parts.map(({ smallestRect }) => smallestRect.long / MM_PER_UNIT[used]);
  if (sizes.length === 0) {
    const words = "The file names no unit. Is it drawn in millimetres?";
    return declared === null ? { why: "undeclared", readings: [], words } : null;
  }
  const [longest, smallest] = sizes.reduce(
    ([most, least], size) => [Math.max(most, size), Math.min(least, size)],
    [0, Infinity],
  );
  const units = declared === null || MEANT.includes(declared) ? MEANT : [declared, ...MEANT];
  const readings = units.map((unit) => readingIn(unit, longest, smallest));
  const asDeclared = readings.find(({ unit }) => unit === declared);
  if (asDeclared?.plausible) return null;
  const first = asDeclared
    ? `The file says ${declared}, but parts of that size come from no sheet.`
    : "The file names no unit.";
  const words = [
    first,
    ...readings.map((reading) => readingWords(reading, sizes.length > 1)),
    "Which is right?",
  ];
  return { why: asDeclared ? "implausible" : "undeclared", readings, words: words.join(" ") };
}

function readingIn(unit: LengthUnit, longest: number, smallest: number): UnitReading {
  const longestMm = longest * MM_PER_UNIT[unit];
  const isPlausible = longestMm >= PLAUSIBLE_LENGTH.shortest && longestMm <= PLAUSIBLE_LENGTH.longest;
  return { unit, longest: longestMm, smallest: smallest * MM_PER_UNIT[unit], plausible: isPlausible };
}

const inBoth = (length: number): string => `${formatLength(length, "mm")} (${formatLength(length, "in")})`;

const readingWords = ({ unit, longest, smallest }: UnitReading, isSeveral: boolean): string =>
  isSeveral
    ? `In ${unit} the longest part is ${inBoth(longest)}, the smallest ${inBoth(smallest)}.`
    : `In ${unit} the part is ${inBoth(longest)} long.`;
