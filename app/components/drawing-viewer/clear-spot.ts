import {
  type Box,
  boxesOverlap,
  boxHeight,
  boxWidth,
  flattenPath,
  type Path,
  type Point,
  pathBox,
  polygonContains,
} from "~/domain/geometry";
import type { Spot } from "./view-geometry";

/** Chord tolerance in millimetres, fine enough to stand words by. */
const COARSE = 0.5;
/** Shares of the part's box at which a label is tried, from the upper left corner on. */
const TRIED = [0.004, 0.02, 0.04, 0.06, 0.1, 0.15, 0.22, 0.3, 0.4, 0.5, 0.62];
const NEAREST_FIRST = TRIED.flatMap((right) => TRIED.map((down) => ({ right, down }))).sort(
  (one, other) => Math.hypot(one.right, one.down) - Math.hypot(other.right, other.down),
);
/** The place a label is given, as shares of the part's box. */
const LABEL = { width: 0.16, height: 0.07 };

/**
 * Upper left corner of a place for words inside an outline, clear of the boxes of what is cut into it; as near to
 * the outline's upper left corner as can be. `otherwise` where there is no such place.
 */
export function clearSpot(outer: Path, taken: readonly Box[], otherwise: Point): Spot {
  const box = pathBox(outer);
  const polygon = flattenPath(outer, COARSE);
  const width = boxWidth(box);
  const height = boxHeight(box);
  for (const { right, down } of NEAREST_FIRST) {
    const minX = box.minX + right * width;
    const maxY = box.maxY - down * height;
    const place = { minX, maxY, maxX: minX + LABEL.width * width, minY: maxY - LABEL.height * height };
    const corners = [
      { x: place.minX, y: place.maxY },
      { x: place.maxX, y: place.maxY },
      { x: place.minX, y: place.minY },
      { x: place.maxX, y: place.minY },
    ];
    const inside = corners.every((corner) => polygonContains(polygon, corner));
    if (inside && !taken.some((other) => boxesOverlap(place, other))) return [minX, maxY];
  }
  return [otherwise.x, otherwise.y];
}
