import Flatbush from "flatbush";
import { type Point, polygonContains } from "../geometry";
import type { Outline } from "./outline";

/** Which outlines a point lies in, by their boxes first. */
export class OutlineIndex {
  private readonly index: Flatbush | null;

  constructor(private readonly outlines: readonly Outline[]) {
    this.index = outlines.length > 0 ? new Flatbush(outlines.length) : null;
    for (const { box } of outlines) this.index?.add(box.minX, box.minY, box.maxX, box.maxY);
    this.index?.finish();
  }

  /** The place of the smallest outline that holds the point, or null. */
  smallestRound(point: Point): number | null {
    let best: number | null = null;
    for (const i of this.index?.search(point.x, point.y, point.x, point.y) ?? []) {
      if (best !== null && this.outlines[i].area >= this.outlines[best].area) continue;
      if (polygonContains(this.outlines[i].polygon, point)) best = i;
    }
    return best;
  }
}
