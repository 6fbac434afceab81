import { type Drawing, readDrawing } from "~/domain/drawing";
import { pathLength } from "~/domain/geometry";

/** Groups as `[code, value]` pairs; an entity starts with its code 0. */
export type Groups = readonly (readonly [number, string | number])[];

export const lines = (groups: Groups): string =>
  groups.map(([code, value]) => `${code}\n${value}\n`).join("");

interface Sections {
  readonly header?: Groups;
  readonly layers?: readonly Groups[];
  readonly blocks?: readonly {
    readonly name: string;
    readonly base?: readonly [number, number];
    readonly entities: Groups;
  }[];
  readonly entities: Groups;
}

/** A whole file. */
export function dxf({ header = [], layers = [], blocks = [], entities }: Sections): string {
  const tables: Groups = [
    [0, "TABLE"],
    [2, "LAYER"],
    [70, layers.length],
    ...layers.flatMap((layer): Groups => [[0, "LAYER"], ...layer]),
    [0, "ENDTAB"],
  ];
  const definitions = blocks.flatMap(
    ({ name, base = [0, 0], entities: inner }): Groups => [
      [0, "BLOCK"],
      [8, "0"],
      [2, name],
      [70, 0],
      [10, base[0]],
      [20, base[1]],
      ...inner,
      [0, "ENDBLK"],
    ],
  );
  const section = (name: string, groups: Groups): Groups => [
    [0, "SECTION"],
    [2, name],
    ...groups,
    [0, "ENDSEC"],
  ];
  return lines([
    ...section("HEADER", header),
    ...section("TABLES", tables),
    ...section("BLOCKS", definitions),
    ...section("ENTITIES", entities),
    [0, "EOF"],
  ]);
}

export const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);

export function read(text: string | Uint8Array): Drawing {
  const result = readDrawing(typeof text === "string" ? bytesOf(text) : text);
  if (!result.ok) throw new Error(result.reason);
  return result.drawing;
}

/** The drawing of these entities and nothing else. */
export const readEntities = (...entities: Groups[]): Drawing => read(dxf({ entities: entities.flat() }));

export const totalLength = ({ paths }: Drawing): number =>
  paths.reduce((sum, { path }) => sum + pathLength(path), 0);

export const lineEntity = (x0: number, y0: number, x1: number, y1: number, layer = "0"): Groups => [
  [0, "LINE"],
  [8, layer],
  [10, x0],
  [20, y0],
  [11, x1],
  [21, y1],
];

export const circleEntity = (x: number, y: number, radius: number, ...more: Groups): Groups => [
  [0, "CIRCLE"],
  [8, "0"],
  [10, x],
  [20, y],
  [40, radius],
  ...more,
];

export const insertEntity = (block: string, x: number, y: number, ...more: Groups): Groups => [
  [0, "INSERT"],
  [8, "0"],
  [2, block],
  [10, x],
  [20, y],
  ...more,
];

export const lightPolyline = (
  vertices: readonly (readonly [number, number, number?])[],
  flags = 1,
  ...more: Groups
): Groups => [
  [0, "LWPOLYLINE"],
  [8, "0"],
  [90, vertices.length],
  [70, flags],
  ...more,
  ...vertices.flatMap(
    ([x, y, bulge]): Groups => [[10, x], [20, y], ...(bulge === undefined ? [] : ([[42, bulge]] as const))],
  ),
];

/** Extrusion toward the underside: what a mirrored or flipped object carries. */
export const DOWNWARD: Groups = [
  [210, 0],
  [220, 0],
  [230, -1],
];
