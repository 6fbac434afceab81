import { type Curve, distance, type Point, type Spline, splineIsSound } from "../geometry";
import { fitSpline } from "./fit-spline";

/** A SPLINE entity as written. Bits of `flags`: 1 closed, 2 periodic, 4 rational. */
export interface SplineData {
  readonly degree: number;
  readonly flags: number;
  readonly knots: readonly number[];
  readonly weights: readonly number[];
  readonly control: readonly Point[];
  readonly fit: readonly Point[];
  readonly startTangent: Point | null;
  readonly endTangent: Point | null;
}

const CLOSED = 1;
const PERIODIC = 2;
/** Spans of the domain, as a share of all knots, that are taken for none. */
const SHORTEST_SPAN = 1e-12;

/** Knots of a clamped spline with even spans. */
function clampedKnots(degree: number, controls: number): number[] {
  const spans = controls - degree;
  return Array.from({ length: controls + degree + 1 }, (_, i) => Math.min(spans, Math.max(0, i - degree)));
}

/**
 * A closed spline given by each control point once and one knot more than those: the first `degree` points follow again
 * and the knots run on with the same steps on both sides.
 */
function unrolled(data: SplineData, weights: readonly number[] | null): Spline {
  const { degree, knots, control } = data;
  const count = control.length;
  const period = knots[count] - knots[0];
  const knotAt = (i: number) => {
    const turn = Math.floor(i / count);
    return knots[i - turn * count] + turn * period;
  };
  const again = <T>(list: readonly T[]) => [...list, ...list.slice(0, degree)];
  return {
    kind: "spline",
    degree,
    knots: Array.from({ length: count + 2 * degree + 1 }, (_, i) => knotAt(i - degree)),
    control: again(control),
    weights: weights && again(weights),
  };
}

function fromControl(data: SplineData): Spline | null {
  const { degree, knots, control } = data;
  if (data.weights.length > 0 && data.weights.length !== control.length) return null;
  const weights = data.weights.some((w) => w !== data.weights[0]) ? data.weights : null;
  const isPeriodic = (data.flags & (CLOSED | PERIODIC)) !== 0;
  if (isPeriodic && knots.length === control.length + 1 && control.length > degree)
    return unrolled(data, weights);
  const given = knots.length === 0 ? clampedKnots(degree, control.length) : withoutSlivers(knots);
  return { kind: "spline", degree, knots: given, control, weights };
}

/** Knots nearer to the one before than a share of 1e-12 of them all equal it: a span so short has no finite slope. */
function withoutSlivers(knots: readonly number[]): number[] {
  const least = SHORTEST_SPAN * Math.abs(knots[knots.length - 1] - knots[0]);
  let last = knots[0];
  return knots.map((knot) => {
    if (knot < last || knot - last > least) last = knot;
    return last;
  });
}

/**
 * The curve of a SPLINE: by its control points, or through its fit points where there are none. Straight ones
 * (degree 1) come as lines. Null for data that make no curve, nothing for a curve without length.
 */
export function splineCurves(data: SplineData): Curve[] | null {
  const spline =
    data.control.length > 0
      ? fromControl(data)
      : fitSpline(data.fit, data.startTangent, data.endTangent, (data.flags & (CLOSED | PERIODIC)) !== 0);
  if (spline === null || !splineIsSound(spline)) return null;
  const first = spline.control[0];
  if (spline.control.every((p) => distance(p, first) === 0)) return [];
  if (spline.degree > 1 || spline.knots[0] !== spline.knots[1]) return [spline];
  const lines: Curve[] = [];
  for (let i = 1; i < spline.control.length; i++) {
    const [from, to] = [spline.control[i - 1], spline.control[i]];
    if (distance(from, to) > 0) lines.push({ kind: "line", from, to });
  }
  return lines;
}
