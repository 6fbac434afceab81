import type { Box, Point } from "./curve";

/** The union of no boxes: any union with it is the other box. */
export const EMPTY_BOX: Box = { minX: Infinity, minY: Infinity, maxX: -Infinity, maxY: -Infinity };

export const boxIsEmpty = (box: Box): boolean => !(box.minX <= box.maxX && box.minY <= box.maxY);
export const boxWidth = (box: Box): number => (boxIsEmpty(box) ? 0 : box.maxX - box.minX);
export const boxHeight = (box: Box): number => (boxIsEmpty(box) ? 0 : box.maxY - box.minY);
/** The larger side: the extent that relative tolerances refer to. */
export const boxExtent = (box: Box): number => Math.max(boxWidth(box), boxHeight(box));

export const boxUnion = (one: Box, other: Box): Box => ({
  minX: Math.min(one.minX, other.minX),
  minY: Math.min(one.minY, other.minY),
  maxX: Math.max(one.maxX, other.maxX),
  maxY: Math.max(one.maxY, other.maxY),
});

export function boxOfPoints(points: Iterable<Point>): Box {
  let { minX, minY, maxX, maxY } = EMPTY_BOX;
  for (const { x, y } of points) {
    if (x < minX) minX = x;
    if (x > maxX) maxX = x;
    if (y < minY) minY = y;
    if (y > maxY) maxY = y;
  }
  return { minX, minY, maxX, maxY };
}

/** Touching counts. */
export const boxesOverlap = (one: Box, other: Box): boolean =>
  one.minX <= other.maxX && other.minX <= one.maxX && one.minY <= other.maxY && other.minY <= one.maxY;

/** Whether `inner` lies within `outer`, edges included. */
export const boxContains = (outer: Box, inner: Box): boolean =>
  outer.minX <= inner.minX &&
  outer.minY <= inner.minY &&
  outer.maxX >= inner.maxX &&
  outer.maxY >= inner.maxY;

/** Zero inside. */
export function distancePointToBox(box: Box, point: Point): number {
  const x = Math.max(box.minX - point.x, 0, point.x - box.maxX);
  const y = Math.max(box.minY - point.y, 0, point.y - box.maxY);
  return Math.hypot(x, y);
}
