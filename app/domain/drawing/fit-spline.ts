import { add, distance, magnitude, type Point, type Spline, scale, subtract } from "../geometry";

/** Rows of a tridiagonal system: below, on and above the diagonal, and the right-hand side. */
interface Row {
  readonly below: number;
  readonly on: number;
  readonly above: number;
  readonly right: Point;
}

/** Elimination without pivoting: the systems here are diagonally dominant. */
function solveTridiagonal(rows: readonly Row[]): Point[] {
  const above: number[] = [];
  const right: Point[] = [];
  for (const [i, row] of rows.entries()) {
    const pivot = i === 0 ? row.on : row.on - row.below * above[i - 1];
    above.push(row.above / pivot);
    const lower = i === 0 ? row.right : subtract(row.right, scale(right[i - 1], row.below));
    right.push(scale(lower, 1 / pivot));
  }
  const solution = right;
  for (let i = rows.length - 2; i >= 0; i--)
    solution[i] = subtract(right[i], scale(solution[i + 1], above[i]));
  return solution;
}

/** The same with corners joined (rows wrap round), by the Sherman-Morrison formula. */
function solveCyclic(rows: readonly Row[]): Point[] {
  const last = rows.length - 1;
  const [alpha, beta] = [rows[last].above, rows[0].below];
  const gamma = -rows[0].on;
  const trimmed = rows.map((row, i) => {
    if (i === 0) return { ...row, on: row.on - gamma };
    return i === last ? { ...row, on: row.on - (alpha * beta) / gamma } : row;
  });
  const plain = solveTridiagonal(trimmed);
  const unit = trimmed.map((row, i) => {
    const x = i === 0 ? gamma : i === last ? alpha : 0;
    return { ...row, right: { x, y: 0 } };
  });
  const z = solveTridiagonal(unit).map((p) => p.x);
  const share = 1 / (1 + z[0] + (beta / gamma) * z[last]);
  const factor = scale(add(plain[0], scale(plain[last], beta / gamma)), share);
  return plain.map((p, i) => subtract(p, scale(factor, z[i])));
}

const slope = (p: Point, q: Point, step: number): Point => scale(subtract(q, p), 3 / (step * step));

/** Condition of an inner point: the second derivative does not jump there. */
const smoothRow = (before: Point, at: Point, after: Point, stepBefore: number, stepAfter: number): Row => ({
  below: 1 / stepBefore,
  on: 2 / stepBefore + 2 / stepAfter,
  above: 1 / stepAfter,
  right: add(slope(before, at, stepBefore), slope(at, after, stepAfter)),
});

function endRow(
  tangent: Point | null,
  from: Point,
  to: Point,
  step: number,
): Omit<Row, "below" | "above"> & { beside: number } {
  if (tangent && magnitude(tangent) > 0)
    return { on: 1, beside: 0, right: scale(tangent, 1 / magnitude(tangent)) };
  return { on: 2, beside: 1, right: scale(subtract(to, from), 3 / step) };
}

/** First derivatives at the points; unit speed along given end tangents, else no curvature at the ends. */
function derivatives(
  points: readonly Point[],
  steps: readonly number[],
  start: Point | null,
  end: Point | null,
): Point[] {
  const last = points.length - 1;
  const first = endRow(start, points[0], points[1], steps[0]);
  const final = endRow(end, points[last - 1], points[last], steps[last - 1]);
  const rows: Row[] = [{ below: 0, on: first.on, above: first.beside, right: first.right }];
  for (let i = 1; i < last; i++)
    rows.push(smoothRow(points[i - 1], points[i], points[i + 1], steps[i - 1], steps[i]));
  rows.push({ below: final.beside, on: final.on, above: 0, right: final.right });
  return solveTridiagonal(rows);
}

/** As `derivatives` for a loop whose last point is its first again. */
function loopDerivatives(points: readonly Point[], steps: readonly number[]): Point[] {
  const count = points.length - 1;
  const rows = steps.map((step, i) => {
    const before = (i + count - 1) % count;
    return smoothRow(points[before], points[i], points[i + 1], steps[before], step);
  });
  const found = solveCyclic(rows);
  return [...found, found[0]];
}

/**
 * The cubic spline with continuous curvature through the fit points, its parameter the chord length: how drawings
 * that give fit points only are drawn. Null for fewer than two different points.
 */
export function fitSpline(
  fit: readonly Point[],
  start: Point | null,
  end: Point | null,
  closed: boolean,
): Spline | null {
  const points = fit.filter((p, i) => i === 0 || distance(p, fit[i - 1]) > 0);
  if (closed && points.length > 2 && distance(points[0], points[points.length - 1]) > 0)
    points.push(points[0]);
  if (points.length < 2) return null;
  const steps = points.slice(1).map((p, i) => distance(points[i], p));
  const isLoop = closed && points.length > 3 && !start && !end;
  const speeds = isLoop ? loopDerivatives(points, steps) : derivatives(points, steps, start, end);

  const control = [points[0]];
  const knots = [0, 0, 0, 0];
  let along = 0;
  for (const [i, step] of steps.entries()) {
    control.push(add(points[i], scale(speeds[i], step / 3)));
    control.push(subtract(points[i + 1], scale(speeds[i + 1], step / 3)));
    control.push(points[i + 1]);
    along += step;
    knots.push(along, along, along);
  }
  knots.push(along);
  return { kind: "spline", degree: 3, knots, control, weights: null };
}
