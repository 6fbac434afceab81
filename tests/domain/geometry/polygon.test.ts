import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  circle,
  containsPoint,
  convexHull,
  distancePointToCurve,
  flattenPath,
  interiorPoint,
  type Path,
  type Point,
  polygonArea,
  polygonCentroid,
  polygonContains,
  rotate,
  smallestRectangle,
} from "~/domain/geometry";
import { anyPoint, closedPath, fullEllipse, line, polygon, quarterCircleSpline, rectangle } from "./shapes";

const points = (...pairs: [number, number][]): Point[] => pairs.map(([x, y]) => ({ x, y }));

describe("polygons", () => {
  it("gives area and centre of an L", () => {
    // Two rectangles: 4 x 1 about (2, 0.5) and 1 x 2 about (0.5, 2); area 6, centre (1.5, 1).
    const corner = points([0, 0], [4, 0], [4, 1], [1, 1], [1, 3], [0, 3]);
    expect(polygonArea(corner)).toBe(6);
    expect(polygonCentroid(corner)).toEqual({ x: expect.closeTo(1.5, 12), y: expect.closeTo(1, 12) });
  });

  it("gives the mean where there is no area", () => {
    expect(polygonCentroid(points([0, 0], [2, 2]))).toEqual({ x: 1, y: 1 });
  });
});

describe("convex hull", () => {
  it("keeps corners only", () => {
    expect(convexHull(points([0, 0], [2, 0], [1, 0], [2, 2], [0, 2], [1, 1]))).toEqual(
      points([0, 0], [2, 0], [2, 2], [0, 2]),
    );
  });

  it("copes with one point, two points and a straight row", () => {
    expect(convexHull(points([1, 1]))).toEqual(points([1, 1]));
    expect(smallestRectangle(points([0, 0], [3, 4])).long).toBe(5);
    expect(smallestRectangle(points([0, 0], [1, 1], [3, 3], [2, 2]))).toMatchObject({
      long: expect.closeTo(3 * Math.SQRT2, 12),
      short: expect.closeTo(0, 12),
      angle: expect.closeTo(Math.PI / 4, 12),
    });
    expect(smallestRectangle([])).toMatchObject({ long: 0, short: 0 });
  });

  it("leaves no point outside", () => {
    fc.assert(
      fc.property(fc.array(anyPoint, { minLength: 3, maxLength: 60 }), (cloud) => {
        const hull = convexHull(cloud);
        for (const p of cloud) {
          for (const [i, from] of hull.entries()) {
            const to = hull[(i + 1) % hull.length];
            const side = (to.x - from.x) * (p.y - from.y) - (to.y - from.y) * (p.x - from.x);
            expect(side).toBeGreaterThanOrEqual(-1e-6);
          }
        }
      }),
    );
  });
});

describe("smallest rectangle", () => {
  it("finds a rectangle at any turn", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 6.3, noNaN: true }), (angle) => {
        const turned = points([0, 0], [40, 0], [40, 25], [20, 30], [0, 25]).map((p) => rotate(p, angle));
        const found = smallestRectangle(turned);
        expect(found.long).toBeCloseTo(40, 9);
        expect(found.short).toBeCloseTo(30, 9);
      }),
    );
  });

  it("is never beaten by a rectangle at another angle", () => {
    fc.assert(
      fc.property(
        fc.array(anyPoint, { minLength: 3, maxLength: 40 }),
        fc.double({ min: 0, max: 3.15, noNaN: true }),
        (cloud, angle) => {
          const turned = cloud.map((p) => rotate(p, angle));
          const width = Math.max(...turned.map((p) => p.x)) - Math.min(...turned.map((p) => p.x));
          const height = Math.max(...turned.map((p) => p.y)) - Math.min(...turned.map((p) => p.y));
          const best = smallestRectangle(cloud);
          expect(best.long * best.short).toBeLessThanOrEqual(width * height * (1 + 1e-9) + 1e-6);
        },
      ),
    );
  });
});

