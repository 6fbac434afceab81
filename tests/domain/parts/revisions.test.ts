import { describe, expect, it } from "vitest";
import type { DrawnPath } from "~/domain/drawing";
import { affineMove, affineRotation, transformPath } from "~/domain/geometry";
import { compareRevisions, findParts, keepLetters } from "~/domain/parts";
import { drawingOf, drawn, hole, rectangle, ring } from "./drawn";

const find = (paths: readonly DrawnPath[]) => findParts(drawingOf(paths), { layers: [] });

const side = drawn(rectangle(0, 0, 600, 400));
const shelf = drawn(rectangle(0, 500, 500, 300));
const foot = drawn(rectangle(0, 900, 100, 80));

describe("two revisions", () => {
  it("of one drawing, moved, turned and drawn in another order, differ in nothing", () => {
    const before = find([side, drawn(hole(50, 50, 20)), shelf, foot]);
    const turn = affineRotation(0.7);
    const later = [foot, shelf, side, drawn(hole(50, 50, 20))].map((one) => ({
      ...one,
      path: transformPath(transformPath(one.path, turn), affineMove({ x: 100, y: -40 })),
    }));
    const { unchanged, changed, added, removed } = compareRevisions(before, find(later));
    expect(unchanged.map((pair) => pair.before).sort()).toEqual(["A", "B", "C"]);
    expect([changed, added, removed]).toEqual([[], [], []]);
  });

  it("tell a hole that moved by 10 mm, where it was and where it is", () => {
    const before = find([side, drawn(hole(100, 100, 20)), shelf]);
    const after = find([side, drawn(hole(110, 100, 20)), shelf]);
    const { unchanged, changed } = compareRevisions(before, after);
    expect(unchanged).toMatchObject([{ before: "B", after: "B" }]);
    expect(changed).toMatchObject([{ before: "A", after: "A" }]);
    // Circles of radius 10 about centres 10 apart: a far point is 10 from the other circle.
    expect(changed[0].deviation).toBeCloseTo(10, 1);
    expect(changed[0].at.length).toBeGreaterThan(0);
    for (const { x, y } of changed[0].at) expect(Math.hypot(x - 105, y - 100)).toBeLessThan(16);
  });

  it("tell a part made 7 mm longer at its end, those added and those removed", () => {
    const longer = drawn(rectangle(0, 0, 607, 400));
    const disc = drawn(hole(1000, 1000, 300));
    const { changed, added, removed } = compareRevisions(find([side, foot]), find([longer, disc]));
    expect(changed).toHaveLength(1);
    expect(changed[0].deviation).toBeCloseTo(7, 6);
    for (const { x } of changed[0].at) expect(x).toBeGreaterThan(599);
    expect(added).toEqual(["B"]);
    expect(removed).toEqual(["B"]);
  });
});

describe("letters", () => {
  it("stay with parts that survive a larger one put before them; new parts take unused ones", () => {
    const before = find([side, shelf, foot]);
    const door = drawn(
      ring([
        [2000, 0],
        [3000, 0],
        [3000, 900],
        [2000, 700],
      ]),
    );
    const kept = keepLetters(before, find([door, side, foot]));
    expect(kept.parts.map(({ id, name, area }) => [id, name, area])).toEqual([
      ["D", "D", 800_000],
      ["A", "A", 240_000],
      ["C", "C", 8000],
    ]);
  });

  it("and names written once stay with the part when the text is gone", () => {
    const texts = [{ text: "Left side", at: { x: 300, y: 200 }, height: 10, layer: "0" }];
    const before = findParts(drawingOf([side, foot], { texts }), { layers: [] });
    expect(keepLetters(before, find([side, foot])).parts.map(({ name }) => name)).toEqual(["Left side", "B"]);
  });
});
