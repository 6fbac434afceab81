import { boxOfPoints, type Point } from "../geometry";

/**
 * The widest stretch inside a polygon (even-odd) on the level line half way between the two corner heights about
 * its middle, so that no corner is touched; `at` is its middle. Null where nothing is enclosed.
 */
export function widestStretch(
  polygon: readonly Point[],
): { readonly at: Point; readonly width: number } | null {
  const { minY, maxY } = boxOfPoints(polygon);
  const middle = (minY + maxY) / 2;
  let below = minY;
  let above = maxY;
  for (const { y } of polygon) {
    if (y <= middle && y > below) below = y;
    if (y > middle && y < above) above = y;
  }
  const level = (below + above) / 2;
  const crossings: number[] = [];
  let last = polygon[polygon.length - 1];
  for (const next of polygon) {
    if (last.y > level !== next.y > level) {
      crossings.push(last.x + ((level - last.y) / (next.y - last.y)) * (next.x - last.x));
    }
    last = next;
  }
  crossings.sort((one, other) => one - other);
  let best: { readonly x: number; readonly width: number } | null = null;
  for (let i = 1; i < crossings.length; i += 2) {
    const width = crossings[i] - crossings[i - 1];
    if (width > (best?.width ?? 0)) best = { x: (crossings[i] + crossings[i - 1]) / 2, width };
  }
  return best && { at: { x: best.x, y: level }, width: best.width };
}

/** A point inside a polygon, or null where nothing is enclosed. */
export const pointInPolygon = (polygon: readonly Point[]): Point | null => widestStretch(polygon)?.at ?? null;
