import type { Point } from "./curve";
import { cross, dot, subtract } from "./point";

/** Signed, counter-clockwise positive; the polygon closes itself. */
export function polygonArea(polygon: readonly Point[]): number {
  if (polygon.length < 3) return 0;
  const origin = polygon[0];
  let twice = 0;
  for (let i = 1; i + 1 < polygon.length; i++) {
    twice += cross(subtract(polygon[i], origin), subtract(polygon[i + 1], origin));
  }
  return twice / 2;
}

/** Centre of area; the mean of the points where the area is nothing. */
export function polygonCentroid(polygon: readonly Point[]): Point {
  const origin = polygon[0];
  let twice = 0;
  let x = 0;
  let y = 0;
  for (let i = 1; i + 1 < polygon.length; i++) {
    const p = subtract(polygon[i], origin);
    const q = subtract(polygon[i + 1], origin);
    const weight = cross(p, q);
    twice += weight;
    x += weight * (p.x + q.x);
    y += weight * (p.y + q.y);
  }
  if (twice !== 0) return { x: origin.x + x / (3 * twice), y: origin.y + y / (3 * twice) };
  const count = polygon.length;
  return {
    x: polygon.reduce((sum, p) => sum + p.x, 0) / count,
    y: polygon.reduce((sum, p) => sum + p.y, 0) / count,
  };
}

/** Even-odd. Points on the edge may fall either way. */
export function polygonContains(polygon: readonly Point[], point: Point): boolean {
  let inside = false;
  let last = polygon[polygon.length - 1];
  for (const next of polygon) {
    if (last.y > point.y !== next.y > point.y) {
      const x = last.x + ((point.y - last.y) / (next.y - last.y)) * (next.x - last.x);
      if (x > point.x) inside = !inside;
    }
    last = next;
  }
  return inside;
}

/** Corners of the hull, counter-clockwise, no three in line (Andrew's monotone chain). */
export function convexHull(points: readonly Point[]): Point[] {
  const sorted = [...points].sort((p, q) => p.x - q.x || p.y - q.y);
  if (sorted.length < 3) return sorted;
  const half = (ordered: readonly Point[]) => {
    const chain: Point[] = [];
    for (const point of ordered) {
      while (chain.length >= 2) {
        const [p, q] = chain.slice(-2);
        if (cross(subtract(q, p), subtract(point, p)) > 0) break;
        chain.pop();
      }
      chain.push(point);
    }
    chain.pop();
    return chain;
  };
  const hull = [...half(sorted), ...half([...sorted].reverse())];
  return hull.length > 0 ? hull : [sorted[0]];
}

/** `angle` is that of the long side, radians in [0, π). */
export interface Rectangle {
  readonly long: number;
  readonly short: number;
  readonly angle: number;
  readonly centre: Point;
}

/** Minimum-area rectangle round the points, one side on an edge of their hull (rotating calipers). */
export function smallestRectangle(points: readonly Point[]): Rectangle {
  const hull = convexHull(points);
  if (hull.length === 0) return { long: 0, short: 0, angle: 0, centre: { x: 0, y: 0 } };
  if (hull.length < 3) return rectangleOfSegment(hull[0], hull[hull.length - 1]);
  const count = hull.length;
  const along = (index: number, direction: Point) => dot(hull[index % count], direction);
  let best: Rectangle | null = null;
  let right = 1;
  let top = 1;
  let left = 1;
  for (let i = 0; i < count; i++) {
    const edge = subtract(hull[(i + 1) % count], hull[i]);
    const size = Math.hypot(edge.x, edge.y);
    const u = { x: edge.x / size, y: edge.y / size };
    const v = { x: -u.y, y: u.x };
    right = climb(hull, Math.max(right, i + 1), u);
    top = climb(hull, Math.max(top, right), v);
    left = climb(hull, Math.max(left, top), { x: -u.x, y: -u.y });
    const [minU, maxU, minV, maxV] = [along(left, u), along(right, u), along(i, v), along(top, v)];
    const rectangle = rectangleOn(u, v, minU, maxU, minV, maxV);
    if (!best || rectangle.long * rectangle.short < best.long * best.short) best = rectangle;
  }
  return best ?? rectangleOfSegment(hull[0], hull[1]);
}

/** From `index` on along the hull to its farthest corner in a direction; level stretches are passed. */
function climb(hull: readonly Point[], index: number, direction: Point): number {
  const count = hull.length;
  let at = index;
  for (let step = 0; step < count; step++) {
    if (dot(hull[(at + 1) % count], direction) < dot(hull[at % count], direction)) break;
    at++;
  }
  return at;
}

function rectangleOn(u: Point, v: Point, minU: number, maxU: number, minV: number, maxV: number): Rectangle {
  const width = maxU - minU;
  const height = maxV - minV;
  const side = width >= height ? u : v;
  const middleU = (minU + maxU) / 2;
  const middleV = (minV + maxV) / 2;
  return {
    long: Math.max(width, height),
    short: Math.min(width, height),
    angle: lineAngle(side),
    centre: { x: u.x * middleU + v.x * middleV, y: u.y * middleU + v.y * middleV },
  };
}

const rectangleOfSegment = (p: Point, q: Point): Rectangle => ({
  long: Math.hypot(q.x - p.x, q.y - p.y),
  short: 0,
  angle: lineAngle(subtract(q, p)),
  centre: { x: (p.x + q.x) / 2, y: (p.y + q.y) / 2 },
});

/** Direction of an undirected line, in [0, π). */
function lineAngle(direction: Point): number {
  const angle = Math.atan2(direction.y, direction.x);
  if (angle < 0) return angle + Math.PI;
  return angle >= Math.PI ? 0 : angle;
}
