/**
 * Plane curves, exact until a caller asks for chords. Angles and parameters are radians; lengths are in
 * whatever unit the caller's coordinates are in (millimetres everywhere but inside the `drawing` room).
 */
export interface Point {
  readonly x: number;
  readonly y: number;
}

export interface Line {
  readonly kind: "line";
  readonly from: Point;
  readonly to: Point;
}

/** A circular arc from angle `start` through the signed angle `sweep` (counter-clockwise positive, at most a full turn). */
export interface Arc {
  readonly kind: "arc";
  readonly centre: Point;
  readonly radius: number;
  readonly start: number;
  readonly sweep: number;
}

/**
 * An elliptical arc: centre + cos(u)·major + sin(u)·minor for u from `start` through `sweep`, where minor is
 * `major` turned a quarter counter-clockwise and scaled by `ratio` (a negative ratio is a mirrored ellipse).
 */
export interface EllipseArc {
  readonly kind: "ellipse";
  readonly centre: Point;
  readonly major: Point;
  readonly ratio: number;
  readonly start: number;
  readonly sweep: number;
}

/** A B-spline, rational when `weights` is given (NURBS); clamped or not, never periodic (periodic input is unrolled). */
export interface Spline {
  readonly kind: "spline";
  readonly degree: number;
  readonly knots: readonly number[];
  readonly control: readonly Point[];
  readonly weights: readonly number[] | null;
}

export type Curve = Line | Arc | EllipseArc | Spline;

/** Curves end to end. `closed` says that the last end meets the first start. */
export interface Path {
  readonly curves: readonly Curve[];
  readonly closed: boolean;
}

export interface Box {
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}
