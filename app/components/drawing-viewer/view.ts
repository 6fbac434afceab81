import type { Spot, ViewBox } from "./view-geometry";

/** Where the drawing stands in its window: pixels in a millimetre, and the drawing's origin in pixels. */
export interface View {
  readonly scale: number;
  readonly x: number;
  readonly y: number;
}

export interface Size {
  readonly width: number;
  readonly height: number;
}

/** Room left above and below a fitted drawing, in pixels: more below, for the dimension line and the scale. */
const MARGIN = { above: 28, below: 76 };
/** Room at its sides: for a dimension line on a desk, less on a phone. */
const sideMargin = (width: number): number => (width >= 640 ? 56 : 16);
/** From a twentieth of a pixel in a millimetre (a 20 m drawing on a phone) to 200 (a twentieth of a millimetre). */
/** Millimetres across the window when a place is looked at. */
const NEAR = 500;
const SCALES = { least: 0.01, most: 200 };

/** The whole of a box, centred, as large as it goes. */
export function fittedView(box: ViewBox | null, size: Size): View {
  if (!box) return { scale: 1, x: size.width / 2, y: size.height / 2 };
  const wide = Math.max(box.maxX - box.minX, 1);
  const high = Math.max(box.maxY - box.minY, 1);
  const roomX = Math.max(size.width - 2 * sideMargin(size.width), 40);
  const roomY = Math.max(size.height - MARGIN.above - MARGIN.below, 40);
  const scale = bounded(Math.min(roomX / wide, roomY / high));
  const middleY = MARGIN.above + roomY / 2;
  return {
    scale,
    x: size.width / 2 - (scale * (box.minX + box.maxX)) / 2,
    y: middleY + (scale * (box.minY + box.maxY)) / 2,
  };
}

const bounded = (scale: number): number => Math.min(SCALES.most, Math.max(SCALES.least, scale));

/** Nearer or farther by a factor, the drawing's point under (x, y) staying where it is. */
export function zoomedView(view: View, factor: number, x: number, y: number): View {
  const scale = bounded(view.scale * factor);
  const ratio = scale / view.scale;
  return { scale, x: x - (x - view.x) * ratio, y: y - (y - view.y) * ratio };
}

export const movedView = (view: View, dx: number, dy: number): View => ({
  ...view,
  x: view.x + dx,
  y: view.y + dy,
});

/** The same scale with a box in the middle, when less than all of it can be seen; else the view unchanged. */
export function viewShowing(view: View, box: ViewBox, size: Size): View {
  const [left, top] = toScreen(view, [box.minX, box.maxY]);
  const [right, bottom] = toScreen(view, [box.maxX, box.minY]);
  if (left >= 0 && top >= 0 && right <= size.width && bottom <= size.height) return view;
  return movedView(view, size.width / 2 - (left + right) / 2, size.height / 2 - (top + bottom) / 2);
}

/** A place in the middle, near enough that about `NEAR` millimetres around it are seen; never farther than now. */
export function viewAt(view: View, at: Spot, size: Size): View {
  const scale = bounded(Math.max(view.scale, Math.min(size.width, size.height) / NEAR));
  return { scale, x: size.width / 2 - at[0] * scale, y: size.height / 2 + at[1] * scale };
}

export const toScreen = (view: View, at: Spot): Spot => [
  view.x + at[0] * view.scale,
  view.y - at[1] * view.scale,
];
export const toDrawing = (view: View, at: Spot): Spot => [
  (at[0] - view.x) / view.scale,
  (view.y - at[1]) / view.scale,
];

/** A length of 1, 2 or 5 times a power of ten that takes at least `pixels`. */
export function roundLength(scale: number, pixels: number): number {
  const least = pixels / scale;
  const power = 10 ** Math.floor(Math.log10(least));
  const step = [1, 2, 5, 10].find((times) => times * power >= least * (1 - 1e-9)) ?? 10;
  return step * power;
}
