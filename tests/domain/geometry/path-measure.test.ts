import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  type Affine,
  affineApply,
  affineDeterminant,
  affineRotation,
  arcFromBulge,
  type Curve,
  chordsOfCircle,
  circle,
  curveLength,
  distance,
  distancePointToCurve,
  flattenCurve,
  flattenPath,
  type Path,
  pathArea,
  pathBox,
  pathLength,
  pointAt,
  polygonArea,
  reversePath,
  startOf,
  transformCurve,
  transformPath,
} from "~/domain/geometry";
import { anyCurve, closedPath, fullEllipse, line, polygon, quarterCircleSpline, rectangle } from "./shapes";

const QUARTER_BULGE = Math.tan(Math.PI / 8);

/** 100 x 50 with corners of radius 10, bulges on the corners. */
function roundedRectangle(): Path {
  const corners: [number, number][] = [
    [10, 0],
    [90, 0],
    [100, 10],
    [100, 40],
    [90, 50],
    [10, 50],
    [0, 40],
    [0, 10],
  ];
  const curves = corners.map(([x, y], i): Curve => {
    const [nextX, nextY] = corners[(i + 1) % corners.length];
    const [from, to] = [
      { x, y },
      { x: nextX, y: nextY },
    ];
    return (i % 2 === 1 ? arcFromBulge(from, to, QUARTER_BULGE) : null) ?? { kind: "line", from, to };
  });
  return { curves, closed: true };
}

describe("bulges (tan of a quarter of the included angle, DXF Reference)", () => {
  it("gives the arc of a positive bulge", () => {
    const arc = arcFromBulge({ x: 0, y: 0 }, { x: 10, y: 0 }, 0.5);
    if (!arc) throw new Error("no arc");
    expect((arc.sweep * 180) / Math.PI).toBeCloseTo(106.2602, 4);
    expect(arc.radius).toBeCloseTo(6.25, 12);
    expect(arc.centre).toEqual({ x: expect.closeTo(5, 12), y: expect.closeTo(3.75, 12) });
    expect(curveLength(arc)).toBeCloseTo(11.5912, 4);
    // Counter-clockwise from left to right hangs below its chord.
    expect(pointAt(arc, 0.5)).toEqual({ x: expect.closeTo(5, 12), y: expect.closeTo(-2.5, 12) });
  });

  it("gives the arc of a negative bulge", () => {
    const arc = arcFromBulge({ x: 0, y: 0 }, { x: 10, y: 0 }, -0.5);
    expect(arc?.radius).toBeCloseTo(6.25, 12);
    expect(arc?.centre).toEqual({ x: expect.closeTo(5, 12), y: expect.closeTo(-3.75, 12) });
    expect(arc && pointAt(arc, 1)).toEqual({ x: expect.closeTo(10, 12), y: expect.closeTo(0, 12) });
  });

  it("gives no arc without a bulge or a chord", () => {
    expect(arcFromBulge({ x: 0, y: 0 }, { x: 10, y: 0 }, 0)).toBeNull();
    expect(arcFromBulge({ x: 1, y: 1 }, { x: 1, y: 1 }, 1)).toBeNull();
    expect(arcFromBulge({ x: 0, y: 0 }, { x: 10, y: 0 }, 1e-300)).toBeNull();
  });
});

describe("areas and lengths in closed form", () => {
  it("measures a rounded rectangle", () => {
    // 100·50 - (4 - π)·10², and 2·(80 + 30) + 2π·10.
    expect(pathArea(roundedRectangle())).toBeCloseTo(4914.1593, 4);
    expect(pathLength(roundedRectangle())).toBeCloseTo(282.8319, 4);
    expect(pathBox(roundedRectangle())).toEqual({
      minX: expect.closeTo(0, 9),
      minY: expect.closeTo(0, 9),
      maxX: expect.closeTo(100, 9),
      maxY: expect.closeTo(50, 9),
    });
  });

  it("measures circles, ellipses and a rational quarter disc", () => {
    expect(pathArea(closedPath(circle({ x: 300, y: -40 }, 5)))).toBeCloseTo(78.53982, 5);
    // π a b.
    expect(pathArea(closedPath(fullEllipse(10, 0.5, { x: 900, y: 20 })))).toBeCloseTo(157.0796, 4);
    const quarterDisc = closedPath(quarterCircleSpline, line(0, 1, 0, 0), line(0, 0, 1, 0));
    expect(pathArea(quarterDisc)).toBeCloseTo(Math.PI / 4, 10);
  });

  it("signs by the direction of travel", () => {
    expect(pathArea(rectangle(3, 2))).toBe(6);
    expect(pathArea(reversePath(rectangle(3, 2)))).toBe(-6);
    expect(pathArea(reversePath(roundedRectangle()))).toBeCloseTo(-4914.1593, 4);
  });

  it("closes gaps by straight lines and measures nothing as nothing", () => {
    const open: Path = { curves: [line(0, 0, 4, 0), line(4, 0.1, 4, 3)], closed: false };
    expect(pathArea(open)).toBeCloseTo(6, 12);
    expect(pathArea({ curves: [], closed: false })).toBe(0);
  });
});

