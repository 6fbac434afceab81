import { sweepContains } from "./arc";
import type { Curve, EllipseArc, Point, Spline } from "./curve";
import { endOf, startOf } from "./curve-measure";
import { ellipsePoint } from "./ellipse";
import { angleOf, distance, distanceToSegment, subtract } from "./point";
import { type Bezier, bezierBulk, bezierEnd, bezierHalves, bezierStart, splineBeziers } from "./spline";

/** Shortest distance from the point to the curve, its ends included; within `tolerance` for ellipses and splines. */
export function distancePointToCurve(curve: Curve, point: Point, tolerance = 1e-9): number {
  switch (curve.kind) {
    case "line":
      return distanceToSegment(point, curve.from, curve.to);
    case "arc": {
      const ends = Math.min(distance(point, startOf(curve)), distance(point, endOf(curve)));
      const spoke = subtract(point, curve.centre);
      if (!sweepContains(curve.start, curve.sweep, angleOf(spoke))) return ends;
      return Math.min(ends, Math.abs(Math.hypot(spoke.x, spoke.y) - curve.radius));
    }
    case "ellipse":
      return distanceToEllipse(curve, point, tolerance);
    case "spline":
      return distanceToSpline(curve, point, tolerance);
  }
}

/** Best of 64 samples, then golden sections about each sample that is nearer than its neighbours. */
function distanceToEllipse(ellipse: EllipseArc, point: Point, tolerance: number): number {
  const samples = 64;
  const at = (t: number) => distance(point, ellipsePoint(ellipse, ellipse.start + ellipse.sweep * t));
  const values = Array.from({ length: samples + 1 }, (_, i) => at(i / samples));
  let best = Math.min(...values);
  for (let i = 0; i <= samples; i++) {
    const isValley = values[i] <= (values[i - 1] ?? Infinity) && values[i] <= (values[i + 1] ?? Infinity);
    if (!isValley) continue;
    const low = Math.max(0, i - 1) / samples;
    const high = Math.min(samples, i + 1) / samples;
    best = Math.min(best, goldenMinimum(at, low, high, tolerance));
  }
  return best;
}

function goldenMinimum(value: (t: number) => number, from: number, to: number, tolerance: number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  let low = from;
  let high = to;
  let inner = high - golden * (high - low);
  let outer = low + golden * (high - low);
  let atInner = value(inner);
  let atOuter = value(outer);
  for (let i = 0; i < 60 && Math.abs(atInner - atOuter) + (high - low) > tolerance * 1e-3; i++) {
    if (atInner < atOuter) {
      high = outer;
      outer = inner;
      atOuter = atInner;
      inner = high - golden * (high - low);
      atInner = value(inner);
    } else {
      low = inner;
      inner = outer;
      atInner = atOuter;
      outer = low + golden * (high - low);
      atOuter = value(outer);
    }
  }
  return Math.min(atInner, atOuter);
}

/** A Bézier piece with the least distance it can have: its hull lies within `bulk` of its chord. */
function bounded(bezier: Bezier, point: Point) {
  const [from, to] = [bezierStart(bezier), bezierEnd(bezier)];
  const toChord = distanceToSegment(point, from, to);
  const bulk = bezierBulk(bezier);
  return { bezier, toChord, bulk, least: toChord - bulk };
}

/** Halves the pieces that could still be nearer until they are their chords within the tolerance; at most 20,000 times. */
function distanceToSpline(spline: Spline, point: Point, tolerance: number): number {
  const pending = splineBeziers(spline).map((bezier) => bounded(bezier, point));
  let best = pending.reduce((least, { toChord, bulk }) => Math.min(least, toChord + bulk), Infinity);
  let halvings = 0;
  for (let next = pending.pop(); next; next = pending.pop()) {
    if (next.least >= best) continue;
    if (next.bulk <= tolerance || halvings >= 20_000) {
      best = Math.min(best, next.toChord);
      continue;
    }
    halvings++;
    const halves = bezierHalves(next.bezier).map((half) => bounded(half, point));
    for (const { toChord, bulk } of halves) best = Math.min(best, toChord + bulk);
    pending.push(...halves.sort((p, q) => q.toChord - p.toChord));
  }
  return best;
}
