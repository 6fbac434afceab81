import { boxContains, boxOfPoints, boxUnion } from "./box";
import type { Box, Point, Spline } from "./curve";
import { distanceToSegment } from "./point";
import { integrate } from "./quadrature";

/** A point with its weight, x and y already multiplied by it. */
interface Weighted {
  readonly x: number;
  readonly y: number;
  readonly w: number;
}

/** One polynomial piece of a spline in Bézier form. */
export type Bezier = readonly Weighted[];

/** Halvings of one Bézier piece: at 2^-24 of it a piece is its own chord. */
const DEEPEST = 24;

/**
 * Whether the data make a curve: enough control points, knots that never fall and leave a domain, positive
 * weights. Every other spline function takes this for granted.
 */
export function splineIsSound(spline: Spline): boolean {
  const { degree, knots, control, weights } = spline;
  if (!Number.isInteger(degree) || degree < 1 || degree > 25 || control.length < degree + 1) return false;
  if (knots.length !== control.length + degree + 1) return false;
  if (weights && (weights.length !== control.length || !weights.every((w) => w > 0 && Number.isFinite(w)))) {
    return false;
  }
  for (let i = 1; i < knots.length; i++) if (!(knots[i] >= knots[i - 1])) return false;
  return knots[degree] < knots[control.length];
}

/** The knot spans of the domain that have length, by the index of their first knot. */
function spansOf(spline: Spline): number[] {
  const spans: number[] = [];
  for (let k = spline.degree; k < spline.control.length; k++) {
    if (spline.knots[k + 1] > spline.knots[k]) spans.push(k);
  }
  return spans;
}

function weightedControl(spline: Spline, index: number): Weighted {
  const { x, y } = spline.control[index];
  const w = spline.weights ? spline.weights[index] : 1;
  return { x: x * w, y: y * w, w };
}

/** De Boor's triangle on span `k` with its own argument on each level (a blossom); the last two rows' ends. */
function blossom(spline: Spline, k: number, args: (level: number) => number) {
  const { degree, knots } = spline;
  const row: Weighted[] = [];
  for (let i = k - degree; i <= k; i++) row.push(weightedControl(spline, i));
  let before = row[degree];
  let after = row[degree];
  for (let level = 1; level <= degree; level++) {
    const u = args(level);
    if (level === degree) {
      before = row[degree - 1];
      after = row[degree];
    }
    for (let i = degree; i >= level; i--) {
      const low = knots[k - degree + i];
      const a = (u - low) / (knots[k + 1 + i - level] - low);
      const p = row[i - 1];
      const q = row[i];
      row[i] = { x: p.x + (q.x - p.x) * a, y: p.y + (q.y - p.y) * a, w: p.w + (q.w - p.w) * a };
    }
  }
  return { value: row[degree], before, after };
}

function spanAt(spline: Spline, u: number): number {
  const { degree, knots, control } = spline;
  let low = degree;
  let high = control.length;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (knots[middle] <= u) low = middle;
    else high = middle;
  }
  while (low > degree && knots[low + 1] <= knots[low]) low--;
  return low;
}

function evaluate(spline: Spline, k: number, u: number): { point: Point; tangent: Point } {
  const { value, before, after } = blossom(spline, k, () => u);
  const point = { x: value.x / value.w, y: value.y / value.w };
  const rate = spline.degree / (spline.knots[k + 1] - spline.knots[k]);
  const dw = (after.w - before.w) * rate;
  return {
    point,
    tangent: {
      x: ((after.x - before.x) * rate - dw * point.x) / value.w,
      y: ((after.y - before.y) * rate - dw * point.y) / value.w,
    },
  };
}

export const splineDomain = (spline: Spline): readonly [number, number] => [
  spline.knots[spline.degree],
  spline.knots[spline.control.length],
];

export const splinePoint = (spline: Spline, u: number): Point => evaluate(spline, spanAt(spline, u), u).point;

/** Derivative by the knot parameter. */
export const splineTangent = (spline: Spline, u: number): Point =>
  evaluate(spline, spanAt(spline, u), u).tangent;

function integrateSpans(
  spline: Spline,
  value: (at: { point: Point; tangent: Point }) => number,
  tolerance: number,
) {
  const spans = spansOf(spline);
  let total = 0;
  for (const k of spans) {
    const integrand = (u: number) => value(evaluate(spline, k, u));
    total += integrate(integrand, spline.knots[k], spline.knots[k + 1], tolerance / spans.length);
  }
  return total;
}

