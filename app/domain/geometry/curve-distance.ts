import { sweepContains } from "./arc";
import { distancePointToBox } from "./box";
import type { Curve, EllipseArc, Point, Spline } from "./curve";
import { endOf, startOf } from "./curve-measure";
import { ellipsePoint } from "./ellipse";
import { angleOf, distance, distanceToSegment, subtract } from "./point";
import { bezierEnd, bezierHalves, bezierHullBox, bezierStart, splineBeziers } from "./spline";

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

/** Halves the pieces whose hull could still be nearer; at most 20,000 halvings. */
function distanceToSpline(spline: Spline, point: Point, tolerance: number): number {
  const pieces = splineBeziers(spline);
  let best = distance(point, bezierStart(pieces[0]));
  for (const piece of pieces) best = Math.min(best, distance(point, bezierEnd(piece)));
  const bounded = pieces.map((bezier) => ({
    bezier,
    least: distancePointToBox(bezierHullBox(bezier), point),
  }));
  const pending = bounded.sort((p, q) => q.least - p.least);
  let halvings = 0;
  for (let next = pending.pop(); next && halvings < 20_000; next = pending.pop()) {
    if (next.least >= best - tolerance) continue;
    halvings++;
    const halves = bezierHalves(next.bezier);
    best = Math.min(best, distance(point, bezierEnd(halves[0])));
    const both = halves.map((bezier) => ({
      bezier,
      least: distancePointToBox(bezierHullBox(bezier), point),
    }));
    pending.push(...both.sort((p, q) => q.least - p.least));
  }
  return best;
}
