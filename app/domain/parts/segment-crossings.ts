import Flatbush from "flatbush";
import { cross, type Point, subtract } from "../geometry";

/** A place where two chords cross, with the outlines that they belong to by place in the list; the same one twice where an outline crosses itself. */
interface FoundCrossing {
  readonly one: number;
  readonly other: number;
  readonly at: Point;
}

interface Chord {
  readonly from: Point;
  readonly to: Point;
  readonly outline: number;
}

/** An outline that reaches less far across another only touches it: twice the chords' error and rounding, millimetres. */
const TOUCHING = 0.12;
/** The same within one outline, whose chords err alike. */
const TOUCHING_ITSELF = 0.01;

/**
 * Where closed outlines cross themselves or each other: one place for each pair, at most `most`. Outlines that
 * touch or run along each other do not cross. A crossing within `TOUCHING` of a chord's end is passed over; outlines
 * that cross do so at least twice.
 */
export function findCrossings(
  outlines: readonly { readonly polygon: readonly Point[] }[],
  most: number,
): FoundCrossing[] {
  const chords = outlines.flatMap(({ polygon }, outline): Chord[] =>
    polygon.map((from, i) => ({ from, to: polygon[(i + 1) % polygon.length], outline })),
  );
  if (chords.length === 0) return [];
  const index = new Flatbush(chords.length);
  for (const { from, to } of chords) index.add(...boxOf(from, to));
  index.finish();
  const found = new Map<string, FoundCrossing>();
  for (let i = 0; i < chords.length; i++) {
    const { from, to, outline } = chords[i];
    for (const j of index.search(...boxOf(from, to), (other) => other > i)) {
      const at = crossingOf(chords[i], chords[j]);
      if (!at) continue;
      const key = [outline, chords[j].outline].sort((p, q) => p - q).join(" ");
      if (!found.has(key)) found.set(key, { one: outline, other: chords[j].outline, at });
      if (found.size >= most) return [...found.values()];
    }
  }
  return [...found.values()];
}

const boxOf = (p: Point, q: Point): [number, number, number, number] => [
  Math.min(p.x, q.x),
  Math.min(p.y, q.y),
  Math.max(p.x, q.x),
  Math.max(p.y, q.y),
];

/** Where each chord passes to both sides of the other by more than touching, or null. */
function crossingOf(one: Chord, other: Chord): Point | null {
  const a = subtract(one.to, one.from);
  const b = subtract(other.to, other.from);
  const turn = cross(a, b);
  // Nearly parallel chords run along each other: an overlap, no crossing.
  if (Math.abs(turn) <= 1e-6 * Math.hypot(a.x, a.y) * Math.hypot(b.x, b.y)) return null;
  const touching = one.outline === other.outline ? TOUCHING_ITSELF : TOUCHING;
  const between = subtract(other.from, one.from);
  const s = cross(between, b) / turn;
  const t = cross(between, a) / turn;
  const slackOne = (touching * Math.hypot(b.x, b.y)) / Math.abs(turn);
  const slackOther = (touching * Math.hypot(a.x, a.y)) / Math.abs(turn);
  if (s <= slackOne || s >= 1 - slackOne || t <= slackOther || t >= 1 - slackOther) return null;
  return { x: one.from.x + s * a.x, y: one.from.y + s * a.y };
}