/** Length of the polygon of control points: an upper bound of the curve's, and the scale of its tolerances. */
function controlLength(spline: Spline): number {
  let length = 0;
  for (let i = 1; i < spline.control.length; i++) {
    const p = spline.control[i - 1];
    const q = spline.control[i];
    length += Math.hypot(q.x - p.x, q.y - p.y);
  }
  return length;
}

/** By quadrature on each knot span, to 1e-9 of the control polygon's length (1e-6 at a cusp between nodes). */
export const splineLength = (spline: Spline): number =>
  integrateSpans(spline, ({ tangent }) => Math.hypot(tangent.x, tangent.y), 1e-9 * controlLength(spline));

/** Half the integral of x dy - y dx about `origin`: the spline's share in the area of a loop it is part of. */
export function splineSweptArea(spline: Spline, origin: Point): number {
  const size = controlLength(spline);
  const sweep = ({ point, tangent }: { point: Point; tangent: Point }) =>
    ((point.x - origin.x) * tangent.y - (point.y - origin.y) * tangent.x) / 2;
  return integrateSpans(spline, sweep, 1e-10 * size * size);
}

/** The spline cut at its knots. */
export function splineBeziers(spline: Spline): Bezier[] {
  const { degree, knots } = spline;
  return spansOf(spline).map((k) => {
    const from = knots[k];
    const to = knots[k + 1];
    return Array.from(
      { length: degree + 1 },
      (_, j) => blossom(spline, k, (l) => (l <= degree - j ? from : to)).value,
    );
  });
}

export const bezierStart = (bezier: Bezier): Point => plain(bezier[0]);
export const bezierEnd = (bezier: Bezier): Point => plain(bezier[bezier.length - 1]);
const plain = ({ x, y, w }: Weighted): Point => ({ x: x / w, y: y / w });

/** The box of the control points, which holds the curve. */
export const bezierHullBox = (bezier: Bezier): Box => boxOfPoints(bezier.map(plain));

/** How far the control points, and so the curve, stray from the chord. */
export function bezierBulk(bezier: Bezier): number {
  const [from, to] = [bezierStart(bezier), bezierEnd(bezier)];
  return bezier.reduce((most, w) => Math.max(most, distanceToSegment(plain(w), from, to)), 0);
}

/** De Casteljau at the middle. */
export function bezierHalves(bezier: Bezier): readonly [Bezier, Bezier] {
  const left: Weighted[] = [];
  const right: Weighted[] = [];
  let row: readonly Weighted[] = bezier;
  while (row.length > 0) {
    left.push(row[0]);
    right.push(row[row.length - 1]);
    const above = row;
    row = above.slice(1).map((q, i) => ({
      x: (above[i].x + q.x) / 2,
      y: (above[i].y + q.y) / 2,
      w: (above[i].w + q.w) / 2,
    }));
  }
  return [left, right.reverse()];
}

/** Tight to 1e-12 of the control polygon's box: only pieces whose hull still sticks out are halved. */
export function splineBox(spline: Spline): Box {
  const beziers = splineBeziers(spline);
  let box = boxOfPoints(beziers.flatMap((bezier) => [bezierStart(bezier), bezierEnd(bezier)]));
  const hull = boxOfPoints(spline.control);
  const slack = 1e-12 * Math.max(hull.maxX - hull.minX, hull.maxY - hull.minY);
  const pending = beziers.map((bezier) => ({ bezier, depth: 0 }));
  for (let next = pending.pop(); next; next = pending.pop()) {
    const loose = {
      minX: box.minX - slack,
      minY: box.minY - slack,
      maxX: box.maxX + slack,
      maxY: box.maxY + slack,
    };
    if (next.depth >= DEEPEST || boxContains(loose, bezierHullBox(next.bezier))) continue;
    const halves = bezierHalves(next.bezier);
    box = boxUnion(box, boxOfPoints([bezierEnd(halves[0])]));
    for (const bezier of halves) pending.push({ bezier, depth: next.depth + 1 });
  }
  return box;
}

/** Points along the spline, both ends included, whose chords are nowhere farther than `tolerance` from it. */
export function splineFlatten(spline: Spline, tolerance: number): Point[] {
  const beziers = splineBeziers(spline);
  const points = [bezierStart(beziers[0])];
  for (const first of beziers) {
    const pending = [{ bezier: first, depth: 0 }];
    for (let next = pending.pop(); next; next = pending.pop()) {
      if (next.depth >= 14 || bezierBulk(next.bezier) <= tolerance) {
        points.push(bezierEnd(next.bezier));
        continue;
      }
      const [left, right] = bezierHalves(next.bezier);
      pending.push({ bezier: right, depth: next.depth + 1 }, { bezier: left, depth: next.depth + 1 });
    }
  }
  return points;
}
