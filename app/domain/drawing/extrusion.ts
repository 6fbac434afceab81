import type { Affine } from "../geometry";

/** A direction in space. */
export interface Vector {
  readonly x: number;
  readonly y: number;
  readonly z: number;
}

const crossProduct = (p: Vector, q: Vector): Vector => ({
  x: p.y * q.z - p.z * q.y,
  y: p.z * q.x - p.x * q.z,
  z: p.x * q.y - p.y * q.x,
});

function unit(v: Vector): Vector {
  const size = Math.hypot(v.x, v.y, v.z);
  return { x: v.x / size, y: v.y / size, z: v.z / size };
}

/**
 * World directions of an object's own x and y axes for its extrusion `normal`, by the arbitrary axis algorithm
 * (DXF Reference): within 1/64 of the world's z the x axis is Y × normal, else Z × normal.
 */
export function objectAxes(normal: Vector): { readonly x: Vector; readonly y: Vector } {
  const n = unit(normal);
  const nearVertical = Math.abs(n.x) < 1 / 64 && Math.abs(n.y) < 1 / 64;
  const x = unit(crossProduct(nearVertical ? { x: 0, y: 1, z: 0 } : { x: 0, y: 0, z: 1 }, n));
  return { x, y: unit(crossProduct(n, x)) };
}

/** A tilt below this leaves lengths as they are to 1e-12. */
const FLAT = 1e-6;

/** How flat things drawn with this extrusion lie in the world's plane; null where they stand at an angle to it. */
export function flatPlacement(normal: Vector): Affine | null {
  const size = Math.hypot(normal.x, normal.y, normal.z);
  if (!(size > 0)) return { a: 1, b: 0, c: 0, d: 1, e: 0, f: 0 };
  if (Math.hypot(normal.x, normal.y) > FLAT * size) return null;
  const side = normal.z < 0 ? -1 : 1;
  return { a: side, b: 0, c: 0, d: 1, e: 0, f: 0 };
}
