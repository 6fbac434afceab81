import { type LayeredPath, writeDxf } from "~/domain/drawing";
import { circle, type Path, type Point } from "~/domain/geometry";
import type { LengthUnit } from "~/domain/units";

export const rectangle = (from: Point, width: number, height: number): Path => {
  const corners = [
    from,
    { x: from.x + width, y: from.y },
    { x: from.x + width, y: from.y + height },
    { x: from.x, y: from.y + height },
  ];
  return {
    closed: true,
    curves: corners.map((corner, index) => ({
      kind: "line",
      from: corner,
      to: corners[(index + 1) % corners.length] ?? from,
    })),
  };
};

export const round = (centre: Point, diameter: number): Path => ({
  closed: true,
  curves: [circle(centre, diameter / 2)],
});

export const dxfBytes = (paths: readonly LayeredPath[], unit: LengthUnit = "mm"): Uint8Array =>
  new TextEncoder().encode(writeDxf(paths, unit));

/**
 * Two equal shelves 600 x 300, each with two 5 mm holes, and one back 800 x 400 with a 100 x 50 cut-out: two kinds
 * of part, three pieces. Outlines on OUTSIDE, cut-out on INSIDE, holes on DRILL. `mark` makes other bytes of it.
 */
export function shelvesDxf({ unit = "mm", mark = 0 }: { unit?: LengthUnit; mark?: number } = {}): Uint8Array {
  const shelf = (x: number): LayeredPath[] => [
    { layer: "OUTSIDE", path: rectangle({ x, y: 0 }, 600, 300) },
    { layer: "DRILL", path: round({ x: x + 50, y: 50 }, 5) },
    { layer: "DRILL", path: round({ x: x + 550, y: 50 }, 5) },
  ];
  return dxfBytes(
    [
      ...shelf(mark),
      ...shelf(mark + 700),
      { layer: "OUTSIDE", path: rectangle({ x: mark, y: 400 }, 800, 400) },
      { layer: "INSIDE", path: rectangle({ x: mark + 300, y: 500 }, 100, 50) },
    ],
    unit,
  );
}
