import type { Point } from "../geometry";
import type { PartsReport } from "../parts";
import type { ShownUnit } from "../units";
import type { FitLimits } from "./limits";

/** `stop` must be mended or redrawn, `ask` answered by the builder, `note` is good to know. */
export type Severity = "stop" | "ask" | "note";

/** Something that would go wrong, with its place and its measure. Lengths in millimetres. */
export interface Finding {
  readonly code: string;
  readonly severity: Severity;
  /** The part's id, or null where it is not about one part. */
  readonly part: string | null;
  /** The copy, counted from 1, or null where all copies are alike. */
  readonly copy: number | null;
  readonly at: Point | null;
  readonly measured: number | null;
  readonly limit: number | null;
  /** The measure, the limit, the act, in a sentence or two. */
  readonly words: string;
  /** The mend that would settle it, by name, or null where only the builder can. */
  readonly remedy: string | null;
}

/** The stock as measured on the rack, millimetres. */
export interface FitStock {
  readonly thickness: { readonly min: number; readonly mean: number; readonly max: number };
  readonly sheet: { readonly width: number; readonly height: number };
  /** Kept free along each edge of the sheet. */
  readonly margin: number;
}

export interface FitInput {
  readonly report: PartsReport;
  readonly stock: FitStock;
  /** Of the mills that cut outlines and openings; drills are another matter. */
  readonly tools: { readonly smallestDiameter: number };
  /** How many times all that is drawn is ordered; once where not given. */
  readonly sets?: number;
  /** Thresholds that differ from the defaults. */
  readonly limits?: Partial<FitLimits>;
  /** What lengths are written in; millimetres where not given. */
  readonly shown?: ShownUnit;
}

/** What a rule is given: the input with all thresholds, and lengths as words. */
export interface FitCase extends Omit<FitInput, "limits" | "shown"> {
  readonly limits: FitLimits;
  readonly say: (length: number) => string;
}

export type FitRule = (fit: FitCase) => Finding[];
