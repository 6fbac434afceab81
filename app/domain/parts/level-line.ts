import { boxOfPoints, type Point } from "../geometry";

/** Where between the two corner heights the level lies; the second is for outlines that cross themselves just at the first. */
const SHARES = [0.5, 0.3];
/** Stretches under this share of the polygon's height are the crossing itself. */
const NEXT_TO_NOTHING = 1e-6;

interface Stretch {
  /** The middle of it. */
  readonly at: Point;
  readonly width: number;
}

/**
 * The widest stretch inside a polygon (even-odd) on a level line between the two corner heights about its
 * middle, so that no corner is touched. Null where nothing is enclosed.
 */
export function widestStretch(polygon: readonly Point[]): Stretch | null {
  const { minY, maxY } = boxOfPoints(polygon);
  const middle = (minY + maxY) / 2;
  let below = minY;
  let above = maxY;
  for (const { y } of polygon) {
    if (y <= middle && y > below) below = y;
    if (y > middle && y < above) above = y;
  }
  let best: Stretch | null = null;
  for (const share of SHARES) {
    const found = stretchAcross([polygon], below + (above - below) * share);
    if (found && found.width > (best?.width ?? 0)) best = found;
    if (best && best.width > NEXT_TO_NOTHING * (maxY - minY)) break;
  }
  return best;
}

/** The widest stretch inside an odd number of polygons on the line at a level, or null. */
export function stretchAcross(polygons: readonly (readonly Point[])[], level: number): Stretch | null {
  const crossings: number[] = [];
  for (const polygon of polygons) {
    let last = polygon[polygon.length - 1];
    for (const next of polygon) {
      if (last.y > level !== next.y > level) {
        crossings.push(last.x + ((level - last.y) / (next.y - last.y)) * (next.x - last.x));
      }
      last = next;
    }
  }
  crossings.sort((one, other) => one - other);
  let best: Stretch | null = null;
  for (let i = 1; i < crossings.length; i += 2) {
    const width = crossings[i] - crossings[i - 1];
    if (width > (best?.width ?? 0))
      best = { at: { x: (crossings[i] + crossings[i - 1]) / 2, y: level }, width };
  }
  return best;
}

/** A point inside a polygon, or null where nothing is enclosed. */
export const pointInPolygon = (polygon: readonly Point[]): Point | null => widestStretch(polygon)?.at ?? null;
