import { arcFromBulge, type Curve, type Point } from "../geometry";

/** The segments between vertices, arcs where there is a bulge; segments without length are left out. */
export function polylineCurves(
  vertices: readonly Point[],
  bulges: readonly number[],
  closed: boolean,
): Curve[] {
  const curves: Curve[] = [];
  const segments = closed ? vertices.length : vertices.length - 1;
  for (let i = 0; i < segments; i++) {
    const from = vertices[i];
    const to = vertices[(i + 1) % vertices.length];
    if (from.x === to.x && from.y === to.y) continue;
    curves.push(arcFromBulge(from, to, bulges[i] ?? 0) ?? { kind: "line", from, to });
  }
  return curves;
}
