import { PLAUSIBLE_LENGTH } from "../parts";
import { INCH_IN_MM } from "../units";

/** Thresholds of the rules, millimetres and square millimetres; every one is the shop's setting. */
export interface FitLimits {
  /** An open chain whose ends are this near is an outline that should be closed. */
  readonly nearlyClosedGap: number;
  /** Open chains on one layer listed one by one; more become one finding. */
  readonly mostOpenListed: number;
  /** Parts that enclose less are hard to hold. */
  readonly smallestPartArea: number;
  /** Parts narrower are hard to hold. */
  readonly narrowestPart: number;
  /** Parts that enclose less, or are narrower, are held by tabs: vacuum alone lets go of them. */
  readonly tabbedPartArea: number;
  readonly tabbedPartWidth: number;
  /** An opening should be wider than the tool by this much. */
  readonly toolClearance: number;
  /** A part shorter than this, or longer than the next, makes the unit doubtful. */
  readonly shortestPlausible: number;
  readonly longestPlausible: number;
  /** Floors of pockets under `thinFloor` are asked, under `thinnestFloor` stopped. */
  readonly thinFloor: number;
  readonly thinnestFloor: number;
  /** The same for the bored cup of a hinge, 35 mm wide. */
  readonly thinCupFloor: number;
  readonly thinnestCupFloor: number;
}

/**
 * Defaults of common practice, no source but the rule set for the upload check: part area 9 in² and width
 * 1.5 in, tabs under 36 in² or 100 mm (vacuum with kerfs open is weaker than sealed), clearance 0.01 in, sizes 0.5 in to 20 ft, floors 0.25 in and 0.10 in; hinge cups 3 mm and 1.5 mm.
 */
export const DEFAULT_LIMITS: FitLimits = {
  nearlyClosedGap: 2,
  mostOpenListed: 20,
  smallestPartArea: 9 * INCH_IN_MM ** 2,
  narrowestPart: 1.5 * INCH_IN_MM,
  tabbedPartArea: 36 * INCH_IN_MM ** 2,
  tabbedPartWidth: 100,
  toolClearance: 0.01 * INCH_IN_MM,
  shortestPlausible: PLAUSIBLE_LENGTH.shortest,
  longestPlausible: PLAUSIBLE_LENGTH.longest,
  thinFloor: 0.25 * INCH_IN_MM,
  thinnestFloor: 0.1 * INCH_IN_MM,
  thinCupFloor: 3,
  thinnestCupFloor: 1.5,
};
