import { describe, expect, it } from "vitest";
import { containsPoint } from "~/domain/geometry";
import { findParts } from "~/domain/parts";
import { drawingOf, drawn, exploded, hole, line, rectangle, ring } from "./drawn";

const found = (paths: Parameters<typeof drawingOf>[0], rules = {}) =>
  findParts(drawingOf(paths), { layers: [], ...rules });

describe("a plate with holes", () => {
  const report = found([
    drawn(rectangle(0, 0, 400, 300)),
    drawn(hole(50, 50, 20)),
    drawn(hole(350, 250, 30)),
  ]);

  it("is measured in closed form", () => {
    const [part] = report.parts;
    const openings = Math.PI * (10 ** 2 + 15 ** 2);
    expect(report.parts).toHaveLength(1);
    expect(part.outerLength).toBe(1400);
    expect(part.innerLength).toBeCloseTo(50 * Math.PI, 9);
    expect(part.grossArea).toBe(120_000);
    expect(part.area).toBeCloseTo(120_000 - openings, 6);
    expect(part.holes).toBe(2);
    expect(part.smallestRect).toEqual({ long: 400, short: 300 });
    expect(part.box).toEqual({ minX: 0, minY: 0, maxX: 400, maxY: 300 });
  });

  it("adds up in the totals", () => {
    expect(report.totals.parts).toBe(1);
    expect(report.totals.cutLength).toBeCloseTo(1400 + 50 * Math.PI, 9);
    expect(report.totals.box).toEqual({ width: 400, height: 300 });
    expect(report.drawn).toMatchObject({
      curves: 3,
      loops: 3,
      depths: { 0: 1, 1: 2 },
      openChains: 0,
      branches: 0,
    });
  });

  it("has a point in its material", () => {
    const [{ at }] = report.parts[0].copies;
    expect(containsPoint(rectangle(0, 0, 400, 300), at)).toBe(true);
    expect(containsPoint(hole(50, 50, 20), at)).toBe(false);
  });
});

describe("containment", () => {
  it("makes an island in an opening a part of its own", () => {
    const { parts, drawn: all } = found([
      drawn(rectangle(0, 0, 400, 400)),
      drawn(rectangle(100, 100, 200, 200)),
      drawn(rectangle(150, 150, 50, 60)),
    ]);
    expect(parts.map(({ grossArea, holes }) => [grossArea, holes])).toEqual([
      [160_000, 1],
      [3000, 0],
    ]);
    expect(all.depths).toEqual({ 0: 1, 1: 1, 2: 1 });
  });

  it("takes two small circles about one centre for a counterbored hole", () => {
    const { parts } = found([
      drawn(rectangle(0, 0, 400, 300)),
      drawn(hole(50, 50, 12)),
      drawn(hole(50, 50, 6)),
    ]);
    expect(parts).toHaveLength(1);
    expect(parts[0].features.map(({ kind, diameter }) => [kind, diameter])).toEqual([
      ["pocket", 12],
      ["drill", 6],
    ]);
    // The wide circle does not go through: only the 6 mm hole is lost.
    expect(parts[0].area).toBeCloseTo(120_000 - 9 * Math.PI, 6);
  });

  it("keeps a ring in a wide opening a part", () => {
    const { parts } = found([
      drawn(rectangle(0, 0, 400, 300)),
      drawn(hole(150, 150, 60)),
      drawn(hole(150, 150, 40)),
    ]);
    expect(parts).toHaveLength(2);
  });
});

