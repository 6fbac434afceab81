import { boxUnion, EMPTY_BOX } from "./box";
import type { Box, Curve, Path, Point } from "./curve";
import { curveBox, curveLength, endOf, reverseCurve, startOf } from "./curve-measure";
import { ellipseMinor } from "./ellipse";
import { cross, subtract } from "./point";
import { splineSweptArea } from "./spline";

/** Sum of the curves' lengths; gaps between curves do not count. */
export const pathLength = (path: Path): number =>
  path.curves.reduce((sum, curve) => sum + curveLength(curve), 0);

export const pathBox = (path: Path): Box =>
  path.curves.reduce((box, curve) => boxUnion(box, curveBox(curve)), EMPTY_BOX);

/** Half the integral of x dy - y dx about `origin`: the area swept by the ray from there. */
function sweptArea(curve: Curve, origin: Point): number {
  switch (curve.kind) {
    case "line":
      return cross(subtract(curve.from, origin), subtract(curve.to, origin)) / 2;
    case "arc":
    case "ellipse": {
      const from = startOf(curve);
      const to = endOf(curve);
      const centre = subtract(curve.centre, origin);
      const twice =
        curve.kind === "arc"
          ? curve.radius * curve.radius * curve.sweep
          : cross(curve.major, ellipseMinor(curve)) * curve.sweep;
      return (twice + cross(centre, subtract(to, from))) / 2;
    }
    case "spline":
      return splineSweptArea(curve, origin);
  }
}

/**
 * Signed area by Green's theorem, counter-clockwise positive; exact but for splines (quadrature). Gaps between
 * curves, and from the last end to the first start, are closed by straight lines.
 */
export function pathArea(path: Path): number {
  if (path.curves.length === 0) return 0;
  const origin = startOf(path.curves[0]);
  let area = 0;
  let last = origin;
  for (const curve of path.curves) {
    area += cross(subtract(last, origin), subtract(startOf(curve), origin)) / 2 + sweptArea(curve, origin);
    last = endOf(curve);
  }
  return area;
}

/** The same path travelled the other way. */
export const reversePath = (path: Path): Path => ({
  closed: path.closed,
  curves: path.curves.map(reverseCurve).reverse(),
});
