import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  boxContains,
  boxOfPoints,
  type Curve,
  circle,
  curveBox,
  curveLength,
  distance,
  distancePointToCurve,
  endOf,
  pointAt,
  reverseCurve,
  type Spline,
  startOf,
  tangentAt,
} from "~/domain/geometry";
import { anyCurve, anyPoint, fullEllipse, line, quarterCircleSpline } from "./shapes";

const sampled = (curve: Curve, count: number) =>
  Array.from({ length: count + 1 }, (_, i) => pointAt(curve, i / count));
const chordSum = (curve: Curve, count: number) => {
  const points = sampled(curve, count);
  return points.slice(1).reduce((sum, p, i) => sum + distance(points[i], p), 0);
};

describe("lengths in closed form", () => {
  it("measures lines and arcs exactly", () => {
    expect(curveLength(line(0, 0, 3, 4))).toBe(5);
    expect(curveLength(circle({ x: 7, y: -2 }, 5))).toBeCloseTo(10 * Math.PI, 12);
    expect(curveLength({ kind: "arc", centre: { x: 0, y: 0 }, radius: 2, start: 3, sweep: -0.5 })).toBe(1);
  });

  it("measures an ellipse by quadrature", () => {
    // Perimeter of half-axes 10 and 5 by numeric integration: 48.4422.
    expect(curveLength(fullEllipse(10, 0.5))).toBeCloseTo(48.4422, 4);
    // Complete elliptic integral: 4 a E(m) with E(3/4) = 1.2110560275684594 (Abramowitz & Stegun, table 17.1).
    expect(curveLength(fullEllipse(10, 0.5))).toBeCloseTo(40 * 1.2110560275684594, 9);
    // A flat ellipse is its long axis there and back.
    expect(curveLength(fullEllipse(10, 1e-7))).toBeCloseTo(40, 6);
    expect(curveLength(fullEllipse(3, 1))).toBeCloseTo(6 * Math.PI, 10);
  });

  it("measures a rational spline that is a quarter circle", () => {
    expect(curveLength(quarterCircleSpline)).toBeCloseTo(Math.PI / 2, 9);
  });

  it("measures a parabola", () => {
    // y = x² over [0, 1]: √5/2 + asinh(2)/4.
    const parabola: Spline = {
      kind: "spline",
      degree: 2,
      knots: [0, 0, 0, 1, 1, 1],
      control: [
        { x: 0, y: 0 },
        { x: 0.5, y: 0 },
        { x: 1, y: 1 },
      ],
      weights: null,
    };
    expect(curveLength(parabola)).toBeCloseTo(Math.sqrt(5) / 2 + Math.asinh(2) / 4, 9);
  });
});

describe("points on curves", () => {
  it("takes ellipse parameters for parameters, not polar angles", () => {
    // DXF Reference, ELLIPSE start and end parameter: at π/4 of half-axes 10 and 5.
    const { x, y } = pointAt(fullEllipse(10, 0.5), 1 / 8);
    expect([x, y, (Math.atan2(y, x) * 180) / Math.PI]).toEqual([
      expect.closeTo(7.07107, 5),
      expect.closeTo(3.53553, 5),
      expect.closeTo(26.56505, 5),
    ]);
  });

  it("honours weights", () => {
    // Textbook NURBS: the middle of a quarter circle; without weights it would be (0.75, 0.75).
    expect(pointAt(quarterCircleSpline, 0.5)).toEqual({
      x: expect.closeTo(Math.SQRT1_2, 12),
      y: expect.closeTo(Math.SQRT1_2, 12),
    });
  });

  it("evaluates a cubic by its Bernstein polynomials", () => {
    const cubic: Spline = {
      kind: "spline",
      degree: 3,
      knots: [0, 0, 0, 0, 1, 1, 1, 1],
      control: [
        { x: 0, y: 0 },
        { x: 0, y: 10 },
        { x: 10, y: 10 },
        { x: 10, y: 0 },
      ],
      weights: null,
    };
    expect(pointAt(cubic, 0.5)).toEqual({ x: 5, y: 7.5 });
    expect(curveBox(cubic)).toEqual({ minX: 0, minY: 0, maxX: 10, maxY: expect.closeTo(7.5, 9) });
  });
});

