import Flatbush from "flatbush";
import { boxContains, type Point, polygonContains } from "../geometry";
import type { Outline } from "./outline";

export interface Nesting {
  /** The smallest outline round each, by its place, or -1. */
  readonly parent: Int32Array;
  /** How many outlines are round each. */
  readonly depth: Int32Array;
}

/**
 * A point inside a polygon: the middle of the widest stretch of a level line. Null where nothing is enclosed.
 * Three levels are tried that pass no corner by chance.
 */
export function pointInPolygon(polygon: readonly Point[]): Point | null {
  let low = Infinity;
  let high = -Infinity;
  for (const { y } of polygon) {
    low = Math.min(low, y);
    high = Math.max(high, y);
  }
  let best: { point: Point; width: number } | null = null;
  for (const share of [0.4821, 0.2719, 0.7367]) {
    const y = low + (high - low) * share;
    const crossings: number[] = [];
    let last = polygon[polygon.length - 1];
    for (const next of polygon) {
      if (last.y > y !== next.y > y)
        crossings.push(last.x + ((y - last.y) / (next.y - last.y)) * (next.x - last.x));
      last = next;
    }
    crossings.sort((a, b) => a - b);
    for (let i = 1; i < crossings.length; i += 2) {
      const width = crossings[i] - crossings[i - 1];
      if (width > 0 && (!best || width > best.width))
        best = { point: { x: (crossings[i] + crossings[i - 1]) / 2, y }, width };
    }
    if (best && best.width > (high - low) * 1e-3) break;
  }
  return best?.point ?? null;
}

/**
 * Which outlines lie inside which. An outline is round another when its box is, it encloses more and it
 * holds a point from the other's inside; outlines that cross are so settled one way.
 */
export function nestOutlines(outlines: readonly Outline[]): Nesting {
  const count = outlines.length;
  const parent = new Int32Array(count).fill(-1);
  const depth = new Int32Array(count);
  if (count === 0) return { parent, depth };
  const index = new Flatbush(count);
  for (const { box } of outlines) index.add(box.minX, box.minY, box.maxX, box.maxY);
  index.finish();
  for (let i = 0; i < count; i++) {
    const inside = pointInPolygon(outlines[i].polygon);
    if (!inside) continue;
    for (const j of index.search(inside.x, inside.y, inside.x, inside.y)) {
      if (
        j === i ||
        !isRound(outlines[j], outlines[i], j, i) ||
        !polygonContains(outlines[j].polygon, inside)
      )
        continue;
      depth[i]++;
      if (parent[i] < 0 || encloses(outlines[parent[i]], outlines[j], parent[i], j)) parent[i] = j;
    }
  }
  return { parent, depth };
}

/** By area, equal areas by place: a total order, so that two equal outlines are never inside each other. */
const encloses = (outer: Outline, inner: Outline, outerPlace: number, innerPlace: number): boolean =>
  outer.area > inner.area || (outer.area === inner.area && outerPlace < innerPlace);

function isRound(outer: Outline, inner: Outline, outerPlace: number, innerPlace: number): boolean {
  return encloses(outer, inner, outerPlace, innerPlace) && boxContains(outer.box, inner.box);
}