describe("what is set aside", () => {
  const plate = (x: number, y: number) => [drawn(rectangle(x, y, 100, 80)), drawn(hole(x + 50, y + 40, 20))];

  it("a frame of a sheet's size, and a border round it", () => {
    const report = found([
      drawn(rectangle(-50, -50, 3000, 2000)),
      drawn(rectangle(0, 0, 2440, 1220)),
      ...plate(10, 10),
      drawn(rectangle(500, 500, 300, 200)),
    ]);
    expect(report.setAside).toMatchObject([{ what: "frame", layer: "0", count: 2 }]);
    expect(report.totals).toMatchObject({ parts: 2, holes: 1 });
    expect(report.totals.box).toEqual({ width: 790, height: 690 });
    // Drawn counts come before setting aside.
    expect(report.drawn.depths).toEqual({ 0: 1, 1: 1, 2: 2, 3: 1 });
  });

  it("a rectangle round two parts with openings, and a rectangle on a border's layer", () => {
    expect(found([drawn(rectangle(0, 0, 700, 500)), ...plate(10, 10), ...plate(200, 10)]).totals.parts).toBe(
      2,
    );
    const onLayer = found([drawn(rectangle(0, 0, 700, 500), "SHEET_BORDER"), drawn(rectangle(9, 9, 50, 60))]);
    expect(onLayer.setAside).toMatchObject([{ what: "frame", layer: "SHEET_BORDER", count: 1 }]);
  });

  it("no panel on a layer that is named for its sheet stock", () => {
    const onStock = [
      drawn(rectangle(0, 0, 700, 500), "SHEET 18MM"),
      drawn(rectangle(9, 9, 50, 60), "SHEET 18MM"),
    ];
    expect(found(onStock)).toMatchObject({ setAside: [], totals: { parts: 1, holes: 1 } });
  });

  it("no panel with openings, lettering or countersunk holes", () => {
    const panel = found([drawn(rectangle(0, 0, 700, 500)), drawn(hole(50, 50, 40)), ...plate(200, 200)]);
    expect(panel.setAside).toEqual([]);
    const countersunk = [50, 150, 250].flatMap((x) => [drawn(hole(x, 50, 10)), drawn(hole(x, 50, 5))]);
    expect(found([drawn(rectangle(0, 0, 700, 500)), ...countersunk])).toMatchObject({
      setAside: [],
      totals: { parts: 1, holes: 6 },
    });
  });

  it("is cut after all when the builder says so", () => {
    const paths = [drawn(rectangle(0, 0, 2440, 1220)), drawn(hole(500, 500, 100))];
    const restored = [{ what: "frame" as const, layer: "0" }];
    expect(found(paths).totals).toMatchObject({ parts: 1, holes: 0 });
    expect(found(paths, { restored }).totals).toMatchObject({ parts: 1, holes: 1 });
    const noted = [drawn(rectangle(0, 0, 200, 100)), ...exploded(rectangle(300, 0, 200, 100), "NOTES")];
    expect(found(noted).totals.parts).toBe(1);
    expect(found(noted, { restored: [{ what: "note", layer: "NOTES" }] }).parts).toMatchObject([
      { quantity: 2 },
    ]);
  });

  it("hidden layers and notes, which still count as drawn", () => {
    const report = found([
      ...plate(0, 0),
      { ...drawn(rectangle(20, 20, 9, 9), "OLD"), hidden: true },
      drawn(rectangle(60, 60, 9, 9), "NOTES"),
    ]);
    expect(report.setAside).toMatchObject([
      { what: "hidden", layer: "OLD", count: 1 },
      { what: "note", layer: "NOTES", count: 1 },
    ]);
    expect(report.totals).toMatchObject({ parts: 1, holes: 1 });
    expect(report.drawn).toMatchObject({ loops: 4, hiddenLength: 36 });
  });

  it("a visible line over an equal hidden one is kept", () => {
    const square = rectangle(0, 0, 100, 100);
    const report = found([{ ...drawn(square, "OLD"), hidden: true }, drawn(square)]);
    expect(report.totals.parts).toBe(1);
    expect(report.duplicates).toBe(1);
  });
});

describe("duplicates", () => {
  it("count once, whichever way they are drawn and wherever they begin", () => {
    const square = rectangle(0, 0, 100, 50);
    const begunElsewhere = ring([
      [100, 50],
      [100, 0],
      [0, 0],
      [0, 50],
    ]);
    const report = found([
      drawn(square),
      drawn(begunElsewhere),
      drawn(hole(50, 25, 10)),
      drawn(hole(50, 25, 10)),
    ]);
    expect(report.duplicates).toBe(2);
    expect(report.drawn.length).toBeCloseTo(600 + 20 * Math.PI, 9);
    expect(report.drawn.uniqueLength).toBeCloseTo(300 + 10 * Math.PI, 9);
    expect(report.totals).toMatchObject({ parts: 1, holes: 1 });
    expect(report.setAside).toMatchObject([{ what: "duplicate", count: 2 }]);
  });

  it("leave an outline drawn as lines over a polyline one part", () => {
    const square = rectangle(0, 0, 100, 50);
    const report = found([drawn(square), ...exploded(square)]);
    expect(report.totals.parts).toBe(1);
    expect(report.totals.cutLength).toBeCloseTo(300, 9);
  });

  it("a line over one side of a closed polyline is set aside, one that goes on past it is open", () => {
    const over = found([drawn(rectangle(0, 0, 100, 50)), line(10, 0, 80, 0)]);
    expect(over.setAside).toMatchObject([{ what: "duplicate", count: 1 }]);
    expect(over.open).toEqual([]);
    // It equals no whole curve that was drawn, and so counts in full as drawn.
    expect(over).toMatchObject({ duplicates: 0, drawn: { uniqueLength: 370, openChains: 1 } });
    expect(over.totals.cutLength).toBe(300);
    expect(found([drawn(rectangle(0, 0, 100, 50)), line(50, 0, 120, 0)]).open).toHaveLength(1);
  });

  it("partly overlapping lines count in full as drawn and once as cut", () => {
    // Two squares side by side: the right side of one lies on part of the left side of the other.
    const report = found([drawn(rectangle(0, 0, 100, 100)), drawn(rectangle(100, 20, 50, 40))]);
    expect(report.drawn.uniqueLength).toBe(580);
    expect(report.totals.cutLength).toBeCloseTo(540, 9);
  });
});

