/**
 * Where a sheet is measured: eight points 50 mm in from its edges, walked once around (EN 324-1:1993, as summarised by
 * a trade association).
 */
export const READING_POINTS = [
  "corner 1",
  "long edge 1",
  "corner 2",
  "short edge 1",
  "corner 3",
  "long edge 2",
  "corner 4",
  "short edge 2",
] as const;

/** Points a sheet needs when several sheets of a stack are measured (common practice, no source). */
const POINTS_OF_SEVERAL = 4;

export interface ThicknessReading {
  /** Counted from the top of the stack. */
  readonly sheet: number;
  readonly position: string;
  /** Millimetres. */
  readonly thickness: number;
}

export interface StackThickness {
  readonly min: number;
  readonly mean: number;
  readonly max: number;
}

export type ThicknessVerdict =
  | { readonly ok: true; readonly thickness: StackThickness }
  | { readonly ok: false; readonly reason: string };

const hundredths = (length: number): number => Math.round(length * 100) / 100;

/** Least, mean and greatest thickness of at least one reading, millimetres, the mean to a hundredth. */
export function thicknessOf(readings: readonly ThicknessReading[]): StackThickness {
  const values = readings.map(({ thickness }) => thickness);
  const sum = values.reduce((total, value) => total + value, 0);
  return { min: Math.min(...values), mean: hundredths(sum / values.length), max: Math.max(...values) };
}

const bySheet = (readings: readonly ThicknessReading[]): Map<number, ThicknessReading[]> => {
  const sheets = new Map<number, ThicknessReading[]>();
  for (const reading of readings) sheets.set(reading.sheet, [...(sheets.get(reading.sheet) ?? []), reading]);
  return sheets;
};

/** What a stack's readings come to: one sheet at all eight points, or several sheets at four or more each. */
export function measureStack(readings: readonly ThicknessReading[]): ThicknessVerdict {
  const sheets = bySheet(readings);
  for (const [sheet, points] of sheets) {
    if (new Set(points.map(({ position }) => position)).size < points.length)
      return { ok: false, reason: `Sheet ${sheet} has two readings of one point.` };
    const needed = sheets.size > 1 ? POINTS_OF_SEVERAL : READING_POINTS.length;
    if (points.length < needed)
      return {
        ok: false,
        reason:
          sheets.size > 1
            ? `Sheet ${sheet} has ${points.length} readings: measure ${needed} points at least on each of several sheets.`
            : `One sheet alone is measured at all ${needed} points (EN 324-1); ${points.length} are given. Or measure four points on several sheets.`,
      };
  }
  if (sheets.size === 0) return { ok: false, reason: "Give the readings of at least one sheet." };
  return { ok: true, thickness: thicknessOf(readings) };
}

export interface ThicknessLimits {
  readonly lower: number;
  readonly upper: number;
}

/**
 * What EN 315 lets a sanded sheet of plywood of a nominal thickness be, millimetres: t − (0.4 + 0.03 t) to
 * t + (0.2 + 0.03 t). Seen in a summary of GB/T 9846, which uses the same table.
 */
export const plywoodLimits = (nominal: number): ThicknessLimits => ({
  lower: nominal - (0.4 + 0.03 * nominal),
  upper: nominal + (0.2 + 0.03 * nominal),
});

/** What one sheet may vary by, millimetres, in the common thicknesses (the same summary of EN 315). */
export const WITHIN_SHEET = 0.6;

/** The standard is plywood's; for boards and plastics none is held. */
export const isPlywood = (kind: string): boolean => kind.endsWith("plywood");

interface StackFacts {
  readonly nominal: number;
  readonly thickness: StackThickness;
  /** Empty where only the figures are known. */
  readonly readings: readonly ThicknessReading[];
}

const two = (length: number): string => length.toFixed(2);
/** Readings are to 0.01 mm; a limit met to the last digit is kept. */
const ROUNDING = 1e-9;

/** How a stack of plywood is beyond EN 315, each in a sentence with the formula's numbers; empty when it is not. */
export function beyondStandard({ nominal, thickness, readings }: StackFacts): readonly string[] {
  const { lower, upper } = plywoodLimits(nominal);
  const words: string[] = [];
  if (thickness.min < lower - ROUNDING)
    words.push(
      `Thinnest ${two(thickness.min)} mm is under ${two(lower)} mm: ${nominal} − (0.4 + 0.03 × ${nominal}), EN 315.`,
    );
  if (thickness.max > upper + ROUNDING)
    words.push(
      `Thickest ${two(thickness.max)} mm is over ${two(upper)} mm: ${nominal} + (0.2 + 0.03 × ${nominal}), EN 315.`,
    );
  for (const [sheet, points] of bySheet(readings)) {
    const { min, max } = thicknessOf(points);
    if (max - min > WITHIN_SHEET + ROUNDING)
      words.push(
        `Sheet ${sheet} varies by ${two(max - min)} mm; ${two(WITHIN_SHEET)} mm is allowed inside a sheet, EN 315.`,
      );
  }
  return words;
}
