import { sweepCrossings } from "./arc";
import type { Curve, Path, Point, Spline } from "./curve";
import { endOf, pointAt, startOf } from "./curve-measure";
import { ellipseExtremes } from "./ellipse";
import { flattenPath } from "./flatten";
import { distanceToSegment } from "./point";
import { type Bezier, bezierEnd, bezierHalves, bezierHullBox, bezierStart, splineBeziers } from "./spline";

/** Whether the ray from `point` toward +x crosses the segment; ends count by the half-open rule. */
function segmentCrosses(from: Point, to: Point, point: Point): boolean {
  if (from.y > point.y === to.y > point.y) return false;
  return from.x + ((point.y - from.y) / (to.y - from.y)) * (to.x - from.x) > point.x;
}

/** Crossings of a piece that is monotone in y, between the shares t0 and t1 of its curve, found by bisection. */
function monotoneCrosses(curve: Curve, t0: number, t1: number, point: Point): boolean {
  const from = pointAt(curve, t0);
  const to = pointAt(curve, t1);
  const rises = to.y > point.y;
  if (from.y > point.y === rises) return false;
  let low = t0;
  let high = t1;
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (pointAt(curve, middle).y > point.y === rises) high = middle;
    else low = middle;
  }
  return pointAt(curve, (low + high) / 2).x > point.x;
}

function bezierCrossings(bezier: Bezier, point: Point, depth: number): number {
  const box = bezierHullBox(bezier);
  if (box.maxY < point.y || box.minY > point.y || box.maxX < point.x) return 0;
  const from = bezierStart(bezier);
  const to = bezierEnd(bezier);
  // Wholly to the right of the point: the parity of crossings is that of the ends.
  if (box.minX > point.x) return from.y > point.y !== to.y > point.y ? 1 : 0;
  if (depth >= 48) return segmentCrosses(from, to, point) ? 1 : 0;
  const [left, right] = bezierHalves(bezier);
  return bezierCrossings(left, point, depth + 1) + bezierCrossings(right, point, depth + 1);
}

const splineCrossings = (spline: Spline, point: Point): number =>
  splineBeziers(spline).reduce((sum, bezier) => sum + bezierCrossings(bezier, point, 0), 0);

function curveCrossings(curve: Curve, point: Point): number {
  if (curve.kind === "line") return segmentCrosses(curve.from, curve.to, point) ? 1 : 0;
  if (curve.kind === "spline") return splineCrossings(curve, point);
  if (curve.sweep === 0) return 0;
  const turns =
    curve.kind === "arc"
      ? sweepCrossings(curve.start, curve.sweep, Math.PI / 2, Math.PI)
      : ellipseExtremes(curve, "y");
  const shares = [0, ...turns.map((u) => (u - curve.start) / curve.sweep), 1];
  let crossings = 0;
  for (let i = 1; i < shares.length; i++)
    if (monotoneCrosses(curve, shares[i - 1], shares[i], point)) crossings++;
  return crossings;
}

/**
 * Whether the point is inside, even-odd, against the exact curves. Gaps between curves, and from the last end to
 * the first start, are closed by straight lines. Points on the edge may fall either way.
 */
export function containsPoint(path: Path, point: Point): boolean {
  if (path.curves.length === 0) return false;
  let crossings = 0;
  let last = endOf(path.curves[path.curves.length - 1]);
  for (const curve of path.curves) {
    if (segmentCrosses(last, startOf(curve), point)) crossings++;
    crossings += curveCrossings(curve, point);
    last = endOf(curve);
  }
  return crossings % 2 === 1;
}

/**
 * A point inside `outer` and outside every hole, well away from the edges; null where there is none (nothing
 * enclosed at `tolerance`). Tried on level lines: thirty even ones, then one between each two corners in height.
 */
export function interiorPoint(outer: Path, holes: readonly Path[], tolerance: number): Point | null {
  const rings = [outer, ...holes]
    .map((path) => flattenPath(path, tolerance))
    .filter((ring) => ring.length > 2);
  const heights = rings.flatMap((ring) => ring.map((p) => p.y)).sort((a, b) => a - b);
  if (heights.length === 0) return null;
  const low = heights[0];
  const high = heights[heights.length - 1];
  const even = Array.from({ length: 30 }, (_, i) => low + ((i + 0.5) / 30) * (high - low));
  const isInside = (p: Point) => containsPoint(outer, p) && !holes.some((hole) => containsPoint(hole, p));
  const roomiest = candidatesOn(even, rings)
    .sort((p, q) => q.width - p.width)
    .slice(0, 12)
    .map(({ at }) => ({ at, room: distanceToRings(at, rings) }))
    .sort((p, q) => q.room - p.room)
    .find(({ at }) => isInside(at));
  if (roomiest) return roomiest.at;
  for (let i = 1; i < heights.length; i++) {
    if (heights[i] === heights[i - 1]) continue;
    const between = candidatesOn([(heights[i] + heights[i - 1]) / 2], rings).sort(
      (p, q) => q.width - p.width,
    );
    const found = between.find(({ at }) => isInside(at));
    if (found) return found.at;
  }
  return null;
}

/** Middles of the stretches of level lines that lie inside the rings, even-odd. */
function candidatesOn(levels: readonly number[], rings: readonly (readonly Point[])[]) {
  const found: { at: Point; width: number }[] = [];
  for (const y of levels) {
    const crossings: number[] = [];
    for (const ring of rings) {
      let last = ring[ring.length - 1];
      for (const next of ring) {
        if (last.y > y !== next.y > y)
          crossings.push(last.x + ((y - last.y) / (next.y - last.y)) * (next.x - last.x));
        last = next;
      }
    }
    crossings.sort((a, b) => a - b);
    for (let i = 1; i < crossings.length; i += 2) {
      const width = crossings[i] - crossings[i - 1];
      if (width > 0) found.push({ at: { x: (crossings[i] + crossings[i - 1]) / 2, y }, width });
    }
  }
  return found;
}

function distanceToRings(point: Point, rings: readonly (readonly Point[])[]): number {
  let best = Infinity;
  for (const ring of rings) {
    let last = ring[ring.length - 1];
    for (const next of ring) {
      best = Math.min(best, distanceToSegment(point, last, next));
      last = next;
    }
  }
  return best;
}
