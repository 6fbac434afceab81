import { describe, expect, it } from "vitest";
import { findParts } from "~/domain/parts";
import { drawingOf, drawn, exploded, line, rectangle } from "./drawn";

const found = (paths: Parameters<typeof drawingOf>[0]) => findParts(drawingOf(paths), { layers: [] });

/** A square of four lines whose last corner is open by `gap`. */
const openSquare = (gap: number) => [
  line(0, 0, 100, 0),
  line(100, 100, 100, 0),
  line(100, 100, 0, 100),
  line(0, 100, 0, gap),
];

describe("gaps between dangling ends", () => {
  it.each([
    [0.001, false],
    [0.2, false],
    [0.21, true],
    [0.5, true],
  ])("%d mm is bridged, asked: %s", (gap, asked) => {
    const report = found(openSquare(gap));
    expect(report.bridges).toHaveLength(1);
    expect(report.bridges[0]).toMatchObject({ asked, at: { x: 0, y: gap / 2 } });
    expect(report.bridges[0].gap).toBeCloseTo(gap, 12);
    expect(report.totals.parts).toBe(1);
    expect(report.parts[0].outerLength).toBeCloseTo(400, 9);
    expect(report.open).toEqual([]);
    // What is drawn is joined without asking.
    expect(report.drawn).toMatchObject({ loops: asked ? 0 : 1, openChains: asked ? 1 : 0 });
  });

  it("0.51 mm stays open, with its gap", () => {
    const report = found(openSquare(0.51));
    expect(report.parts).toEqual([]);
    expect(report.open).toHaveLength(1);
    expect(report.open[0].gap).toBeCloseTo(0.51, 12);
    expect(report.open[0].length).toBeCloseTo(399.49, 9);
  });

  it("ends within a ten-millionth of the extent need no bridge", () => {
    const report = found(openSquare(0.9e-5));
    expect(report.bridges).toEqual([]);
    expect(report.totals.parts).toBe(1);
  });

  it("the nearest ends go together first", () => {
    // Three ends near one spot: 0.05 apart are bridged, the third finds no partner left.
    const report = found([line(0, 0, 50, 0), line(50.05, 0, 100, 0), line(50, 0.15, 50, 60)]);
    expect(report.bridges).toMatchObject([{ asked: false }]);
    expect(report.bridges[0].gap).toBeCloseTo(0.05, 9);
    expect(report.open).toHaveLength(2);
  });

  it("an end beside the middle of a joined corner is not pulled to it", () => {
    const report = found([...exploded(rectangle(0, 0, 100, 100)), line(0.1, 0.1, 40, 40)]);
    expect(report.bridges).toEqual([]);
    expect(report.totals.parts).toBe(1);
    expect(report.open).toHaveLength(1);
  });

  it("a short stroke is not closed on itself", () => {
    const report = found([drawn(rectangle(10, 10, 50, 50)), line(0, 0, 0.15, 0)]);
    expect(report.bridges).toEqual([]);
    expect(report.drawn.loops).toBe(1);
  });
});

describe("branches", () => {
  it("two neighbours with one line between them are two parts", () => {
    const report = found([
      line(0, 0, 100, 0),
      line(100, 0, 200, 0),
      line(200, 0, 200, 80),
      line(200, 80, 100, 80),
      line(100, 80, 0, 80),
      line(0, 80, 0, 0),
      line(100, 0, 100, 80),
    ]);
    expect(report.drawn).toMatchObject({ branches: 2, loops: 2, openChains: 0 });
    expect(report.totals.parts).toBe(2);
    expect(report.parts).toMatchObject([{ quantity: 2, grossArea: 8000 }]);
    // The line between is cut once: 2 (200 + 80) + 80.
    expect(report.totals.cutLength).toBeCloseTo(640, 9);
  });

  it("a grid of n by n cells is n² parts", () => {
    const n = 7;
    const lines = [];
    for (let i = 0; i <= n; i++) {
      for (let j = 0; j < n; j++)
        lines.push(line(i * 40, j * 40, i * 40, j * 40 + 40), line(j * 40, i * 40, j * 40 + 40, i * 40));
    }
    const report = found(lines);
    expect(report.totals.parts).toBe(n * n);
    expect(report.parts).toMatchObject([{ quantity: n * n }]);
    expect(report.totals.cutLength).toBeCloseTo(2 * n * (n + 1) * 40, 6);
  });

  it("a tail on an outline and a bar between two outlines are open lines", () => {
    const report = found([
      ...exploded(rectangle(0, 0, 100, 100)),
      ...exploded(rectangle(200, 0, 100, 100)),
      line(100, 100, 200, 100),
      line(300, 0, 340, 0),
    ]);
    expect(report.totals.parts).toBe(2);
    expect(report.open.map(({ length }) => length).sort()).toEqual([100, 40]);
  });

  it("arcs that leave a node in one direction are told apart by their bending", () => {
    const arc = (radius: number, sweep: number) =>
      drawn({
        closed: false,
        curves: [{ kind: "arc" as const, centre: { x: 0, y: radius }, radius, start: -Math.PI / 2, sweep }],
      });
    // Two circles of radius 50 and 30 that touch at the origin, each in two arcs, and so share a tangent there.
    const halves = (radius: number) => [arc(radius, Math.PI), arc(radius, -Math.PI)];
    const report = found([...halves(50), ...halves(30)]);
    expect(report.drawn).toMatchObject({ branches: 1, loops: 2 });
    const areas = report.parts.map(({ grossArea }) => grossArea);
    expect(areas[0] + areas[1]).toBeCloseTo(Math.PI * 2500, 6);
    expect(areas[1]).toBeCloseTo(Math.PI * 900, 6);
  });
});
