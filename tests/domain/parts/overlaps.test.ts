import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { DrawnPath } from "~/domain/drawing";
import { type Arc, affineRotation, transformPath } from "~/domain/geometry";
import { findParts } from "~/domain/parts";
import { drawingOf, drawn, exploded, line, rectangle } from "./drawn";

fc.configureGlobal({ seed: 20260104 });

const find = (paths: readonly DrawnPath[]) => findParts(drawingOf(paths), { layers: [] });

const arc = (start: number, sweep: number, radius = 50): DrawnPath => {
  const curve: Arc = { kind: "arc", centre: { x: 0, y: 0 }, radius, start, sweep };
  return drawn({ closed: false, curves: [curve] });
};

describe("lines that partly lie on each other", () => {
  /** A rectangle of 100 by 40 whose lower edge is drawn as two lines that overlap by 20. */
  const doubled = [
    line(0, 0, 60, 0),
    line(40, 0, 100, 0),
    line(100, 0, 100, 40),
    line(100, 40, 0, 40),
    line(0, 40, 0, 0),
  ];

  it("still close an outline, cut once, while what is drawn counts in full", () => {
    const { parts, open, totals, drawn } = find(doubled);
    expect(open).toEqual([]);
    expect(parts).toMatchObject([{ quantity: 1, outerLength: 280, area: 4000 }]);
    expect(totals.cutLength).toBeCloseTo(280, 9);
    expect(drawn).toMatchObject({ length: 300, uniqueLength: 300 });
  });

  it("close it wherever the overlap is and however all is turned", () => {
    const share = fc.double({ min: 0.1, max: 0.9, noNaN: true });
    fc.assert(
      fc.property(share, share, fc.double({ min: 0, max: 6.28, noNaN: true }), (one, other, turn) => {
        const [from, to] = [Math.min(one, other) * 100, Math.max(one, other) * 100];
        const paths = [line(0, 0, to, 0), line(100, 0, from, 0), ...doubled.slice(2)];
        const affine = affineRotation(turn);
        const turned = paths.map((path) => ({ ...path, path: transformPath(path.path, affine) }));
        const { parts, totals, open } = find(turned);
        expect(open).toEqual([]);
        expect(parts).toHaveLength(1);
        expect(parts[0].area).toBeCloseTo(4000, 5);
        expect(totals.cutLength).toBeCloseTo(280, 5);
      }),
      { numRuns: 40 },
    );
  });
});

describe("arcs of one circle that partly lie on each other", () => {
  it("make one disc, each stretch cut once", () => {
    // Three arcs of 150 degrees, each 30 degrees on the next.
    const third = (2 * Math.PI) / 3;
    const sweep = (150 / 180) * Math.PI;
    const { parts, open, totals, drawn } = find([arc(0, sweep), arc(third, sweep), arc(2 * third, sweep)]);
    expect(open).toEqual([]);
    expect(parts).toHaveLength(1);
    expect(parts[0].area).toBeCloseTo(Math.PI * 2500, 6);
    expect(totals.cutLength).toBeCloseTo(2 * Math.PI * 50, 6);
    expect(drawn.length).toBeCloseTo(3 * 50 * sweep, 9);
  });
});

describe("neighbours that share an edge", () => {
  it("are parts each, the shared stretch found and priced once", () => {
    const { parts, overlaps, totals } = find([
      drawn(rectangle(0, 0, 100, 100)),
      drawn(rectangle(100, 20, 50, 60), "SMALL"),
    ]);
    expect(parts.map(({ area }) => area)).toEqual([10_000, 3000]);
    expect(overlaps).toEqual([
      {
        layer: "SMALL",
        length: expect.closeTo(60, 9),
        at: { x: expect.closeTo(100, 9), y: expect.closeTo(50, 9) },
      },
    ]);
    expect(totals.cutLength).toBeCloseTo(400 + 220 - 60, 9);
  });

  it("are parts each where they are loose lines of different lengths", () => {
    const { parts, open, totals } = find([
      ...exploded(rectangle(0, 0, 100, 100)),
      ...exploded(rectangle(100, 20, 50, 60)),
    ]);
    expect(open).toEqual([]);
    expect(parts.map(({ area }) => area)).toEqual([10_000, 3000]);
    expect(totals.cutLength).toBeCloseTo(560, 9);
  });

  it("no overlap is told where lines only touch or cross", () => {
    expect(find([drawn(rectangle(0, 0, 100, 100)), drawn(rectangle(200, 0, 100, 100))]).overlaps).toEqual([]);
    expect(find([drawn(rectangle(0, 0, 100, 100)), line(0, 50, 0, 150)]).overlaps).toEqual([]);
  });
});