describe("containment", () => {
  it("is exact to the curve, where chords would be wrong", () => {
    const disc = closedPath(circle({ x: 0, y: 0 }, 100));
    expect(containsPoint(disc, { x: 0, y: 99.9999999 })).toBe(true);
    expect(containsPoint(disc, { x: 70.710678, y: 70.710678 })).toBe(true);
    expect(containsPoint(disc, { x: 70.710679, y: 70.710679 })).toBe(false);
    const oval = closedPath(fullEllipse(10, 0.5));
    expect(containsPoint(oval, { x: 0, y: 4.999999 })).toBe(true);
    expect(containsPoint(oval, { x: 0, y: 5.000001 })).toBe(false);
    const quarterDisc = closedPath(quarterCircleSpline, line(0, 1, 0, 0), line(0, 0, 1, 0));
    expect(containsPoint(quarterDisc, { x: Math.SQRT1_2 - 1e-5, y: Math.SQRT1_2 - 1e-5 })).toBe(true);
    expect(containsPoint(quarterDisc, { x: Math.SQRT1_2 + 1e-5, y: Math.SQRT1_2 + 1e-5 })).toBe(false);
  });

  it("counts corners on the level of the point once", () => {
    const diamond = polygon([0, -1], [1, 0], [0, 1], [-1, 0]);
    expect(containsPoint(diamond, { x: 0, y: 0 })).toBe(true);
    expect(containsPoint(diamond, { x: -2, y: 0 })).toBe(false);
    expect(containsPoint(diamond, { x: -2, y: 1 })).toBe(false);
  });

  it("agrees with the polygon of the same corners", () => {
    fc.assert(
      fc.property(fc.array(anyPoint, { minLength: 3, maxLength: 12 }), anyPoint, (corners, p) => {
        const path = polygon(...corners.map(({ x, y }): [number, number] => [x, y]));
        expect(containsPoint(path, p)).toBe(polygonContains(corners, p));
      }),
    );
  });

  it("closes gaps", () => {
    const gapped: Path = {
      curves: [line(0, 0, 10, 0), line(10, 0.1, 10, 10), line(10, 10, 0, 10), line(0, 10, 0, 0.2)],
      closed: true,
    };
    expect(containsPoint(gapped, { x: 5, y: 5 })).toBe(true);
    expect(containsPoint(gapped, { x: -5, y: 0.1 })).toBe(false);
  });
});

describe("a point inside", () => {
  const isInside = (outer: Path, holes: Path[], p: Point | null) =>
    p !== null && containsPoint(outer, p) && holes.every((hole) => !containsPoint(hole, p));

  it("is found in a thin ring", () => {
    const outer = closedPath(circle({ x: 0, y: 0 }, 10));
    const holes = [closedPath(circle({ x: 0, y: 0 }, 9.5))];
    expect(isInside(outer, holes, interiorPoint(outer, holes, 0.01))).toBe(true);
  });

  it("is found in a U and among many holes, away from the edges", () => {
    const u = polygon([0, 0], [30, 0], [30, 30], [29, 30], [29, 1], [1, 1], [1, 30], [0, 30]);
    expect(isInside(u, [], interiorPoint(u, [], 0.01))).toBe(true);
    const plate = rectangle(100, 100);
    const holes = Array.from({ length: 81 }, (_, i) =>
      closedPath(circle({ x: 10 + (i % 9) * 10, y: 10 + Math.floor(i / 9) * 10 }, 4)),
    );
    const found = interiorPoint(plate, holes, 0.01);
    expect(isInside(plate, holes, found)).toBe(true);
    const edges = [plate, ...holes].flatMap(({ curves }) => curves);
    expect(
      Math.min(...edges.map((edge) => distancePointToCurve(edge, found ?? { x: 0, y: 0 }))),
    ).toBeGreaterThan(0.5);
  });

  it("is found in a sliver that no even level meets", () => {
    const sliver = polygon([0, 0], [100, 100], [100, 100.001]);
    expect(isInside(sliver, [], interiorPoint(sliver, [], 1e-4))).toBe(true);
  });

  it("is none where nothing is enclosed", () => {
    expect(interiorPoint({ curves: [line(0, 0, 5, 0)], closed: false }, [], 0.01)).toBeNull();
    expect(interiorPoint(rectangle(10, 10), [rectangle(10, 10)], 0.01)).toBeNull();
  });

  it("is inside any star", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 1, max: 100, noNaN: true }), { minLength: 3, maxLength: 30 }),
        fc.double({ min: 0, max: 6, noNaN: true }),
        (radii, turn) => {
          const star = polygon(
            ...radii.map((radius, i): [number, number] => {
              const angle = turn + (i / radii.length) * 2 * Math.PI;
              return [radius * Math.cos(angle), radius * Math.sin(angle)];
            }),
          );
          const found = interiorPoint(star, [], 1e-3);
          expect(found && polygonContains(flattenPath(star, 1e-3), found)).toBe(true);
        },
      ),
    );
  });
});
