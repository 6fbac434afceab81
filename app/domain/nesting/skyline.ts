/** Rounding in sums of sizes must not push a part that fits exactly off the sheet. Millimetres. */
const SLACK = 1e-6;

/** One step of the skyline: from `at` across the sheet for `width`, filled up to `level` along it. */
interface Step {
  readonly at: number;
  readonly width: number;
  readonly level: number;
}

export interface Spot {
  /** Across and along the sheet: the lower corner of the free place. */
  readonly across: number;
  readonly along: number;
}

/** How two free places compare: the one with the lower figure is taken, then the one further to the side. */
export type PlacingRule = "least-start" | "least-end";

/**
 * The filled part of a sheet as a skyline: for every position across the sheet how far along it is taken.
 * Parts are put where they reach least far, so that what is left is one piece across the sheet's whole width.
 */
export class Skyline {
  private steps: Step[];

  constructor(
    private readonly acrossSize: number,
    private readonly alongSize: number,
  ) {
    this.steps = [{ at: 0, width: acrossSize, level: 0 }];
  }

  /** Where a rectangle goes, or null where there is no room. Lower `score` is better. */
  find(acrossSize: number, alongSize: number, rule: PlacingRule): (Spot & { readonly score: number }) | null {
    let best: (Spot & { readonly score: number }) | null = null;
    for (let i = 0; i < this.steps.length; i++) {
      const across = this.steps[i].at;
      if (across + acrossSize > this.acrossSize + SLACK) break;
      const along = this.levelOver(i, across + acrossSize);
      if (along + alongSize > this.alongSize + SLACK) continue;
      const score = rule === "least-start" ? along : along + alongSize;
      if (best === null || score < best.score - SLACK) best = { across, along, score };
    }
    return best;
  }

  /** Takes the place that `find` gave. */
  take({ across, along }: Spot, acrossSize: number, alongSize: number): void {
    const end = across + acrossSize;
    const raised: Step[] = [];
    for (const step of this.steps) {
      const stepEnd = step.at + step.width;
      if (step.at < across) raised.push({ ...step, width: Math.min(stepEnd, across) - step.at });
      if (step.at <= across && across < stepEnd) {
        raised.push({ at: across, width: acrossSize, level: along + alongSize });
      }
      if (stepEnd > end + SLACK) {
        const from = Math.max(step.at, end);
        raised.push({ at: from, width: stepEnd - from, level: step.level });
      }
    }
    this.steps = raised;
  }

  /** How far along the sheet is filled anywhere. */
  reach(): number {
    return this.steps.reduce((furthest, { level }) => Math.max(furthest, level), 0);
  }

  private levelOver(first: number, end: number): number {
    let level = 0;
    for (let i = first; i < this.steps.length && this.steps[i].at < end - SLACK; i++) {
      level = Math.max(level, this.steps[i].level);
    }
    return level;
  }
}