describe("chords", () => {
  it("needs as many as the formula says", () => {
    // ⌈2π / 2acos(1 - e/r)⌉ for r 10, e 0.01.
    expect(chordsOfCircle(10, 0.01)).toBe(71);
    expect(flattenPath(closedPath(circle({ x: 0, y: 0 }, 10)), 0.01)).toHaveLength(71);
  });

  it("never needs fewer than three, nor more than a bounded number", () => {
    expect(chordsOfCircle(1, 5)).toBe(3);
    expect(chordsOfCircle(1e9, 1e-9)).toBe(20_000);
  });

  it("stays within the tolerance of every curve", () => {
    fc.assert(
      fc.property(anyCurve, fc.double({ min: 0.01, max: 1, noNaN: true }), (curve, tolerance) => {
        const points = flattenCurve(curve, tolerance);
        expect(distance(points[0], startOf(curve))).toBeLessThan(1e-9);
        for (let i = 0; i <= 40; i++) {
          const p = pointAt(curve, i / 40);
          const off = Math.min(
            ...points.slice(1).map((to, k) => distancePointToCurve({ kind: "line", from: points[k], to }, p)),
          );
          expect(off).toBeLessThanOrEqual(tolerance * (1 + 1e-6));
        }
      }),
      { numRuns: 60 },
    );
  });

  it("encloses nearly the exact area", () => {
    const exact = pathArea(roundedRectangle());
    expect(Math.abs(polygonArea(flattenPath(roundedRectangle(), 1e-4)) - exact)).toBeLessThan(1e-4 * 65);
  });

  it("repeats no point where curves meet", () => {
    expect(flattenPath(polygon([0, 0], [1, 0], [1, 1]), 0.01)).toHaveLength(3);
  });
});

const anyAffine: fc.Arbitrary<Affine> = fc
  .record({
    a: fc.double({ min: -3, max: 3, noNaN: true }),
    b: fc.double({ min: -3, max: 3, noNaN: true }),
    c: fc.double({ min: -3, max: 3, noNaN: true }),
    d: fc.double({ min: -3, max: 3, noNaN: true }),
    e: fc.double({ min: -100, max: 100, noNaN: true }),
    f: fc.double({ min: -100, max: 100, noNaN: true }),
  })
  .filter((affine) => Math.abs(affineDeterminant(affine)) > 0.05);

describe("affine maps", () => {
  it("moves every point of the curve where the map puts it", () => {
    fc.assert(
      fc.property(anyCurve, anyAffine, (curve, affine) => {
        const image = transformCurve(curve, affine);
        for (const t of [0, 0.2, 0.5, 0.9, 1]) {
          expect(distance(pointAt(image, t), affineApply(affine, pointAt(curve, t)))).toBeLessThan(1e-6);
        }
      }),
      { numRuns: 200 },
    );
  });

  it("scales areas by its determinant, mirror images included", () => {
    fc.assert(
      fc.property(anyAffine, (affine) => {
        const before = pathArea(roundedRectangle());
        const after = pathArea(transformPath(roundedRectangle(), affine));
        expect(after).toBeCloseTo(before * affineDeterminant(affine), 5);
      }),
    );
  });

  it("keeps an arc an arc under turning and mirroring, and makes an ellipse of it under uneven scale", () => {
    const arc = circle({ x: 1, y: 2 }, 3);
    expect(transformCurve(arc, affineRotation(0.7)).kind).toBe("arc");
    const mirrored = transformCurve(arc, { a: -1, b: 0, c: 0, d: 1, e: 0, f: 0 });
    expect(mirrored).toMatchObject({ kind: "arc", radius: 3, sweep: -arc.sweep });
    const stretched = transformCurve(arc, { a: 2, b: 0, c: 0, d: 1, e: 0, f: 0 });
    expect(stretched.kind).toBe("ellipse");
    const back = transformCurve(stretched, { a: 0.5, b: 0, c: 0, d: 1, e: 0, f: 0 });
    expect(back).toMatchObject({ kind: "arc", radius: expect.closeTo(3, 12) });
  });
});
