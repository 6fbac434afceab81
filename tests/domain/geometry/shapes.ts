import * as fc from "fast-check";
import {
  type Arc,
  type Curve,
  type EllipseArc,
  FULL_TURN,
  type Line,
  type Path,
  type Point,
  type Spline,
} from "~/domain/geometry";

/** The same cases in every run. */
fc.configureGlobal({ seed: 20260101 });

export const line = (x0: number, y0: number, x1: number, y1: number): Line => ({
  kind: "line",
  from: { x: x0, y: y0 },
  to: { x: x1, y: y1 },
});

export const closedPath = (...curves: Curve[]): Path => ({ curves, closed: true });

export const polygon = (...points: [number, number][]): Path =>
  closedPath(
    ...points.map(([x, y], i) => {
      const [nextX, nextY] = points[(i + 1) % points.length];
      return line(x, y, nextX, nextY);
    }),
  );

export const rectangle = (width: number, height: number): Path =>
  polygon([0, 0], [width, 0], [width, height], [0, height]);

export const fullEllipse = (a: number, ratio: number, centre: Point = { x: 0, y: 0 }): EllipseArc => ({
  kind: "ellipse",
  centre,
  major: { x: a, y: 0 },
  ratio,
  start: 0,
  sweep: FULL_TURN,
});

/** A quarter circle of radius 1 as a rational quadratic: weights 1, cos 45°, 1 (any text on NURBS). */
export const quarterCircleSpline: Spline = {
  kind: "spline",
  degree: 2,
  knots: [0, 0, 0, 1, 1, 1],
  control: [
    { x: 1, y: 0 },
    { x: 1, y: 1 },
    { x: 0, y: 1 },
  ],
  weights: [1, Math.SQRT1_2, 1],
};

const coordinate = fc.double({ min: -500, max: 500, noNaN: true });
export const anyPoint: fc.Arbitrary<Point> = fc.record({ x: coordinate, y: coordinate });
const anySweep = fc
  .double({ min: 0.05, max: FULL_TURN, noNaN: true })
  .chain((size) => fc.constantFrom(size, -size));
const anyAngle = fc.double({ min: -10, max: 10, noNaN: true });

const anyLine: fc.Arbitrary<Line> = fc.record({
  kind: fc.constant("line" as const),
  from: anyPoint,
  to: anyPoint,
});
const anyArc: fc.Arbitrary<Arc> = fc.record({
  kind: fc.constant("arc" as const),
  centre: anyPoint,
  radius: fc.double({ min: 0.1, max: 300, noNaN: true }),
  start: anyAngle,
  sweep: anySweep,
});
const anyEllipse: fc.Arbitrary<EllipseArc> = fc.record({
  kind: fc.constant("ellipse" as const),
  centre: anyPoint,
  major: anyPoint.filter((p) => Math.hypot(p.x, p.y) > 0.1),
  ratio: fc.double({ min: 0.02, max: 1, noNaN: true }).chain((size) => fc.constantFrom(size, -size)),
  start: anyAngle,
  sweep: anySweep,
});
const anySpline: fc.Arbitrary<Spline> = fc.integer({ min: 2, max: 5 }).chain((degree) =>
  fc.integer({ min: degree + 1, max: degree + 6 }).chain((count) =>
    fc.record({
      kind: fc.constant("spline" as const),
      degree: fc.constant(degree),
      knots: fc.constant(
        Array.from({ length: count + degree + 1 }, (_, i) =>
          Math.min(count - degree, Math.max(0, i - degree)),
        ),
      ),
      control: fc.array(anyPoint, { minLength: count, maxLength: count }),
      weights: fc.option(
        fc.array(fc.double({ min: 0.2, max: 5, noNaN: true }), { minLength: count, maxLength: count }),
      ),
    }),
  ),
);

export const anyCurve: fc.Arbitrary<Curve> = fc.oneof(anyLine, anyArc, anyEllipse, anySpline);
