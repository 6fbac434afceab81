import { pick, type Random, seededRandom } from "./random";

type Groups = readonly (string | number)[];

/** Kinds of parts in one drawing: copies are many, kinds few, as in a real cut list. */
const KINDS = 24;
/** Parts in a row of the sheet, and the room each has, millimetres. */
const PER_ROW = 100;
const ROOM = { width: 700, height: 500 };
const LAYERS = ["OUTSIDE", "INSIDE", "POCKET_D6", "DRILL_5_D13", "ENGRAVE", "NOTES"];

interface PartKind {
  readonly width: number;
  readonly height: number;
  readonly corner: number;
  readonly teeth: number;
  readonly holes: readonly (readonly [number, number])[];
}

/**
 * DXF text of at least `bytes` bytes as a CAD program writes it, with handles and subclass marks: panels of two
 * dozen kinds as polylines with bulges or as loose lines and arcs, with drilled holes, pockets, ellipses, splines,
 * inserts and texts. The same for a seed.
 */
export function generatedDrawing(seed: number, bytes: number): string {
  const random = seededRandom(seed);
  const kinds = Array.from({ length: KINDS }, () => partKind(random));
  const pieces = [opening()];
  let handle = 256;
  let size = pieces[0].length;
  for (let place = 0; size < bytes || place === 0; place++) {
    const x = (place % PER_ROW) * ROOM.width;
    const y = Math.floor(place / PER_ROW) * ROOM.height;
    const text = panel(kinds[place % KINDS], x, y, place)
      .map((entity) => entityText(entity, (handle++).toString(16).toUpperCase()))
      .join("");
    pieces.push(text);
    size += text.length;
  }
  pieces.push(text([0, "ENDSEC", 0, "EOF"]));
  return pieces.join("");
}

function partKind(random: Random): PartKind {
  const width = 200 + pick(random, 400);
  const height = 150 + pick(random, 300);
  const holes = Array.from(
    { length: 3 + pick(random, 6) },
    () => [20 + random() * (width - 40), 10 + random() * 15] as const,
  );
  return { width, height, corner: 5 + pick(random, 10), teeth: 2 + pick(random, 8), holes };
}

/** Codes and values in turn, each on a line of its own. */
function text(groups: Groups): string {
  let all = "";
  for (let i = 0; i < groups.length; i += 2) {
    const value = groups[i + 1];
    all += `${String(groups[i]).padStart(3)}\n${typeof value === "number" ? numberText(value) : value}\n`;
  }
  return all;
}

const numberText = (value: number): string => (Number.isInteger(value) ? `${value}.0` : value.toFixed(12));

function opening(): string {
  const layers: Groups = LAYERS.flatMap((name) => [0, "LAYER", 2, name, 70, "0", 62, "7", 6, "CONTINUOUS"]);
  const hardware = [
    entityText(["CIRCLE", "AcDbCircle", "DRILL_5_D13", 10, 0, 20, 0, 40, 2.5], "90"),
    entityText(["CIRCLE", "AcDbCircle", "DRILL_5_D13", 10, 32, 20, 0, 40, 2.5], "91"),
    entityText(["LINE", "AcDbLine", "NOTES", 10, 0, 20, 0, 11, 32, 21, 0], "92"),
  ].join("");
  return [
    text([0, "SECTION", 2, "HEADER", 9, "$ACADVER", 1, "AC1015", 9, "$INSUNITS", 70, "4", 0, "ENDSEC"]),
    text([0, "SECTION", 2, "TABLES", 0, "TABLE", 2, "LAYER", 70, String(LAYERS.length)]),
    text(layers),
    text([0, "ENDTAB", 0, "ENDSEC", 0, "SECTION", 2, "BLOCKS"]),
    text([0, "BLOCK", 8, "0", 2, "HINGE", 70, "0", 10, 0, 20, 0, 30, 0]),
    hardware,
    text([0, "ENDBLK", 8, "0", 0, "ENDSEC", 0, "SECTION", 2, "ENTITIES"]),
  ].join("");
}

/** An entity as type, subclass, layer, then its own groups. */
function entityText([type, subclass, layer, ...groups]: Groups, handle: string): string {
  return text([0, type, 5, handle, 100, "AcDbEntity", 8, layer, 100, subclass, ...groups]);
}

