import { distance, flattenPath, type Path, type Point } from "../geometry";
import { type Motion, motionCarrying, moved, undone } from "./motion";
import type { Part } from "./part";
import { SegmentIndex } from "./segment-index";
import { anchorsOf, type Shape } from "./shape";

/** Where a changed part differs from what it was. Points in the later drawing's millimetres, on its first copy. */
export interface ShapeDifference {
  /** Points where outlines or features differ, of the later ones and of those that are gone. */
  readonly at: readonly Point[];
  /** The largest distance from a line of either to the nearest of the other, millimetres. */
  readonly deviation: number;
}

/** Chords and steps at which two parts are compared, millimetres, and what counts as no difference. */
const CHORD = 0.01;
const STEP = 2;
const EQUAL = 0.05;
/** Places shown at most, no two nearer than this, millimetres. */
const MOST_PLACES = 100;
const APART = 5;
/** Turns tried at most. */
const MOST_TURNS = 16;

interface Drawn {
  readonly part: Part;
  readonly shape: Shape;
}

/** Lays the earlier part on the later one, as it stood or by its farthest points, the way that leaves the least of it differing. */
export function shapeDifference(before: Drawn, after: Drawn): ShapeDifference {
  const [was, is] = [linesOf(before.part), linesOf(after.part)];
  let best: { misses: readonly Miss[]; total: number } | null = null;
  for (const motion of motionsBetween(before, after)) {
    const misses = missesOf(was, is, motion);
    const total = misses.reduce((sum, { gap }) => sum + gap, 0);
    if (best === null || total < best.total) best = { misses, total };
  }
  const misses = best?.misses ?? [];
  return {
    at: placesOf(misses),
    deviation: misses.reduce((most, { gap }) => Math.max(most, gap), 0),
  };
}

/** Where it stood; moved corner to corner either way; then middle on middle, turned by the farthest points. */
function motionsBetween(before: Drawn, after: Drawn): Motion[] {
  const [a, b] = [before.part.box, after.part.box];
  const still = (x: number, y: number): Motion => ({ turn: 0, move: { x, y } });
  const corners = [
    still(0, 0),
    still(b.minX - a.minX, b.minY - a.minY),
    still(b.maxX - a.maxX, b.maxY - a.maxY),
  ];
  const [ours] = anchorsOf(before.shape).angles;
  const turned = anchorsOf(after.shape)
    .angles.slice(0, MOST_TURNS)
    .map((theirs) => motionCarrying(before.shape.outer.centre, after.shape.outer.centre, theirs - ours));
  return [...corners, ...turned];
}

interface Lines {
  readonly chords: readonly SegmentIndex[];
  readonly probes: readonly Point[];
}

function linesOf({ outer, features }: Part): Lines {
  const paths = [outer, ...features.map(({ path }) => path)];
  const polygons = paths.map((path) => flattenPath(path, CHORD));
  return {
    chords: polygons.map((points, i) => new SegmentIndex(points, paths[i].closed)),
    probes: polygons.flatMap((points, i) => stepsAlong(points, paths[i])),
  };
}

/** Corners of a chain of chords, and points between those that are far apart. */
function stepsAlong(points: readonly Point[], { closed }: Path): Point[] {
  return points.flatMap((from, i) => {
    if (i + 1 === points.length && !closed) return [from];
    const to = points[(i + 1) % points.length];
    const steps = Math.max(1, Math.min(200, Math.ceil(distance(from, to) / STEP)));
    return Array.from({ length: steps }, (_, k) => ({
      x: from.x + ((to.x - from.x) * k) / steps,
      y: from.y + ((to.y - from.y) * k) / steps,
    }));
  });
}

interface Miss {
  readonly at: Point;
  readonly gap: number;
}

function missesOf(was: Lines, is: Lines, motion: Motion): Miss[] {
  const gone = was.probes.map((point) => ({
    at: moved(point, motion),
    gap: gapTo(is, moved(point, motion)),
  }));
  const come = is.probes.map((point) => ({ at: point, gap: gapTo(was, undone(point, motion)) }));
  return [...come, ...gone].filter(({ gap }) => gap > EQUAL);
}

/** To the nearest of all lines: looked for nearby first. */
function gapTo({ chords }: Lines, point: Point): number {
  for (const reach of [EQUAL, 10, Infinity]) {
    const gap = chords.reduce(
      (least, index) => Math.min(least, index.foot(point, reach)?.gap ?? Infinity),
      Infinity,
    );
    if (gap <= reach && gap < Infinity) return gap;
  }
  return Infinity;
}

/** The places that differ most, spread out. */
function placesOf(misses: readonly Miss[]): Point[] {
  const places: Point[] = [];
  for (const { at } of [...misses].sort((p, q) => q.gap - p.gap)) {
    if (places.length >= MOST_PLACES) break;
    if (places.every((place) => distance(place, at) >= APART)) places.push(at);
  }
  return places;
}
