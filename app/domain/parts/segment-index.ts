import Flatbush from "flatbush";
import { distance, interpolate, type Point } from "../geometry";

/** Fewer segments than this are faster looked through than indexed. */
const INDEXED_FROM = 24;

/** The nearest place on a chain of chords. */
export interface Foot {
  readonly gap: number;
  readonly at: Point;
  /** Unit vector along the chord. */
  readonly along: Point;
}

/** Chords of a path, asked for their distance to points. */
export class SegmentIndex {
  private readonly index: Flatbush | null;
  private readonly count: number;

  constructor(
    readonly points: readonly Point[],
    closed: boolean,
  ) {
    this.count = closed ? points.length : points.length - 1;
    this.index = this.count >= INDEXED_FROM ? new Flatbush(this.count) : null;
    if (!this.index) return;
    for (let i = 0; i < this.count; i++) {
      const p = points[i];
      const q = points[(i + 1) % points.length];
      this.index.add(Math.min(p.x, q.x), Math.min(p.y, q.y), Math.max(p.x, q.x), Math.max(p.y, q.y));
    }
    this.index.finish();
  }

  /** The nearest place at most `reach` away, or null. */
  foot(point: Point, reach: number): Foot | null {
    let best: Foot | null = null;
    const { x, y } = point;
    const candidates = this.index?.search(x - reach, y - reach, x + reach, y + reach);
    const count = candidates ? candidates.length : this.count;
    for (let k = 0; k < count; k++) {
      const i = candidates ? candidates[k] : k;
      const foot = footOnSegment(point, this.points[i], this.points[(i + 1) % this.points.length]);
      if (foot.gap <= (best ? best.gap : reach)) best = foot;
    }
    return best;
  }

  isWithin(point: Point, reach: number): boolean {
    return this.foot(point, reach) !== null;
  }
}

function footOnSegment(point: Point, from: Point, to: Point): Foot {
  const dx = to.x - from.x;
  const dy = to.y - from.y;
  const size = Math.hypot(dx, dy);
  if (size === 0) return { gap: distance(point, from), at: from, along: { x: 1, y: 0 } };
  const share = ((point.x - from.x) * dx + (point.y - from.y) * dy) / (size * size);
  const at = interpolate(from, to, Math.min(1, Math.max(0, share)));
  return { gap: distance(point, at), at, along: { x: dx / size, y: dy / size } };
}
