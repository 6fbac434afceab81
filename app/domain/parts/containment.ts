import Flatbush from "flatbush";
import { polygonContains } from "../geometry";
import { pointInPolygon } from "./level-line";
import type { Outline } from "./outline";

export interface Nesting {
  /** The smallest outline round each, by its place, or -1. */
  readonly parent: Int32Array;
  /** How many outlines are round each. */
  readonly depth: Int32Array;
}

/**
 * Which outlines lie inside which: an outline is round another when it encloses more and holds a point from the
 * other's inside. Outlines that cross are so settled one way.
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
        !encloses(outlines[j], outlines[i], j, i) ||
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