describe("layers that say what is done", () => {
  const report = found([
    drawn(rectangle(0, 0, 600, 400), "OUTSIDE"),
    drawn(rectangle(50, 50, 100, 80), "INSIDE"),
    drawn(rectangle(200, 50, 100, 80), "POCKET_D0.250IN"),
    drawn(rectangle(0, 300, 100, 100), "POCKET_LEAVE_6MM"),
    drawn(hole(400, 100, 5), "DRILL_5_D13"),
    drawn(hole(450, 100, 35), "CUP_35_D13"),
    drawn(hole(500, 200, 8)),
    line(300, 300, 400, 300, "ENGRAVE"),
    line(900, 300, 950, 300, "ENGRAVE"),
  ]);
  const [part] = report.parts;

  it("give the features of the part round them", () => {
    expect(report.parts).toHaveLength(1);
    expect(part.layer).toBe("OUTSIDE");
    const operations = part.features.map(({ kind, depth }) => [kind, depth]).sort();
    expect(operations).toEqual(
      [
        ["cut-through", null],
        ["pocket", { depth: 6.35 }],
        ["pocket", { leave: 6 }],
        ["drill", { depth: 13 }],
        ["drill", { depth: 13 }],
        ["drill", null],
        ["engrave", null],
      ].sort(),
    );
  });

  it("a pocket that shares the outline's edge is neither a branch nor a part", () => {
    expect(part.holes).toBe(6);
    expect(part.outerLength).toBe(2000);
    expect(part.area).toBeCloseTo(240_000 - 8000 - 16 * Math.PI, 6);
  });

  it("an engraved line outside of all parts stays in the list of open lines", () => {
    expect(report.open).toMatchObject([{ layer: "ENGRAVE", length: 50 }]);
  });

  it("what the builder said of a layer wins over its name", () => {
    const rules = { layers: [{ layer: "OUTSIDE", kind: "set-aside" as const, depth: null }] };
    const paths = [drawn(rectangle(0, 0, 60, 40), "OUTSIDE"), drawn(rectangle(100, 0, 60, 40), "B")];
    expect(findParts(drawingOf(paths), rules).totals.parts).toBe(1);
    const pocketed = findParts(drawingOf([drawn(rectangle(0, 0, 60, 40)), drawn(hole(20, 20, 10), "B")]), {
      layers: [{ layer: "B", kind: "pocket", depth: { depth: 4 } }],
    });
    expect(pocketed.parts[0].features).toMatchObject([{ kind: "pocket", depth: { depth: 4 } }]);
  });
});

describe("names", () => {
  it("are letters by size, largest first, or the one text inside", () => {
    const paths = [
      drawn(rectangle(0, 0, 50, 50)),
      drawn(rectangle(100, 0, 90, 90)),
      drawn(rectangle(300, 0, 70, 70)),
    ];
    const text = (words: string, x: number) => ({ text: words, at: { x, y: 20 }, height: 5, layer: "T" });
    const texts = [text("Door", 120), text("1", 310), text("2", 320)];
    const { parts, setAside } = findParts(drawingOf(paths, { texts }), { layers: [] });
    expect(parts.map(({ id, name, grossArea }) => [id, name, grossArea])).toEqual([
      ["A", "Door", 8100],
      ["B", "B", 4900],
      ["C", "C", 2500],
    ]);
    expect(setAside).toMatchObject([{ what: "text", layer: "T", count: 3 }]);
  });
});

describe("nothing to cut", () => {
  it("is a report like any other", () => {
    const report = found([]);
    expect(report.parts).toEqual([]);
    expect(report.drawn).toMatchObject({ curves: 0, loops: 0, depths: {}, extents: null });
    expect(report.totals.box).toEqual({ width: 0, height: 0 });
  });

  it("a polyline there and back is a line, not a part", () => {
    const report = found([
      drawn(
        ring([
          [0, 0],
          [10, 0],
        ]),
      ),
    ]);
    expect(report.parts).toEqual([]);
    expect(report.drawn).toMatchObject({ loops: 1, depths: {} });
    expect(report.open).toHaveLength(1);
  });
});
