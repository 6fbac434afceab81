/** Plane curves and what can be measured of them. Lengths are in the caller's unit, angles in radians. */
export {
  type Affine,
  affineApply,
  affineCompose,
  affineDeterminant,
  affineMove,
  affineRotation,
  affineScale,
  affineTurn,
  IDENTITY,
} from "./affine";
export { arcFromBulge, arcPoint, circle, FULL_TURN, normaliseAngle, sweepContains, sweepIsFull } from "./arc";
export {
  boxContains,
  boxExtent,
  boxesOverlap,
  boxHeight,
  boxIsEmpty,
  boxOfPoints,
  boxUnion,
  boxWidth,
  distancePointToBox,
  EMPTY_BOX,
} from "./box";
export { containsPoint, interiorPoint } from "./containment";
export type { Arc, Box, Curve, EllipseArc, Line, Path, Point, Spline } from "./curve";
export { distancePointToCurve } from "./curve-distance";
export { curveBox, curveLength, endOf, pointAt, reverseCurve, startOf, tangentAt } from "./curve-measure";
export { ellipseFromDiameters, ellipseMinor } from "./ellipse";
export { chordsOfCircle, flattenCurve, flattenPath } from "./flatten";
export { pathArea, pathBox, pathLength, reversePath } from "./path-measure";
export {
  add,
  angleOf,
  cross,
  distance,
  distanceToSegment,
  dot,
  interpolate,
  magnitude,
  ORIGIN,
  perpendicular,
  rotate,
  scale,
  subtract,
} from "./point";
export {
  convexHull,
  polygonArea,
  polygonCentroid,
  polygonContains,
  type Rectangle,
  smallestRectangle,
} from "./polygon";
export { splineIsSound } from "./spline";
export { transformCurve, transformPath } from "./transform";
