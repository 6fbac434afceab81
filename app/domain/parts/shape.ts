import {
  distance,
  flattenPath,
  interpolate,
  type Path,
  type Point,
  polygonArea,
  polygonCentroid,
} from "../geometry";
import { ROUND_SLACK } from "./operations";
import { circleDiameter } from "./outline";
import type { Feature } from "./part";
import type { Piece } from "./pieces";
import { SegmentIndex } from "./segment-index";

/** Chords of outlines that are compared, millimetres: well under the tolerance of equality. */
const CHORD = 0.002;
/** Points of an outline this near the farthest one from its centre count as one with it, millimetres. */
const CREST = 0.02;
/** Peaks this much lower than the farthest are still tried, since equal parts may differ by the tolerance. */
const LOWER_PEAK = 0.15;
/** Chords longer than this, millimetres, are probed in the middle as well. */
const LONG_CHORD = 0.2;
/** Outlines that enclose less, since they cross themselves, have no centre of area to speak of. Square millimetres. */
const LEAST_AREA = 1e-3;
const MOST_ANCHORS = 360;

/** One outline or line, ready to be compared. */
export interface Ring {
  readonly centre: Point;
  /** Set where it is one full circle: it has no chords then. */
  readonly radius: number | null;
  readonly chords: SegmentIndex;
  /** Points on the chords to be found on the other's: their ends, and the middles of longer ones. */
  readonly probes: readonly Point[];
}

export interface RingOfFeature extends Ring {
  /** Equal for features that may be one another: kind, depth, closed or open. */
  readonly key: string;
}

/** A piece's geometry in one frame, with what does not change when it is turned and moved. */
export interface Shape {
  readonly outer: Ring;
  readonly features: readonly RingOfFeature[];
  readonly area: number;
  readonly length: number;
  /** Distance from the centre of area to the farthest point of the outline. */
  readonly reach: number;
  /** Counts of features by key. */
  readonly signature: string;
}

/** What a shape is made of: a piece as drawn, or a part again. */
export interface Shaped {
  readonly outer: Pick<Piece["outer"], "path" | "area" | "length">;
  readonly features: readonly Feature[];
}

export function shapeOf(piece: Shaped): Shape {
  const outer = ringOf(piece.outer.path, true);
  const features = piece.features.map((feature) => ({ ...ringOf(feature.path, false), key: keyOf(feature) }));
  const reach =
    outer.radius ?? outer.chords.points.reduce((most, p) => Math.max(most, distance(p, outer.centre)), 0);
  return {
    outer,
    features,
    area: piece.outer.area,
    length: piece.outer.length,
    reach,
    signature: features
      .map(({ key }) => key)
      .sort()
      .join("|"),
  };
}

function keyOf({ kind, depth, path }: Feature): string {
  const size =
    depth === null
      ? "through"
      : "leave" in depth
        ? `leave ${depth.leave.toFixed(2)}`
        : depth.depth.toFixed(2);
  return `${kind} ${size} ${path.closed ? "closed" : "open"}`;
}

function ringOf(path: Path, byArea: boolean): Ring {
  const diameter = path.closed ? circleDiameter(path, ROUND_SLACK) : null;
  const [first] = path.curves;
  if (diameter !== null && first.kind === "arc") {
    return { centre: first.centre, radius: diameter / 2, chords: new SegmentIndex([], true), probes: [] };
  }
  const points = flattenPath(path, CHORD);
  const isFilled = byArea && Math.abs(polygonArea(points)) > LEAST_AREA;
  const centre = isFilled ? polygonCentroid(points) : centreOfChords(points, path.closed);
  return {
    centre,
    radius: null,
    chords: new SegmentIndex(points, path.closed),
    probes: probesOf(points, path.closed),
  };
}

function probesOf(points: readonly Point[], closed: boolean): Point[] {
  const probes: Point[] = [];
  for (let i = 0; i < points.length; i++) {
    probes.push(points[i]);
    if (i + 1 === points.length && !closed) break;
    const next = points[(i + 1) % points.length];
    if (distance(points[i], next) > LONG_CHORD) probes.push(interpolate(points[i], next, 0.5));
  }
  return probes;
}

