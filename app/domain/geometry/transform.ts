import { type Affine, affineApply, affineTurn } from "./affine";
import type { Curve, Path } from "./curve";
import { ellipseFromDiameters, ellipseMinor } from "./ellipse";

/**
 * The curve's image. An arc under uneven scale becomes an ellipse, an ellipse that comes out round becomes an
 * arc; a mirror image turns the sweep about, so the direction of travel is kept.
 */
export function transformCurve(curve: Curve, affine: Affine): Curve {
  switch (curve.kind) {
    case "line":
      return { kind: "line", from: affineApply(affine, curve.from), to: affineApply(affine, curve.to) };
    case "arc": {
      const p = affineTurn(affine, { x: curve.radius, y: 0 });
      const q = affineTurn(affine, { x: 0, y: curve.radius });
      return ellipseFromDiameters(affineApply(affine, curve.centre), p, q, curve.start, curve.sweep);
    }
    case "ellipse": {
      const p = affineTurn(affine, curve.major);
      const q = affineTurn(affine, ellipseMinor(curve));
      return ellipseFromDiameters(affineApply(affine, curve.centre), p, q, curve.start, curve.sweep);
    }
    case "spline":
      return { ...curve, control: curve.control.map((p) => affineApply(affine, p)) };
  }
}

export const transformPath = (path: Path, affine: Affine): Path => ({
  closed: path.closed,
  curves: path.curves.map((curve) => transformCurve(curve, affine)),
});