describe("boxes", () => {
  it("finds the extremes of arcs and turned ellipses", () => {
    const arc: Curve = {
      kind: "arc",
      centre: { x: 1, y: 1 },
      radius: 2,
      start: -Math.PI / 4,
      sweep: Math.PI,
    };
    expect(curveBox(arc)).toEqual({
      minX: expect.closeTo(1 - Math.SQRT2, 12),
      minY: expect.closeTo(1 - Math.SQRT2, 12),
      maxX: 3,
      maxY: 3,
    });
    // Half-width of an ellipse turned by t is √(a² cos² t + b² sin² t); at 45° with axes 10 and 5, √62.5.
    const turned: Curve = { ...fullEllipse(10, 0.5), major: { x: 10 * Math.SQRT1_2, y: 10 * Math.SQRT1_2 } };
    expect(curveBox(turned).maxX).toBeCloseTo(Math.sqrt(62.5), 12);
    expect(curveBox(turned).minY).toBeCloseTo(-Math.sqrt(62.5), 12);
  });

  it("holds every point of the curve and nothing to spare", () => {
    fc.assert(
      fc.property(anyCurve, (curve) => {
        const box = curveBox(curve);
        const inner = boxOfPoints(sampled(curve, 200));
        const size = Math.max(box.maxX - box.minX, box.maxY - box.minY, 1e-6);
        const loose = {
          minX: box.minX - 1e-9 * size,
          minY: box.minY - 1e-9 * size,
          maxX: box.maxX + 1e-9 * size,
          maxY: box.maxY + 1e-9 * size,
        };
        expect(boxContains(loose, inner)).toBe(true);
        // Between samples a curve gets no farther than its longest step.
        const step = sampled(curve, 200).reduce(
          (most, p, i, all) => Math.max(most, i === 0 ? 0 : distance(p, all[i - 1])),
          0,
        );
        expect(box.maxX - inner.maxX).toBeLessThanOrEqual(step);
        expect(inner.minY - box.minY).toBeLessThanOrEqual(step);
      }),
      { numRuns: 200 },
    );
  });
});

describe("any curve", () => {
  it("is as long as its chords in the limit", () => {
    fc.assert(
      fc.property(anyCurve, (curve) => {
        const length = curveLength(curve);
        const chords = chordSum(curve, 4000);
        expect(chords).toBeLessThanOrEqual(length * (1 + 1e-6) + 1e-9);
        expect(chords).toBeGreaterThanOrEqual(length * (1 - 1e-3));
      }),
      { numRuns: 150 },
    );
  });

  it("keeps its length and points when travelled the other way", () => {
    fc.assert(
      fc.property(anyCurve, fc.double({ min: 0, max: 1, noNaN: true }), (curve, t) => {
        const back = reverseCurve(curve);
        expect(distance(startOf(back), endOf(curve))).toBeLessThan(1e-7);
        expect(distance(pointAt(back, 1 - t), pointAt(curve, t))).toBeLessThan(1e-6);
        expect(curveLength(back)).toBeCloseTo(curveLength(curve), 6);
      }),
      { numRuns: 150 },
    );
  });

  it("has the tangent its points say it has", () => {
    fc.assert(
      fc.property(anyCurve, fc.double({ min: 0.01, max: 0.989, noNaN: true }), (curve, t) => {
        const step = 1e-6;
        const [p, q] = [pointAt(curve, t), pointAt(curve, t + step)];
        const tangent = tangentAt(curve, t + step / 2);
        const speed = Math.hypot(tangent.x, tangent.y);
        expect(distance({ x: p.x + tangent.x * step, y: p.y + tangent.y * step }, q)).toBeLessThan(
          1e-4 * step * Math.max(speed, 1000),
        );
      }),
      { numRuns: 150 },
    );
  });
});

describe("distance from a point", () => {
  it("is exact for lines and arcs", () => {
    expect(distancePointToCurve(line(0, 0, 10, 0), { x: 4, y: 3 })).toBe(3);
    expect(distancePointToCurve(line(0, 0, 10, 0), { x: 13, y: 4 })).toBe(5);
    const quarter: Curve = { kind: "arc", centre: { x: 0, y: 0 }, radius: 5, start: 0, sweep: Math.PI / 2 };
    expect(distancePointToCurve(quarter, { x: 3, y: 4 })).toBeCloseTo(0, 12);
    expect(distancePointToCurve(quarter, { x: 5, y: -2 })).toBeCloseTo(2, 12);
    expect(distancePointToCurve(quarter, { x: 0, y: 0 })).toBe(5);
  });

  it("agrees with sampling for every curve", () => {
    fc.assert(
      fc.property(anyCurve, anyPoint, (curve, point) => {
        const found = distancePointToCurve(curve, point, 1e-7);
        const samples = sampled(curve, 3000);
        const nearest = Math.min(...samples.map((p) => distance(p, point)));
        const step = samples.reduce(
          (most, p, i) => Math.max(most, i === 0 ? 0 : distance(p, samples[i - 1])),
          0,
        );
        expect(found).toBeLessThanOrEqual(nearest + 1e-6);
        expect(found).toBeGreaterThanOrEqual(nearest - step - 1e-6);
      }),
      { numRuns: 100 },
    );
  });
});
