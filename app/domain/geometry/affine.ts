import type { Point } from "./curve";

/** x' = a·x + c·y + e, y' = b·x + d·y + f. */
export interface Affine {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly d: number;
  readonly e: number;
  readonly f: number;
}

export const IDENTITY: Affine = { a: 1, b: 0, c: 0, d: 1, e: 0, f: 0 };

export const affineMove = (by: Point): Affine => ({ ...IDENTITY, e: by.x, f: by.y });
export const affineScale = (x: number, y: number = x): Affine => ({ ...IDENTITY, a: x, d: y });

/** Radians counter-clockwise about the origin. */
export function affineRotation(angle: number): Affine {
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  return { a: cos, b: sin, c: -sin, d: cos, e: 0, f: 0 };
}

/** First `inner`, then `outer`. */
export const affineCompose = (outer: Affine, inner: Affine): Affine => ({
  a: outer.a * inner.a + outer.c * inner.b,
  b: outer.b * inner.a + outer.d * inner.b,
  c: outer.a * inner.c + outer.c * inner.d,
  d: outer.b * inner.c + outer.d * inner.d,
  e: outer.a * inner.e + outer.c * inner.f + outer.e,
  f: outer.b * inner.e + outer.d * inner.f + outer.f,
});

export const affineApply = (affine: Affine, p: Point): Point => ({
  x: affine.a * p.x + affine.c * p.y + affine.e,
  y: affine.b * p.x + affine.d * p.y + affine.f,
});

/** As `affineApply` without the move: for directions and half-diameters. */
export const affineTurn = (affine: Affine, p: Point): Point => ({
  x: affine.a * p.x + affine.c * p.y,
  y: affine.b * p.x + affine.d * p.y,
});

/** Negative for a mirror image. */
export const affineDeterminant = (affine: Affine): number => affine.a * affine.d - affine.b * affine.c;
