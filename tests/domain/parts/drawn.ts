import type { Drawing, DrawnPath } from "~/domain/drawing";
import { type Affine, type Curve, circle, type Path, type Point, transformPath } from "~/domain/geometry";

/** Drawings in millimetres made by hand. */
export const drawingOf = (paths: readonly DrawnPath[], rest: Partial<Drawing> = {}): Drawing => ({
  unit: "mm",
  declared: "mm",
  layers: [...new Set(paths.map(({ layer }) => layer))].map((name) => ({
    name,
    hidden: false,
    count: paths.filter(({ layer }) => layer === name).length,
  })),
  entities: {},
  paths,
  texts: [],
  ignored: [],
  notes: [],
  ...rest,
});

export const drawn = (path: Path, layer = "0"): DrawnPath => ({
  path,
  layer,
  source: { type: "LWPOLYLINE", entity: 0, block: null },
  hidden: false,
});

export const lineCurve = (from: Point, to: Point): Curve => ({ kind: "line", from, to });

export const line = (x0: number, y0: number, x1: number, y1: number, layer = "0"): DrawnPath =>
  drawn({ closed: false, curves: [lineCurve({ x: x0, y: y0 }, { x: x1, y: y1 })] }, layer);

/** A closed polyline through the corners. */
export const ring = (corners: readonly (readonly [number, number])[]): Path => ({
  closed: true,
  curves: corners.map(([x, y], i) => {
    const [nextX, nextY] = corners[(i + 1) % corners.length];
    return lineCurve({ x, y }, { x: nextX, y: nextY });
  }),
});

export const rectangle = (x: number, y: number, width: number, height: number): Path =>
  ring([
    [x, y],
    [x + width, y],
    [x + width, y + height],
    [x, y + height],
  ]);

export const hole = (x: number, y: number, diameter: number): Path => ({
  closed: true,
  curves: [circle({ x, y }, diameter / 2)],
});

/** Every curve as a path of its own. */
export const exploded = ({ curves }: Path, layer = "0"): DrawnPath[] =>
  curves.map((curve) => drawn({ closed: false, curves: [curve] }, layer));

export const turnedPaths = (paths: readonly Path[], affine: Affine): Path[] =>
  paths.map((path) => transformPath(path, affine));
