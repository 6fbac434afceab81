import { describe, expect, it } from "vitest";
import { silhouetteOf, viewGeometryOf } from "~/components/drawing-viewer/view-geometry-of";
import type { DrawnPath } from "~/domain/drawing";
import type { Path } from "~/domain/geometry";
import { findParts } from "~/domain/parts";

function rectangle(x: number, y: number, width: number, height: number): Path {
  const corners = [
    { x, y },
    { x: x + width, y },
    { x: x + width, y: y + height },
    { x, y: y + height },
  ];
  return {
    closed: true,
    curves: corners.map((from, index) => ({ kind: "line", from, to: corners[(index + 1) % 4] })),
  };
}

const circle = (x: number, y: number, radius: number): Path => ({
  closed: true,
  curves: [{ kind: "arc", centre: { x, y }, radius, start: 0, sweep: 2 * Math.PI }],
});

const drawn = (layer: string, path: Path, entity: number): DrawnPath => ({
  path,
  layer,
  source: { type: "LWPOLYLINE", entity, block: null },
  hidden: false,
});

/** Two equal sides, the second turned a quarter, each with a hole and a pocket; one loose line. */
function report() {
  const open: Path = {
    closed: false,
    curves: [{ kind: "line", from: { x: 0, y: 900 }, to: { x: 90, y: 900 } }],
  };
  const paths = [
    ["OUTSIDE", rectangle(0, 0, 300, 200)],
    ["INSIDE", circle(60, 100, 29)],
    ["POCKET_LEAVE_6MM", rectangle(150, 60, 100, 50)],
    ["OUTSIDE", rectangle(500, 0, 200, 300)],
    ["INSIDE", circle(600, 60, 29)],
    ["POCKET_LEAVE_6MM", rectangle(590, 150, 50, 100)],
    ["OUTSIDE", open],
  ] as const;
  return findParts(
    {
      unit: "mm",
      declared: "mm",
      layers: [],
      entities: {},
      paths: paths.map(([layer, path], index) => drawn(layer, path, index)),
      texts: [],
      ignored: [],
      notes: [],
    },
    { layers: [] },
  );
}

describe("viewGeometryOf", () => {
  const geometry = viewGeometryOf(report());
  const [part] = geometry.parts;

  it("is plain JSON", () => {
    expect(JSON.parse(JSON.stringify(geometry))).toEqual(geometry);
  });

  it("merges the outlines of all copies by kind and depth", () => {
    expect(geometry.parts).toHaveLength(1);
    expect(part.outlines.map(({ kind, depthLabel }) => [kind, depthLabel])).toEqual([
      ["outside", undefined],
      ["cut-through", undefined],
      ["pocket", "leave 6.00"],
    ]);
    for (const outline of part.outlines) expect(outline.d.match(/M/g)).toHaveLength(2);
  });

  it("puts every copy where it is drawn", () => {
    const boxes = part.copies.map((copy) => copy.box).sort((one, other) => one.minX - other.minX);
    expect(boxes[0].maxX - boxes[0].minX).toBeCloseTo(300, 3);
    expect(boxes[1].minX).toBeCloseTo(500, 3);
    expect(boxes[1].maxY - boxes[1].minY).toBeCloseTo(300, 3);
    const centres = part.circles.map(([x, y, radius]) =>
      [x, y, radius].map((value) => Math.round(value * 100) / 100),
    );
    expect(centres.sort((one, other) => one[0] - other[0])).toEqual([
      [60, 100, 29],
      [600, 60, 29],
    ]);
  });

  it("counts on the first copy's label only, and stands each label inside its copy clear of what is cut", () => {
    expect(part.copies.map((copy) => copy.label)).toEqual(["A ×2", "A"]);
    for (const { box, labelAt } of part.copies) {
      expect(labelAt[0]).toBeGreaterThanOrEqual(box.minX);
      expect(labelAt[0]).toBeLessThan((box.minX + box.maxX) / 2);
      expect(labelAt[1]).toBeLessThanOrEqual(box.maxY);
      expect(labelAt[1]).toBeGreaterThan((box.minY + box.maxY) / 2);
    }
  });

  it("gives open chains with their ends, and the extents of everything shown", () => {
    expect(geometry.open.d).toBe("M0 900L90 900");
    expect(geometry.open.ends).toEqual([
      [0, 900],
      [90, 900],
    ]);
    expect(geometry.extents?.maxY).toBeCloseTo(900, 6);
    expect(geometry.extents?.maxX).toBeCloseTo(700, 6);
  });

  it("offers corners and centres to a measure", () => {
    const pairs = Array.from({ length: geometry.snaps.length / 2 }, (_, i) =>
      [geometry.snaps[2 * i], geometry.snaps[2 * i + 1]].map((value) => Math.round(value * 1000) / 1000),
    );
    expect(pairs).toContainEqual([300, 200]);
    expect(pairs).toContainEqual([60, 100]);
    expect(pairs).toContainEqual([700, 300]);
  });

  it("cuts openings, not pockets, out of a silhouette", () => {
    const [found] = report().parts;
    expect(silhouetteOf(found).d.match(/M/g)).toHaveLength(2);
  });

  it("shows an empty drawing as nothing", () => {
    const empty = viewGeometryOf(
      findParts(
        {
          unit: "mm",
          declared: null,
          layers: [],
          entities: {},
          paths: [],
          texts: [],
          ignored: [],
          notes: [],
        },
        { layers: [] },
      ),
    );
    expect(empty.extents).toBeNull();
    expect(empty.parts).toEqual([]);
  });
});
