import type { Kind } from "./congruence";
import { congruentBy, mayEqual } from "./congruence";
import { type Shape, shapeOf } from "./shape";

/** Kinds by place that differ by no more than a slip of the hand. */
export interface NearKinds {
  readonly one: number;
  readonly other: number;
  /** Within which they are equal, millimetres. */
  readonly difference: number;
}

/** Kinds whose outline reaches less far from its centre are too small for such a difference to be a slip, millimetres. */
const SMALLEST_REACH = 10;
/** Pairs that are laid on each other at most; the first drawn come first. */
const MOST_TRIED = 200;
/** Halvings by which the difference is found. */
const HALVINGS = 5;

/** Pairs of kinds that are not equal within `equal` but within `near`, both millimetres. Mirrored twins are no such pair. */
export function findNearKinds(kinds: readonly Kind[], equal: number, near: number): NearKinds[] {
  const found: NearKinds[] = [];
  let tried = 0;
  const bySignature = new Map<string, { place: number; shape: Shape }[]>();
  for (let place = 0; place < kinds.length; place++) {
    const shape = shapeOf(kinds[place].first);
    if (shape.reach < SMALLEST_REACH) continue;
    const alike = bySignature.get(shape.signature) ?? [];
    for (const earlier of alike) {
      if (tried >= MOST_TRIED) return found;
      if (!mayEqual(earlier.shape, shape, near)) continue;
      tried += 1;
      if (congruentBy(earlier.shape, shape, near) === null) continue;
      found.push({
        one: earlier.place,
        other: place,
        difference: differenceOf(earlier.shape, shape, equal, near),
      });
    }
    bySignature.set(shape.signature, [...alike, { place, shape }]);
  }
  return found;
}

/** The least tolerance within which two shapes are equal, between one that is too small and one that is enough. */
export function differenceOf(one: Shape, other: Shape, tooSmall: number, enough: number): number {
  let [low, high] = [tooSmall, enough];
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2;
    if (congruentBy(one, other, middle) === null) low = middle;
    else high = middle;
  }
  return high;
}
