/** A kind of part as the router meets it. Millimetres a piece; `cutLength` counts every outline once. */
export interface CutPart {
  readonly quantity: number;
  readonly cutLength: number;
  readonly holes: number;
}

/** How fast a stock is cut, by nominal thickness up to and including `upToThickness`. Millimetres, minutes. */
export interface CutSpeed {
  readonly upToThickness: number;
  readonly speed: number;
  readonly passes: number;
}

export interface CutRates {
  readonly cutSpeeds: readonly CutSpeed[];
  readonly secondsPerHole: number;
  readonly minutesPerSheet: number;
  readonly toolChangeMinutes: number;
}

/** Minutes by what they are spent on, and what they come from. */
export interface CutEstimate {
  readonly minutes: number;
  readonly cutting: number;
  readonly drilling: number;
  readonly toolChanges: number;
  readonly handling: number;
  readonly cutLength: number;
  readonly holes: number;
  readonly passes: number;
  readonly speed: number;
}

export type CutEstimateResult =
  | { readonly ok: true; readonly estimate: CutEstimate }
  | { readonly ok: false; readonly reason: string };

/** The proven speed for a thickness: that of the thinnest entry which covers it. */
export function cutSpeedFor(thickness: number, speeds: readonly CutSpeed[]): CutSpeed | null {
  const covering = speeds.filter((entry) => thickness <= entry.upToThickness + 1e-9);
  return covering.length === 0
    ? null
    : covering.reduce((best, entry) => (entry.upToThickness < best.upToThickness ? entry : best));
}

/**
 * Router minutes for parts of one stock on a number of sheets: cut length times passes at the proven speed, a
 * plunge and lift for every hole, one change between drill and cutter on every sheet where holes are drilled,
 * and loading, zeroing and clearing every sheet. Refuses a thickness that no speed covers.
 */
export function estimateMinutes({
  parts,
  thickness,
  sheets,
  rates,
}: {
  parts: readonly CutPart[];
  thickness: number;
  sheets: number;
  rates: CutRates;
}): CutEstimateResult {
  const proven = cutSpeedFor(thickness, rates.cutSpeeds);
  if (!proven) return { ok: false, reason: `No cutting speed is set for stock ${thickness} mm thick.` };

  const cutLength = parts.reduce((sum, part) => sum + part.cutLength * part.quantity, 0);
  const holes = parts.reduce((sum, part) => sum + part.holes * part.quantity, 0);
  const cutting = (cutLength * proven.passes) / proven.speed;
  const drilling = (holes * rates.secondsPerHole) / 60;
  const toolChanges = holes > 0 ? sheets * rates.toolChangeMinutes : 0;
  const handling = sheets * rates.minutesPerSheet;
  return {
    ok: true,
    estimate: {
      minutes: cutting + drilling + toolChanges + handling,
      cutting,
      drilling,
      toolChanges,
      handling,
      cutLength,
      holes,
      passes: proven.passes,
      speed: proven.speed,
    },
  };
}
