import type { Arc, Point } from "./curve";

export const FULL_TURN = 2 * Math.PI;

/** The angle brought into [0, 2π). */
export function normaliseAngle(angle: number): number {
  const turned = angle % FULL_TURN;
  return turned < 0 ? turned + FULL_TURN : turned;
}

/** Whether a sweep is a whole turn, within 1e-9 of a radian. */
export const sweepIsFull = (sweep: number): boolean => Math.abs(sweep) >= FULL_TURN - 1e-9;

/** Whether going from `start` through `sweep` passes `angle` (modulo a turn), the ends included. */
export function sweepContains(start: number, sweep: number, angle: number): boolean {
  if (sweepIsFull(sweep)) return true;
  const along = sweep >= 0 ? normaliseAngle(angle - start) : normaliseAngle(start - angle);
  return along <= Math.abs(sweep);
}

/** The parameters base + k·period strictly inside the sweep, in the order they are passed. */
export function sweepCrossings(start: number, sweep: number, base: number, period: number): number[] {
  const low = Math.min(start, start + sweep);
  const high = Math.max(start, start + sweep);
  const found: number[] = [];
  for (let k = Math.floor((low - base) / period) + 1; base + k * period < high; k++)
    found.push(base + k * period);
  return sweep < 0 ? found.reverse() : found;
}

export const arcPoint = (arc: Arc, angle: number): Point => ({
  x: arc.centre.x + arc.radius * Math.cos(angle),
  y: arc.centre.y + arc.radius * Math.sin(angle),
});

/** A full circle, counter-clockwise from its rightmost point. */
export const circle = (centre: Point, radius: number): Arc => ({
  kind: "arc",
  centre,
  radius,
  start: 0,
  sweep: FULL_TURN,
});

/**
 * The arc from `from` to `to` whose bulge is tan(sweep / 4), counter-clockwise positive (DXF Reference,
 * LWPOLYLINE code 42). Null where the bulge is zero or the points coincide: that is a line.
 */
export function arcFromBulge(from: Point, to: Point, bulge: number): Arc | null {
  const dx = to.x - from.x;
  const dy = to.y - from.y;
  const chord = Math.hypot(dx, dy);
  if (bulge === 0 || chord === 0) return null;
  const radius = (chord * (1 + bulge * bulge)) / (4 * Math.abs(bulge));
  if (!Number.isFinite(radius) || radius > chord * 1e12) return null;
  // Distance from the chord's middle to the centre, positive to the left of from -> to.
  const offset = (1 - bulge * bulge) / (4 * bulge);
  const centre = { x: (from.x + to.x) / 2 - dy * offset, y: (from.y + to.y) / 2 + dx * offset };
  return {
    kind: "arc",
    centre,
    radius,
    start: Math.atan2(from.y - centre.y, from.x - centre.x),
    sweep: 4 * Math.atan(bulge),
  };
}
