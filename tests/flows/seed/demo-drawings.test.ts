import { describe, expect, it } from "vitest";
import { DEMO_DRAWINGS, type DemoDrawing, type DemoDrawingName } from "~/db/seed/drawings";
import { type Drawing, readDrawing, scaleDrawing } from "~/domain/drawing";
import { findParts, type PartsReport } from "~/domain/parts";

function read({ draw, unit }: DemoDrawing): { drawing: Drawing; report: PartsReport } {
  const result = readDrawing(new TextEncoder().encode(draw()));
  if (!result.ok) throw new Error(result.reason);
  return { drawing: result.drawing, report: findParts(scaleDrawing(result.drawing, unit), { layers: [] }) };
}

/** Parts, kinds, and inner outlines of all parts, as the drawings were designed. */
const DESIGNED: Record<DemoDrawingName, readonly [parts: number, kinds: number, holes: number]> = {
  "galley-carcass": [12, 6, 27],
  "locker-doors": [2, 2, 14],
  "fan-panel": [1, 1, 13],
  "chart-table-drawers": [8, 3, 22],
  "bench-lid": [1, 1, 1],
  "library-shelves": [8, 3, 8],
  "light-panels": [4, 2, 10],
  "bunk-side": [1, 1, 5],
  "lamp-shelf": [3, 2, 1],
  "menu-frame": [2, 2, 7],
  "drawer-fronts": [5, 3, 25],
  "serving-tray": [10, 3, 16],
  "trial-box": [6, 4, 11],
};

describe("drawings of the demonstration read back as designed", () => {
  for (const [name, designed] of Object.entries(DESIGNED)) {
    it(name, () => {
      const { drawing, report } = read(DEMO_DRAWINGS[name as DemoDrawingName]);
      const { parts, distinctParts, holes } = report.totals;
      expect([parts, distinctParts, holes]).toEqual(designed);
      expect(report.open).toEqual([]);
      expect(drawing.ignored.filter(({ type }) => type !== "TEXT")).toEqual([]);
      for (const { layer } of drawing.paths) expect(drawing.layers.map((one) => one.name)).toContain(layer);
    });
  }

  it("and are the same at every call", () => {
    for (const { draw } of Object.values(DEMO_DRAWINGS)) expect(draw()).toBe(draw());
  });
});

describe("what each drawing is there to show", () => {
  it("a pair of doors mirrored, each with cups 13 mm deep and screw holes 10 mm deep", () => {
    const { parts } = read(DEMO_DRAWINGS["locker-doors"]).report;
    expect(parts.map(({ id, mirrorOf }) => [id, mirrorOf])).toEqual([
      ["A", null],
      ["B", "A"],
    ]);
    const drilled = parts[0].features.filter(({ kind }) => kind === "drill");
    expect(drilled.map(({ diameter, depth }) => [diameter, depth])).toEqual([
      [35, { depth: 13 }],
      [35, { depth: 13 }],
      ...Array.from({ length: 4 }, () => [5, { depth: 10 }]),
    ]);
  });

  it("pockets that leave 6 mm", () => {
    const pockets = read(DEMO_DRAWINGS["light-panels"]).report.parts.flatMap(({ features }) => features);
    expect(pockets.map(({ kind, depth }) => [kind, depth])).toEqual(
      Array.from({ length: 5 }, () => ["pocket", { leave: 6 }]),
    );
  });

  it("a file in inches, 74.75 in long", () => {
    const { drawing, report } = read(DEMO_DRAWINGS["bunk-side"]);
    expect(drawing.declared).toBe("in");
    expect(report.parts[0].smallestRect.long).toBeCloseTo(74.75 * 25.4, 6);
  });

  it("a file that declares no unit", () => {
    expect(read(DEMO_DRAWINGS["lamp-shelf"]).drawing.declared).toBeNull();
    expect(read(DEMO_DRAWINGS["galley-carcass"]).drawing.declared).toBe("mm");
  });

  it("a line drawn twice and a gap of 0.15 mm bridged", () => {
    const { report } = read(DEMO_DRAWINGS["bench-lid"]);
    expect(report.duplicates).toBe(1);
    expect(report.bridges.map(({ gap }) => Number(gap.toFixed(6)))).toEqual([0.15]);
  });

  it("a sheet border and captions set aside, captions naming the parts", () => {
    const { report } = read(DEMO_DRAWINGS["library-shelves"]);
    expect(report.setAside.map(({ what, layer, count }) => [what, layer, count])).toEqual([
      ["text", "NOTES", 4],
      ["frame", "BORDER", 1],
    ]);
    expect(report.parts.map(({ name }) => name)).toContain("BACK RAIL");
  });

  it("a board cut from the opening of its frame", () => {
    const { parts } = read(DEMO_DRAWINGS["menu-frame"]).report;
    expect(parts.map(({ box }) => [box.maxX - box.minX, box.maxY - box.minY].map(Math.round))).toEqual([
      [720, 980],
      [560, 820],
    ]);
  });
});
