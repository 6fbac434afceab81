import type { Path, Point } from "../geometry";
import type { LengthUnit } from "../units";

/** One entity read as curves (a polyline is one of these), after blocks are expanded. */
export interface DrawnPath {
  readonly path: Path;
  readonly layer: string;
  /** DXF entity type, the ordinal of the modelspace entity it comes from, and the block it was expanded from. */
  readonly source: { readonly type: string; readonly entity: number; readonly block: string | null };
  /** On a layer that is off or frozen. */
  readonly hidden: boolean;
}

/** Text kept for naming parts and for the list of set-asides; never cut. */
export interface DrawnText {
  readonly text: string;
  readonly at: Point;
  readonly height: number;
  readonly layer: string;
}

export type IgnoredReason =
  | "not-a-curve"
  | "paper-space"
  | "three-dimensional"
  | "damaged"
  | "too-deep"
  | "too-many";

export interface Ignored {
  readonly type: string;
  readonly layer: string;
  readonly count: number;
  readonly why: IgnoredReason;
}

/** What a file holds. `unit` says what the coordinates are in: `"drawing"` until a unit is chosen. */
export interface Drawing {
  readonly unit: "drawing" | "mm";
  readonly declared: LengthUnit | null;
  readonly layers: readonly { readonly name: string; readonly hidden: boolean; readonly count: number }[];
  /** Modelspace entities as in the file, before blocks are expanded, by DXF type. */
  readonly entities: Readonly<Record<string, number>>;
  readonly paths: readonly DrawnPath[];
  readonly texts: readonly DrawnText[];
  readonly ignored: readonly Ignored[];
  /** Plain sentences about the file itself: cut short, codes out of order mended, code page assumed. */
  readonly notes: readonly string[];
}

export type ReadResult =
  | { readonly ok: true; readonly drawing: Drawing }
  | { readonly ok: false; readonly reason: string };
