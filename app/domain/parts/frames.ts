import { boxExtent, cross, distance, dot, type Point, subtract } from "../geometry";
import type { Nesting } from "./containment";
import { circleDiameter, type Outline } from "./outline";

/** Sheets as sold, millimetres: 4 × 8 ft, metric 4 × 8, 2500 × 1250, 5 × 5 ft birch, 5 × 10 ft, oversize MDF (common trade sizes). */
const SHEET_SIZES: readonly (readonly [number, number])[] = [
  [2438, 1219],
  [2440, 1220],
  [2500, 1250],
  [1525, 1525],
  [3050, 1525],
  [2464, 1245],
];
/** A drawn sheet may be this much off its size either way, as a share. */
const SHEET_SLACK = 0.02;
/** A word of a layer's name that says that the sheet or page is drawn there. */
const FRAME_LAYER =
  /(^|[^A-Z])(BORDERS?|SHEETS?|SHEET ?SIZE|SHEET ?BORDER|STOCK|PAGE|TITLE ?BLOCK|BOUNDING ?BOX)([^A-Z]|$)/;
/** Two circles about one centre of which the larger is at most this wide are a countersunk or counterbored hole, not a part with a hole. */
export const WIDEST_COUNTERBORE = 20;
/** Outlines this small that hold others are lettering or countersunk holes, no sign of a frame round parts. */
const SMALLEST_HELD = 20;
const CONCENTRIC = 0.05;

/** A layer named as border or sheet, what is inside drawn on others: parts in a layer named for its sheets are parts. */
const isOnFrameLayer = (outlines: readonly Outline[], place: number, held: readonly number[]): boolean =>
  FRAME_LAYER.test(outlines[place].layer.toUpperCase().replaceAll("_", " ")) &&
  held.some((child) => outlines[child].layer !== outlines[place].layer);

/** Sides of the rectangle that the outline is, or null; corners in the middle of a side do not matter. */
export function rectangleSides(
  outline: Outline,
  tolerance: number,
): { readonly long: number; readonly short: number } | null {
  const { curves } = outline.path;
  if (curves.length < 4 || curves.some(({ kind }) => kind !== "line")) return null;
  const corners = cornersOf(outline.polygon, tolerance);
  if (corners.length !== 4) return null;
  const sides = corners.map((corner, i) => subtract(corners[(i + 1) % 4], corner));
  const isSquare = sides.every((side, i) => {
    const next = sides[(i + 1) % 4];
    return Math.abs(dot(side, next)) <= 1e-3 * Math.hypot(side.x, side.y) * Math.hypot(next.x, next.y);
  });
  if (!isSquare) return null;
  const lengths = sides.map((side) => Math.hypot(side.x, side.y));
  return { long: Math.max(lengths[0], lengths[1]), short: Math.min(lengths[0], lengths[1]) };
}

/** Corners of a polygon, those in line within `tolerance` left out. */
export function cornersOf(polygon: readonly Point[], tolerance: number): Point[] {
  const distinct = polygon.filter(
    (point, i) => distance(point, polygon[(i + 1) % polygon.length]) > tolerance,
  );
  const corners: Point[] = [];
  for (let i = 0; i < distinct.length; i++) {
    const before = corners.at(-1) ?? distinct[distinct.length - 1];
    const after = distinct[(i + 1) % distinct.length];
    const side = subtract(after, before);
    const size = Math.hypot(side.x, side.y);
    const off = size === 0 ? 0 : Math.abs(cross(side, subtract(distinct[i], before))) / size;
    if (off > tolerance) corners.push(distinct[i]);
  }
  return corners;
}

const isSheet = ({ long, short }: { readonly long: number; readonly short: number }): boolean =>
  SHEET_SIZES.some(
    ([sheetLong, sheetShort]) =>
      Math.abs(long - sheetLong) <= SHEET_SLACK * sheetLong &&
      Math.abs(short - sheetShort) <= SHEET_SLACK * sheetShort,
  );

/**
 * Places of the outlines that are frames: rectangles that contain others and (a) have a known sheet size, or
 * (b) hold a frame and nothing else, or (c) hold at least two outlines, larger than lettering, that themselves hold some, or (d) lie on
 * a layer named as a border or sheet.
 */
export function findFrames(outlines: readonly Outline[], nesting: Nesting): Set<number> {
  const children = new Map<number, number[]>();
  for (let i = 0; i < outlines.length; i++) {
    const held = children.get(nesting.parent[i]);
    if (held) held.push(i);
    else children.set(nesting.parent[i], [i]);
  }
  const frames = new Set<number>();
  const innermostFirst = [...children.keys()]
    .filter((i) => i >= 0)
    .sort((i, j) => nesting.depth[j] - nesting.depth[i]);
  for (const place of innermostFirst) {
    const sides = rectangleSides(outlines[place], 0.01);
    if (!sides) continue;
    const held = children.get(place) ?? [];
    const holders = held.filter(
      (child) => children.has(child) && boxExtent(outlines[child].box) > SMALLEST_HELD,
    );
    const holdsOneFrame = held.length === 1 && frames.has(held[0]);
    if (isSheet(sides) || holdsOneFrame || holders.length >= 2 || isOnFrameLayer(outlines, place, held))
      frames.add(place);
  }
  return frames;
}

/** A small circle that holds one circle about the same centre and nothing else. */
export function isCounterbore(
  outlines: readonly Outline[],
  outer: number,
  inner: readonly number[],
): boolean {
  if (inner.length !== 1) return false;
  const outerDiameter = circleDiameter(outlines[outer].path, CONCENTRIC);
  const innerDiameter = circleDiameter(outlines[inner[0]].path, CONCENTRIC);
  if (outerDiameter === null || innerDiameter === null || outerDiameter > WIDEST_COUNTERBORE) return false;
  const a = outlines[outer].box;
  const b = outlines[inner[0]].box;
  const off = Math.hypot(a.minX + a.maxX - b.minX - b.maxX, a.minY + a.maxY - b.minY - b.maxY) / 2;
  return off <= CONCENTRIC;
}
