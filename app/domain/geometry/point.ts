import type { Point } from "./curve";

export const ORIGIN: Point = { x: 0, y: 0 };

export const add = (p: Point, q: Point): Point => ({ x: p.x + q.x, y: p.y + q.y });
export const subtract = (p: Point, q: Point): Point => ({ x: p.x - q.x, y: p.y - q.y });
export const scale = (p: Point, factor: number): Point => ({ x: p.x * factor, y: p.y * factor });
export const dot = (p: Point, q: Point): number => p.x * q.x + p.y * q.y;
/** Positive where q is counter-clockwise of p. */
export const cross = (p: Point, q: Point): number => p.x * q.y - p.y * q.x;
export const magnitude = (p: Point): number => Math.hypot(p.x, p.y);
export const distance = (p: Point, q: Point): number => Math.hypot(p.x - q.x, p.y - q.y);
/** A quarter turn counter-clockwise. */
export const perpendicular = (p: Point): Point => ({ x: -p.y, y: p.x });
export const angleOf = (p: Point): number => Math.atan2(p.y, p.x);
export const interpolate = (p: Point, q: Point, t: number): Point => ({
  x: p.x + (q.x - p.x) * t,
  y: p.y + (q.y - p.y) * t,
});

/** `p` turned by `angle` radians counter-clockwise about `centre`. */
export function rotate(p: Point, angle: number, centre: Point = ORIGIN): Point {
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  const x = p.x - centre.x;
  const y = p.y - centre.y;
  return { x: centre.x + x * cos - y * sin, y: centre.y + x * sin + y * cos };
}

/** Distance to the segment, its ends included. */
export function distanceToSegment(point: Point, from: Point, to: Point): number {
  const along = subtract(to, from);
  const squared = dot(along, along);
  if (squared === 0) return distance(point, from);
  const t = Math.min(1, Math.max(0, dot(subtract(point, from), along) / squared));
  return distance(point, interpolate(from, to, t));
}