/** Mean of the chords by their length: the same wherever the path begins. */
function centreOfChords(points: readonly Point[], closed: boolean): Point {
  let x = 0;
  let y = 0;
  let total = 0;
  for (let i = closed ? 0 : 1; i < points.length; i++) {
    const p = points[i];
    const q = points[(i + points.length - 1) % points.length];
    const length = distance(p, q);
    x += (length * (p.x + q.x)) / 2;
    y += (length * (p.y + q.y)) / 2;
    total += length;
  }
  return total > 0 ? { x: x / total, y: y / total } : points[0];
}

/** The mirror image, by x turned about. */
export function mirrorShape(shape: Shape): Shape {
  const turned = ({ x, y }: Point): Point => ({ x: -x, y });
  const ring = <R extends Ring>(one: R, closed: boolean): R => ({
    ...one,
    centre: turned(one.centre),
    probes: one.probes.map(turned),
    chords: new SegmentIndex(one.chords.points.map(turned), closed),
  });
  return {
    ...shape,
    outer: ring(shape.outer, true),
    features: shape.features.map((feature) => ring(feature, !feature.key.endsWith("open"))),
  };
}

/** Directions from the centre of the outline by which two shapes can be laid on each other. */
export interface Anchors {
  /** The best one first; the others equal it nearly. */
  readonly angles: readonly number[];
}

/**
 * Anchors by the outline's farthest points; for a round outline by its farthest features from the centre; for
 * features about the centre by their own farthest points. One anchor of no meaning where nothing turns.
 */
export function anchorsOf({ outer, features }: Shape): Anchors {
  if (outer.radius === null) {
    const angles = peaksOf(outer.probes, outer.centre);
    if (angles) return { angles };
  }
  const offCentre = features
    .map((feature) => ({ ...feature, away: distance(feature.centre, outer.centre) }))
    .filter(({ away }) => away > LOWER_PEAK)
    .sort((p, q) => q.away - p.away);
  if (offCentre.length > 0) {
    const near = offCentre
      .filter(({ away }) => away >= offCentre[0].away - LOWER_PEAK)
      .slice(0, MOST_ANCHORS);
    return { angles: near.map(({ centre }) => angleFrom(outer.centre, centre)) };
  }
  for (const { radius, probes } of features) {
    const angles = radius === null ? peaksOf(probes, outer.centre) : null;
    if (angles) return { angles };
  }
  return { angles: [0] };
}

const angleFrom = (centre: Point, point: Point): number => Math.atan2(point.y - centre.y, point.x - centre.x);

/** Directions of the farthest points, the middle of each crest of equal ones; null where all are equally far. */
function peaksOf(points: readonly Point[], centre: Point): number[] | null {
  const away = points.map((point) => distance(point, centre));
  const most = away.reduce((best, next) => Math.max(best, next), 0);
  const crests: number[] = [];
  const lower: number[] = [];
  const count = points.length;
  const start = away.findIndex((value) => value < most - CREST);
  if (start < 0) return null;
  for (let step = 0; step < count; step++) {
    const i = (start + step) % count;
    if (away[i] >= most - CREST) {
      let last = step;
      while (away[(start + last + 1) % count] >= most - CREST) last++;
      crests.push(middleDirection(points, away, centre, start + step, start + last));
      step = last;
    } else if (
      away[i] >= most - LOWER_PEAK &&
      away[i] >= away[(i + count - 1) % count] &&
      away[i] >= away[(i + 1) % count]
    ) {
      lower.push(angleFrom(centre, points[i]));
    }
  }
  return [...crests, ...lower].slice(0, MOST_ANCHORS);
}

/** The direction half way along the crest between two places of the ring; a crest of one corner is that corner. */
function middleDirection(
  points: readonly Point[],
  away: readonly number[],
  centre: Point,
  from: number,
  to: number,
): number {
  const count = points.length;
  const isShort = distance(points[from % count], points[to % count]) < CREST * 10;
  if (isShort) {
    let highest = from;
    for (let i = from; i <= to; i++) if (away[i % count] > away[highest % count]) highest = i;
    return angleFrom(centre, points[highest % count]);
  }
  const first = angleFrom(centre, points[from % count]);
  let swept = 0;
  for (let i = from; i < to; i++) {
    const step = angleFrom(centre, points[(i + 1) % count]) - angleFrom(centre, points[i % count]);
    swept += Math.atan2(Math.sin(step), Math.cos(step));
  }
  return first + swept / 2;
}
