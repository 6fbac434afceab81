import { type Point, rotate } from "../geometry";
import { type Motion, moved } from "./motion";
import type { SegmentIndex } from "./segment-index";

const STEPS = 6;
/** Points that a step is taken from: enough for three unknowns on any outline. */
const MOST_POINTS = 400;
/** Keeps a direction in which the outline can slide on itself (a circle's turn) where it is. */
const DAMPING = 1e-9;

/**
 * Lays points on chords better: least squares of the distances across the chords in the turn and the move
 * (Gauss-Newton on point-to-line distances), from a motion that brings them within `reach`.
 */
export function refineMotion(
  points: readonly Point[],
  chords: SegmentIndex,
  start: Motion,
  reach: number,
): Motion {
  const stride = Math.max(1, Math.floor(points.length / MOST_POINTS));
  let motion = start;
  for (let step = 0; step < STEPS; step++) {
    const pivot = moved(points[0], motion);
    const normal = [0, 0, 0, 0, 0, 0];
    const right = [0, 0, 0];
    for (let i = 0; i < points.length; i += stride) {
      const at = moved(points[i], motion);
      const foot = chords.foot(at, reach);
      if (!foot) continue;
      const across = { x: -foot.along.y, y: foot.along.x };
      const off = (at.x - foot.at.x) * across.x + (at.y - foot.at.y) * across.y;
      const byTurn = across.y * (at.x - pivot.x) - across.x * (at.y - pivot.y);
      const row = [byTurn, across.x, across.y];
      normal[0] += row[0] * row[0];
      normal[1] += row[0] * row[1];
      normal[2] += row[0] * row[2];
      normal[3] += row[1] * row[1];
      normal[4] += row[1] * row[2];
      normal[5] += row[2] * row[2];
      for (let k = 0; k < 3; k++) right[k] -= row[k] * off;
    }
    const change = solveSymmetric(normal, right);
    if (!change) break;
    motion = turnedAbout(motion, pivot, change);
    if (Math.hypot(change[1], change[2]) < 1e-9 && Math.abs(change[0]) < 1e-12) break;
  }
  return motion;
}

/** The motion, then a turn by `[0]` about the pivot and a move by `[1]`, `[2]`. */
function turnedAbout(motion: Motion, pivot: Point, [turn, x, y]: readonly number[]): Motion {
  const move = rotate(motion.move, turn, pivot);
  return { turn: motion.turn + turn, move: { x: move.x + x, y: move.y + y } };
}

/** Solves a symmetric 3 × 3 system given by its upper half in rows, or null where it has no solution. */
function solveSymmetric(
  [a, b, c, d, e, f]: readonly number[],
  [p, q, r]: readonly number[],
): number[] | null {
  const size = a + d + f;
  if (!(size > 0)) return null;
  const A = a + DAMPING * size;
  const D = d + DAMPING * size;
  const F = f + DAMPING * size;
  const determinant = A * (D * F - e * e) - b * (b * F - e * c) + c * (b * e - D * c);
  if (!(Math.abs(determinant) > 0)) return null;
  return [
    (p * (D * F - e * e) - b * (q * F - e * r) + c * (q * e - D * r)) / determinant,
    (A * (q * F - e * r) - p * (b * F - e * c) + c * (b * r - q * c)) / determinant,
    (A * (D * r - q * e) - b * (b * r - q * c) + p * (b * e - D * c)) / determinant,
  ];
}
