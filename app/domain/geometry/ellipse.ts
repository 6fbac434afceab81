import { sweepCrossings } from "./arc";
import type { Arc, EllipseArc, Point } from "./curve";
import { angleOf, cross, dot, magnitude } from "./point";
import { integrate } from "./quadrature";

/** The minor half-axis as a vector: the major turned a quarter counter-clockwise, times the ratio. */
export const ellipseMinor = (ellipse: EllipseArc): Point => ({
  x: -ellipse.major.y * ellipse.ratio,
  y: ellipse.major.x * ellipse.ratio,
});

export function ellipsePoint(ellipse: EllipseArc, u: number): Point {
  const cos = Math.cos(u);
  const sin = Math.sin(u) * ellipse.ratio;
  return {
    x: ellipse.centre.x + cos * ellipse.major.x - sin * ellipse.major.y,
    y: ellipse.centre.y + cos * ellipse.major.y + sin * ellipse.major.x,
  };
}

/** Derivative by the parameter. */
export function ellipseTangent(ellipse: EllipseArc, u: number): Point {
  const cos = Math.cos(u) * ellipse.ratio;
  const sin = Math.sin(u);
  return {
    x: -sin * ellipse.major.x - cos * ellipse.major.y,
    y: -sin * ellipse.major.y + cos * ellipse.major.x,
  };
}

/** By quadrature between quarter points, relative error below 1e-10. */
export function ellipseLength(ellipse: EllipseArc): number {
  const a = magnitude(ellipse.major);
  const b = a * ellipse.ratio;
  const speed = (u: number) => Math.hypot(a * Math.sin(u), b * Math.cos(u));
  const stops = [
    ellipse.start,
    ...sweepCrossings(ellipse.start, ellipse.sweep, 0, Math.PI / 2),
    ellipse.start + ellipse.sweep,
  ];
  let length = 0;
  for (let i = 1; i < stops.length; i++) {
    length += Math.abs(integrate(speed, stops[i - 1], stops[i], 1e-11 * Math.max(a, Math.abs(b))));
  }
  return length;
}

/** The parameters inside the sweep where the tangent is vertical (`x`) or horizontal (`y`), in order. */
export function ellipseExtremes(ellipse: EllipseArc, axis: "x" | "y"): number[] {
  const base = Math.atan2(ellipseMinor(ellipse)[axis], ellipse.major[axis]);
  return sweepCrossings(ellipse.start, ellipse.sweep, base, Math.PI);
}

/**
 * The curve centre + cos(u)·p + sin(u)·q for any two half-diameters p and q: a circular arc where they are
 * equal and square to each other (within 1e-12), else an ellipse on its principal axes with |ratio| at most 1.
 */
export function ellipseFromDiameters(
  centre: Point,
  p: Point,
  q: Point,
  start: number,
  sweep: number,
): Arc | EllipseArc {
  const size = Math.max(magnitude(p), magnitude(q));
  const skew = dot(p, q);
  const uneven = dot(p, p) - dot(q, q);
  const handedness = cross(p, q) < 0 ? -1 : 1;
  if (Math.abs(skew) <= 1e-12 * size * size && Math.abs(uneven) <= 1e-12 * size * size) {
    return {
      kind: "arc",
      centre,
      radius: size,
      start: angleOf(p) + handedness * start,
      sweep: handedness * sweep,
    };
  }
  // (cos²-sin²)·p·q = cos·sin·(p·p - q·q) makes the turned pair square; atan2 picks the longer one as first.
  const turn = Math.atan2(2 * skew, uneven) / 2;
  const cos = Math.cos(turn);
  const sin = Math.sin(turn);
  const major = { x: cos * p.x + sin * q.x, y: cos * p.y + sin * q.y };
  const minor = { x: -sin * p.x + cos * q.x, y: -sin * p.y + cos * q.y };
  const ratio = cross(major, minor) / dot(major, major);
  return { kind: "ellipse", centre, major, ratio, start: start - turn, sweep };
}
