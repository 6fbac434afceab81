import { distance, type Point } from "../geometry";
import { type Motion, motionCarrying, moved, undone } from "./motion";
import type { Piece } from "./pieces";
import { refineMotion } from "./refine-motion";
import type { SegmentIndex } from "./segment-index";
import { anchorsOf, mirrorShape, type Ring, type RingOfFeature, type Shape, shapeOf } from "./shape";

/** A first try farther off than this many millimetres is no beginning for a better one. */
const WORTH_REFINING = 1;
/** A fit better than this many millimetres is not refined. */
const FIT_ENOUGH = 1e-4;

/** Pieces of one kind: the first as drawn, then where each copy stands. */
export interface Kind {
  readonly first: Piece;
  readonly copies: { readonly piece: Piece; readonly motion: Motion }[];
  /** The kind it is the mirror image of, by its place in the list, or null. */
  readonly mirrorOf: number | null;
}

/**
 * Groups pieces that are congruent by turning and moving, within `tolerance` everywhere on outline and
 * features. A mirror image is a kind of its own that names its twin; one that is its own mirror image is one kind.
 */
export function groupCongruent(pieces: readonly Piece[], tolerance: number): Kind[] {
  const kinds: (Kind & { readonly shape: Shape })[] = [];
  const bySignature = new Map<string, number[]>();
  for (const piece of pieces) {
    const shape = shapeOf(piece);
    const alike = (bySignature.get(shape.signature) ?? []).filter((k) =>
      mayEqual(kinds[k].shape, shape, tolerance),
    );
    const place = firstMatch(alike, (k) => congruentBy(kinds[k].shape, shape, tolerance));
    if (place) {
      kinds[place.kind].copies.push({ piece, motion: place.found });
      continue;
    }
    const image = alike.length > 0 ? mirrorShape(shape) : shape;
    const twin = firstMatch(
      alike.filter((k) => kinds[k].mirrorOf === null),
      (k) => congruentBy(kinds[k].shape, image, tolerance),
    );
    const still: Motion = { turn: 0, move: { x: 0, y: 0 } };
    kinds.push({ first: piece, copies: [{ piece, motion: still }], mirrorOf: twin?.kind ?? null, shape });
    const held = bySignature.get(shape.signature);
    if (held) held.push(kinds.length - 1);
    else bySignature.set(shape.signature, [kinds.length - 1]);
  }
  return kinds.map(({ first, copies, mirrorOf }) => ({ first, copies, mirrorOf }));
}

function firstMatch<T>(
  places: readonly number[],
  find: (place: number) => T | null,
): { kind: number; found: T } | null {
  for (const kind of places) {
    const found = find(kind);
    if (found !== null) return { kind, found };
  }
  return null;
}

/** Whether measures that turning does not change leave it possible that two shapes are equal. */
export function mayEqual(one: Shape, other: Shape, tolerance: number): boolean {
  const corners = Math.max(one.outer.chords.points.length, other.outer.chords.points.length);
  const lengthSlack = Math.min(0.02 * one.length, 2 * tolerance * Math.min(corners, 40)) + tolerance * 7;
  return (
    (one.outer.radius === null) === (other.outer.radius === null) &&
    Math.abs(one.area - other.area) <= tolerance * (one.length + 1) &&
    Math.abs(one.length - other.length) <= lengthSlack &&
    Math.abs(one.reach - other.reach) <= 2 * tolerance
  );
}

/** The motion that carries `one` onto `other`, or null where none does within the tolerance. */
export function congruentBy(one: Shape, other: Shape, tolerance: number): Motion | null {
  const [ours] = anchorsOf(one).angles;
  const tried: number[] = [];
  for (const theirs of anchorsOf(other).angles) {
    const turn = theirs - ours;
    if (tried.some((angle) => Math.abs(Math.sin((angle - turn) / 2)) < 1e-7)) continue;
    tried.push(turn);
    const motion = layOn(one, other, motionCarrying(one.outer.centre, other.outer.centre, turn), tolerance);
    if (motion) return motion;
  }
  return null;
}

function layOn(one: Shape, other: Shape, start: Motion, tolerance: number): Motion | null {
  if (one.outer.radius !== null && other.outer.radius !== null) {
    if (Math.abs(one.outer.radius - other.outer.radius) > tolerance) return null;
    return featuresMatch(one, other, start, tolerance) ? start : null;
  }
  const ours = one.outer.chords;
  const theirs = other.outer.chords;
  const rough = worstGap(one.outer.probes, theirs, start, WORTH_REFINING, 16);
  if (rough === null) return null;
  const gap = worstGap(one.outer.probes, theirs, start, WORTH_REFINING, Infinity);
  if (gap === null) return null;
  const motion = gap > FIT_ENOUGH ? refineMotion(one.outer.probes, theirs, start, WORTH_REFINING) : start;
  const isNear =
    worstGap(one.outer.probes, theirs, motion, tolerance, Infinity) !== null &&
    other.outer.probes.every((point) => ours.isWithin(undone(point, motion), tolerance));
  return isNear && featuresMatch(one, other, motion, tolerance) ? motion : null;
}

/** The largest distance from `count` of the moved points to the chords, or null where one is over `reach`. */
function worstGap(
  points: readonly Point[],
  chords: SegmentIndex,
  motion: Motion,
  reach: number,
  count: number,
): number | null {
  let worst = 0;
  const stride = Math.max(1, Math.floor(points.length / count));
  for (let i = 0; i < points.length; i += stride) {
    const foot = chords.foot(moved(points[i], motion), reach);
    if (!foot) return null;
    worst = Math.max(worst, foot.gap);
  }
  return worst;
}

/** Whether each feature of `one`, moved, is just one feature of `other`. */
function featuresMatch(one: Shape, other: Shape, motion: Motion, tolerance: number): boolean {
  if (one.features.length !== other.features.length) return false;
  const byCell = new Map<string, RingOfFeature[]>();
  const cell = Math.max(1, tolerance * 4);
  for (const feature of other.features) {
    const key = `${Math.floor(feature.centre.x / cell)} ${Math.floor(feature.centre.y / cell)}`;
    const held = byCell.get(key);
    if (held) held.push(feature);
    else byCell.set(key, [feature]);
  }
  const taken = new Set<RingOfFeature>();
  return one.features.every((feature) => {
    const centre = moved(feature.centre, motion);
    const cx = Math.floor(centre.x / cell);
    const cy = Math.floor(centre.y / cell);
    for (let dx = -1; dx <= 1; dx++) {
      for (let dy = -1; dy <= 1; dy++) {
        for (const candidate of byCell.get(`${cx + dx} ${cy + dy}`) ?? []) {
          if (taken.has(candidate) || candidate.key !== feature.key) continue;
          if (!ringsMatch(feature, candidate, centre, motion, tolerance)) continue;
          taken.add(candidate);
          return true;
        }
      }
    }
    return false;
  });
}

function ringsMatch(one: Ring, other: Ring, centre: Point, motion: Motion, tolerance: number): boolean {
  if (one.radius !== null && other.radius !== null) {
    return distance(centre, other.centre) + Math.abs(one.radius - other.radius) <= tolerance;
  }
  if (one.radius !== null || other.radius !== null) return false;
  if (distance(centre, other.centre) > 4 * tolerance) return false;
  return (
    one.probes.every((point) => other.chords.isWithin(moved(point, motion), tolerance)) &&
    other.probes.every((point) => one.chords.isWithin(undone(point, motion), tolerance))
  );
}