function panel(kind: PartKind, x: number, y: number, place: number): Groups[] {
  const { width, height, holes } = kind;
  const outline = place % 2 === 0 ? [polylineOutline(kind, x, y)] : looseOutline(kind, x, y);
  const drills = holes.map(
    ([dx, dy]): Groups => ["CIRCLE", "AcDbCircle", "DRILL_5_D13", 10, x + dx, 20, y + dy, 30, 0, 40, 2.5],
  );
  const middle = { x: x + width / 2, y: y + height / 2 };
  const pocket: Groups = polyline("POCKET_D6", [
    [x + 30, y + 40],
    [x + width - 30, y + 40],
    [x + width - 30, y + 52],
    [x + 30, y + 52],
  ]);
  const opening: Groups = [
    ...["ELLIPSE", "AcDbEllipse", "INSIDE", 10, middle.x, 20, middle.y + 20, 30, 0],
    ...[11, 30, 21, 0, 31, 0, 40, 0.5, 41, 0, 42, 2 * Math.PI],
  ];
  const name: Groups = [
    "TEXT",
    "AcDbText",
    "NOTES",
    10,
    middle.x,
    20,
    y + 70,
    40,
    8,
    1,
    `Panel ${place % KINDS}`,
  ];
  const hinge: Groups = [
    "INSERT",
    "AcDbBlockReference",
    "0",
    2,
    "HINGE",
    10,
    x + 40,
    20,
    y + height - 15,
    50,
    0,
  ];
  return [...outline, ...drills, pocket, opening, hinge, wave(x + 40, y + 80), name];
}

function polyline(layer: string, vertices: readonly (readonly [number, number, number?])[]): Groups {
  return [
    ...["LWPOLYLINE", "AcDbPolyline", layer, 90, String(vertices.length), 70, "1"],
    ...vertices.flatMap(([x, y, bulge]) =>
      bulge === undefined ? [10, x, 20, y] : [10, x, 20, y, 42, bulge],
    ),
  ];
}

/** Rounded corners and teeth along the top edge. */
function polylineOutline({ width, height, corner, teeth }: PartKind, x: number, y: number): Groups {
  const quarter = Math.tan(Math.PI / 8);
  const pitch = (width - 4 * corner) / (2 * teeth);
  const vertices: (readonly [number, number, number?])[] = [
    [x + corner, y],
    [x + width - corner, y, quarter],
    [x + width, y + corner],
    [x + width, y + height - corner, quarter],
    [x + width - corner, y + height],
  ];
  for (let tooth = teeth - 1; tooth >= 0; tooth--) {
    const left = x + 2 * corner + 2 * tooth * pitch;
    vertices.push([left + pitch, y + height], [left + pitch, y + height - 9]);
    vertices.push([left, y + height - 9], [left, y + height]);
  }
  vertices.push([x + corner, y + height, quarter], [x, y + height - corner], [x, y + corner, quarter]);
  return polyline("OUTSIDE", vertices);
}

/** A rectangle with round corners as four lines and four arcs. */
function looseOutline({ width, height, corner: r }: PartKind, x: number, y: number): Groups[] {
  const line = (x0: number, y0: number, x1: number, y1: number): Groups => [
    ...["LINE", "AcDbLine", "OUTSIDE", 10, x0, 20, y0, 30, 0, 11, x1, 21, y1, 31, 0],
  ];
  const arc = (cx: number, cy: number, from: number): Groups => [
    ...[
      "ARC",
      "AcDbCircle",
      "OUTSIDE",
      10,
      cx,
      20,
      cy,
      30,
      0,
      40,
      r,
      100,
      "AcDbArc",
      50,
      from,
      51,
      from + 90,
    ],
  ];
  const [right, top] = [x + width, y + height];
  return [
    line(x + r, y, right - r, y),
    arc(right - r, y + r, 270),
    line(right, y + r, right, top - r),
    arc(right - r, top - r, 0),
    line(right - r, top, x + r, top),
    arc(x + r, top - r, 90),
    line(x, top - r, x, y + r),
    arc(x + r, y + r, 180),
  ];
}

/** A clamped cubic spline that is engraved. */
function wave(x: number, y: number): Groups {
  const knots = [0, 0, 0, 0, 1, 2, 2, 2, 2].flatMap((knot): Groups => [40, knot]);
  const control = [0, 1, 2, 3, 4].flatMap((i): Groups => [10, x + 20 * i, 20, y + (i % 2) * 15, 30, 0]);
  return [
    "SPLINE",
    "AcDbSpline",
    "ENGRAVE",
    70,
    "8",
    71,
    "3",
    72,
    "9",
    73,
    "5",
    74,
    "0",
    ...knots,
    ...control,
  ];
}
