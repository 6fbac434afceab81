import makerjs from "makerjs";

/** Everything here is in the unit of the drawing it goes into, x to the right and y up. */
export type Shape = makerjs.IModel;
export type Spot = readonly [number, number];

/** A span along an edge, from its left or lower end. */
export type Span = readonly [number, number];

/** Layers by operation, the depth in the name. */
export const OUTSIDE = "OUTSIDE";
export const INSIDE = "INSIDE";
export const NOTES = "NOTES";

/** The same shape on a layer. */
export const onLayer = (layer: string, ...shapes: readonly Shape[]): Shape => ({
  layer,
  models: Object.fromEntries(shapes.map((shape, i) => [`shape${i}`, shape])),
});

/** Several shapes as one. */
export const together = (...shapes: readonly Shape[]): Shape => ({
  models: Object.fromEntries(shapes.map((shape, i) => [`shape${i}`, shape])),
});

export const polygon = (points: readonly Spot[]): Shape =>
  new makerjs.models.ConnectTheDots(
    true,
    points.map(([x, y]) => [x, y]),
  );

/** A rectangle by its lower left corner, its corners rounded where a radius is given. */
export function rectangle([x, y]: Spot, width: number, height: number, radius = 0): Shape {
  const shape =
    radius > 0
      ? new makerjs.models.RoundRectangle(width, height, radius)
      : new makerjs.models.Rectangle(width, height);
  return makerjs.model.move(shape, [x, y]);
}

/** A rectangle about its centre whose corners are cut out for a square tenon. */
export const relievedSlot = ([x, y]: Spot, width: number, height: number, toolRadius: number): Shape =>
  makerjs.model.move(new makerjs.models.Dogbone(width, height, toolRadius), [x - width / 2, y - height / 2]);

export const round = ([x, y]: Spot, diameter: number): Shape => ({
  paths: { circle: new makerjs.paths.Circle([x, y], diameter / 2) },
});

/** An opening with round ends about its centre, lying along x. */
export const obround = ([x, y]: Spot, length: number, width: number): Shape =>
  makerjs.model.move(new makerjs.models.RoundRectangle(length, width, width / 2), [
    x - length / 2,
    y - width / 2,
  ]);

/** One straight stroke. */
export const stroke = ([fromX, fromY]: Spot, [toX, toY]: Spot): Shape => ({
  paths: { line: new makerjs.paths.Line([fromX, fromY], [toX, toY]) },
});

/** Words centred at a spot, for people and never for the cutter. */
export const caption = (text: string, [x, y]: Spot): Shape => ({
  layer: NOTES,
  caption: { text, anchor: new makerjs.paths.Line([x, y], [x, y]) },
});

export const mirrored = (shape: Shape): Shape => makerjs.model.mirror(shape, true, false);
export const turned = (shape: Shape, degrees: number): Shape =>
  makerjs.model.rotate(makerjs.model.clone(shape), degrees, [0, 0]);

export interface Drawn {
  readonly part: Shape;
  readonly copies: number;
}

const boxOf = (shape: Shape): { readonly low: Spot; readonly width: number; readonly height: number } => {
  const extents = makerjs.measure.modelExtents(shape);
  if (!extents) throw new Error("A part without lines has no place on a drawing.");
  return {
    low: [extents.low[0], extents.low[1]],
    width: extents.high[0] - extents.low[0],
    height: extents.high[1] - extents.low[1],
  };
};

/** Parts in rows as a person lays them out to look at: left to right, rows upward, never overlapping. */
export function inRows(parts: readonly Drawn[], rowLength: number, gap: number): Shape {
  const placed: Shape[] = [];
  let x = gap;
  let y = gap;
  let rowHeight = 0;
  for (const { part, copies } of parts) {
    const { low, width, height } = boxOf(part);
    for (let copy = 0; copy < copies; copy++) {
      if (x > gap && x + width > rowLength) {
        x = gap;
        y += rowHeight + gap;
        rowHeight = 0;
      }
      placed.push(makerjs.model.moveRelative(makerjs.model.clone(part), [x - low[0], y - low[1]]));
      x += width + gap;
      rowHeight = Math.max(rowHeight, height);
    }
  }
  return together(...placed);
}

const COLOURS: readonly (readonly [prefix: string, colour: number])[] = [
  [OUTSIDE, 7],
  [INSIDE, 5],
  ["POCKET", 3],
  ["DADO", 3],
  ["CUP", 1],
  ["DRILL", 1],
  ["ENGRAVE", 6],
  [NOTES, 8],
];

function layersOf(shape: Shape, found = new Set<string>()): Set<string> {
  if (shape.layer) found.add(shape.layer);
  for (const inner of Object.values(shape.models ?? {})) layersOf(inner, found);
  return found;
}

export interface DxfChoices {
  /** What the file says its coordinates are in; nothing where it says nothing. */
  readonly declared: "mm" | "in" | null;
  /** One polyline for every outline, or loose lines and arcs. */
  readonly joined: boolean;
}

/** DXF text of a drawing. */
export function toDxf(shape: Shape, { declared, joined }: DxfChoices): string {
  const layerOptions = Object.fromEntries(
    [...layersOf(shape)].map((layer) => [
      layer,
      { color: COLOURS.find(([prefix]) => layer.startsWith(prefix))?.[1] ?? 7 },
    ]),
  );
  const units =
    declared === null
      ? {}
      : { units: declared === "mm" ? makerjs.unitType.Millimeter : makerjs.unitType.Inch };
  return makerjs.exporter.toDXF(shape, { ...units, usePOLYLINE: joined, layerOptions });
}
