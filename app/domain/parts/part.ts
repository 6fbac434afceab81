import type { Box, Curve, Path, Point } from "../geometry";

export type OperationKind = "outside" | "cut-through" | "pocket" | "drill" | "engrave" | "set-aside";

/** Depth from the top face, or material left above the bottom face; never both. Null for a through cut. */
export type Depth = { readonly depth: number } | { readonly leave: number } | null;

/** A closed outline inside a part, with what is to be done to it. */
export interface Feature {
  readonly kind: Exclude<OperationKind, "outside" | "set-aside">;
  readonly layer: string;
  readonly path: Path;
  readonly depth: Depth;
  /** Set when the outline is one full circle. */
  readonly diameter: number | null;
  readonly length: number;
  readonly area: number;
  readonly box: Box;
}

/** One physical copy as drawn: the map from the part's own frame (its first copy) to where this copy stands. */
export interface Copy {
  /** A point inside the copy's material, drawing millimetres. */
  readonly at: Point;
  /** Rotation about the origin in degrees counter-clockwise, then a move, that carry the first copy onto this one. */
  readonly turnDegrees: number;
  readonly move: Point;
}

/** One kind of part: congruent copies counted together. All lengths millimetres, areas square millimetres. */
export interface Part {
  /** Stable within the drawing: A, B, ... Z, AA ... by the order of LOOK's table (largest first). */
  readonly id: string;
  readonly name: string;
  readonly quantity: number;
  readonly mirrorOf: string | null;
  readonly layer: string;
  readonly outer: Path;
  readonly features: readonly Feature[];
  readonly outerLength: number;
  readonly innerLength: number;
  /** Net of cut-through openings and drilled through holes; pockets do not reduce it. */
  readonly area: number;
  /** Inside the outer outline, openings included. */
  readonly grossArea: number;
  /** Of the first copy as drawn. */
  readonly box: Box;
  /** Minimum-area rectangle. */
  readonly smallestRect: { readonly long: number; readonly short: number };
  readonly holes: number;
  readonly copies: readonly Copy[];
}

export interface OpenChain {
  readonly layer: string;
  readonly length: number;
  /** Distance between the chain's two ends. */
  readonly gap: number;
  readonly at: Point;
  readonly curves: readonly Curve[];
}

export interface Bridge {
  readonly layer: string;
  readonly gap: number;
  readonly at: Point;
  /** A gap over the joining tolerance but within the asking tolerance stays closed only if the builder agrees. */
  readonly asked: boolean;
}

/** Two lines or two arcs that lie on each other for a part of their length, or an edge that neighbours share: cut once. */
export interface Overlap {
  readonly layer: string;
  /** Of what is doubled. */
  readonly length: number;
  /** The middle of what is doubled. */
  readonly at: Point;
}

/** A place where an outline crosses itself or another one; one place for each pair. */
export interface Crossing {
  readonly layer: string;
  readonly at: Point;
  readonly itself: boolean;
}

/** Two parts, by id, that are equal but for a difference under half a millimetre. */
export interface NearEqual {
  readonly one: string;
  readonly other: string;
  readonly difference: number;
}

export interface SetAside {
  readonly what: "frame" | "text" | "hidden" | "note" | "duplicate";
  readonly layer: string;
  readonly count: number;
  readonly paths: readonly Path[];
}

export interface PartsReport {
  readonly parts: readonly Part[];
  readonly open: readonly OpenChain[];
  readonly bridges: readonly Bridge[];
  readonly setAside: readonly SetAside[];
  readonly duplicates: number;
  /** Among outlines and openings that are cut. */
  readonly overlaps: readonly Overlap[];
  readonly crossings: readonly Crossing[];
  readonly nearEqual: readonly NearEqual[];
  readonly drawn: {
    readonly curves: number;
    readonly length: number;
    readonly uniqueLength: number;
    readonly hiddenLength: number;
    readonly loops: number;
    readonly depths: Readonly<Record<string, number>>;
    readonly openChains: number;
    readonly branches: number;
    readonly extents: Box | null;
  };
  readonly totals: {
    readonly parts: number;
    readonly distinctParts: number;
    readonly holes: number;
    readonly cutLength: number;
    readonly area: number;
    readonly box: { readonly width: number; readonly height: number };
  };
}

/** What the builder said of the layers; absent layers are guessed from geometry. */
export interface LayerRule {
  readonly layer: string;
  readonly kind: OperationKind;
  readonly depth: Depth;
}
