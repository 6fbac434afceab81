import { FULL_TURN } from "./arc";
import type { Curve, Path, Point } from "./curve";
import { pointAt } from "./curve-measure";
import { magnitude } from "./point";
import { splineFlatten } from "./spline";

/** More chords in one turn than any drawing needs: a bound on memory for tiny tolerances. */
const MOST_CHORDS = 20_000;

/** Chords of a full circle whose sagitta is at most `tolerance`: ⌈2π / (2 acos(1 - e/r))⌉, at least 3. */
export function chordsOfCircle(radius: number, tolerance: number): number {
  if (!(tolerance < radius)) return 3;
  return Math.min(
    MOST_CHORDS,
    Math.max(3, Math.ceil(FULL_TURN / (2 * Math.acos(1 - tolerance / radius)) - 1e-9)),
  );
}

function evenPoints(curve: Curve, chords: number): Point[] {
  return Array.from({ length: chords + 1 }, (_, i) => pointAt(curve, i / chords));
}

/** Points along the curve, both ends included, whose chords are nowhere farther than `tolerance` from it. */
export function flattenCurve(curve: Curve, tolerance: number): Point[] {
  switch (curve.kind) {
    case "line":
      return [curve.from, curve.to];
    case "arc":
    case "ellipse": {
      // An ellipse at equal parameters is a stretched circle: its sagitta is at most that of the major circle.
      const radius =
        curve.kind === "arc" ? curve.radius : magnitude(curve.major) * Math.max(1, Math.abs(curve.ratio));
      const share = Math.abs(curve.sweep) / FULL_TURN;
      const chords = Math.max(1, Math.ceil(chordsOfCircle(radius, tolerance) * share - 1e-9));
      return evenPoints(curve, chords);
    }
    case "spline":
      return splineFlatten(curve, tolerance);
  }
}

/**
 * The path as points. Where a curve starts just where the one before ended the point is not repeated; a closed
 * path does not repeat its first point. Gaps become chords.
 */
export function flattenPath(path: Path, tolerance: number): Point[] {
  const points: Point[] = [];
  const near = (p: Point, q: Point) => Math.hypot(p.x - q.x, p.y - q.y) <= tolerance * 1e-3;
  for (const curve of path.curves) {
    for (const point of flattenCurve(curve, tolerance)) {
      const last = points[points.length - 1];
      if (!last || !near(last, point)) points.push(point);
    }
  }
  while (path.closed && points.length > 1 && near(points[0], points[points.length - 1])) points.pop();
  return points;
}
