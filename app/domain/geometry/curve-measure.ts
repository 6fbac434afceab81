import { arcPoint, sweepCrossings } from "./arc";
import { boxOfPoints } from "./box";
import type { Box, Curve, Point } from "./curve";
import { ellipseExtremes, ellipseLength, ellipsePoint, ellipseTangent } from "./ellipse";
import { distance, subtract } from "./point";
import { splineBox, splineDomain, splineLength, splinePoint, splineTangent } from "./spline";

/** Exact for lines and arcs; for ellipses and splines to 1e-9 of their size, 1e-6 where a spline has a cusp. */
export function curveLength(curve: Curve): number {
  switch (curve.kind) {
    case "line":
      return distance(curve.from, curve.to);
    case "arc":
      return curve.radius * Math.abs(curve.sweep);
    case "ellipse":
      return ellipseLength(curve);
    case "spline":
      return splineLength(curve);
  }
}

/** The point at the share `t` of the curve's own parameter, 0 its start and 1 its end. */
export function pointAt(curve: Curve, t: number): Point {
  switch (curve.kind) {
    case "line":
      return {
        x: curve.from.x * (1 - t) + curve.to.x * t,
        y: curve.from.y * (1 - t) + curve.to.y * t,
      };
    case "arc":
      return arcPoint(curve, curve.start + curve.sweep * t);
    case "ellipse":
      return ellipsePoint(curve, curve.start + curve.sweep * t);
    case "spline": {
      const [from, to] = splineDomain(curve);
      return splinePoint(curve, from + (to - from) * t);
    }
  }
}

/** Derivative of `pointAt` by `t`: the direction of travel, its length the speed. */
export function tangentAt(curve: Curve, t: number): Point {
  switch (curve.kind) {
    case "line":
      return subtract(curve.to, curve.from);
    case "arc": {
      const angle = curve.start + curve.sweep * t;
      const speed = curve.radius * curve.sweep;
      return { x: -Math.sin(angle) * speed, y: Math.cos(angle) * speed };
    }
    case "ellipse": {
      const tangent = ellipseTangent(curve, curve.start + curve.sweep * t);
      return { x: tangent.x * curve.sweep, y: tangent.y * curve.sweep };
    }
    case "spline": {
      const [from, to] = splineDomain(curve);
      const tangent = splineTangent(curve, from + (to - from) * t);
      return { x: tangent.x * (to - from), y: tangent.y * (to - from) };
    }
  }
}

export const startOf = (curve: Curve): Point => pointAt(curve, 0);
export const endOf = (curve: Curve): Point => pointAt(curve, 1);

/** The same curve travelled the other way. */
export function reverseCurve(curve: Curve): Curve {
  switch (curve.kind) {
    case "line":
      return { kind: "line", from: curve.to, to: curve.from };
    case "arc":
    case "ellipse":
      return { ...curve, start: curve.start + curve.sweep, sweep: -curve.sweep };
    case "spline": {
      const sum = curve.knots[0] + curve.knots[curve.knots.length - 1];
      return {
        ...curve,
        knots: curve.knots.map((knot) => sum - knot).reverse(),
        control: [...curve.control].reverse(),
        weights: curve.weights && [...curve.weights].reverse(),
      };
    }
  }
}

/** Axis-parallel box by exact extremes; a spline's to 1e-12 of its size. */
export function curveBox(curve: Curve): Box {
  switch (curve.kind) {
    case "line":
      return boxOfPoints([curve.from, curve.to]);
    case "arc": {
      const quarters = sweepCrossings(curve.start, curve.sweep, 0, Math.PI / 2);
      return boxOfPoints([startOf(curve), endOf(curve), ...quarters.map((angle) => arcPoint(curve, angle))]);
    }
    case "ellipse": {
      const extremes = [...ellipseExtremes(curve, "x"), ...ellipseExtremes(curve, "y")];
      return boxOfPoints([startOf(curve), endOf(curve), ...extremes.map((u) => ellipsePoint(curve, u))]);
    }
    case "spline":
      return splineBox(curve);
  }
}
