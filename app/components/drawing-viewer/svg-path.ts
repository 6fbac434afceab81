import {
  type Curve,
  distance,
  ellipseMinor,
  endOf,
  flattenCurve,
  magnitude,
  type Path,
  type Point,
  pointAt,
  startOf,
} from "~/domain/geometry";

/** Splines are drawn as chords this close, in millimetres: under a pixel at twenty times life size. */
const SPLINE_TOLERANCE = 0.02;
/** Curves of one path further apart than this are joined by a visible line, in millimetres. */
const SAME_POINT = 1e-6;

const number = (value: number): string => String(Math.round(value * 1e4) / 1e4 || 0);
const pair = (point: Point): string => `${number(point.x)} ${number(point.y)}`;

/**
 * SVG path text of a path in its own coordinates, y up; the group that shows it turns y. Arcs and elliptic arcs
 * stay exact; splines become chords.
 */
export function pathToSvg(path: Path, tolerance = SPLINE_TOLERANCE): string {
  const steps: string[] = [];
  let at: Point | null = null;
  for (const curve of path.curves) {
    const start = startOf(curve);
    if (at === null) steps.push(`M${pair(start)}`);
    else if (distance(at, start) > SAME_POINT) steps.push(`L${pair(start)}`);
    steps.push(curveSteps(curve, tolerance));
    at = endOf(curve);
  }
  return at === null ? "" : `${steps.join("")}${path.closed ? "Z" : ""}`;
}

function curveSteps(curve: Curve, tolerance: number): string {
  switch (curve.kind) {
    case "line":
      return `L${pair(curve.to)}`;
    case "arc": {
      const radius = number(curve.radius);
      return arcSteps(curve, `A${radius} ${radius} 0`, curve.sweep > 0);
    }
    case "ellipse": {
      const turn = (Math.atan2(curve.major.y, curve.major.x) * 180) / Math.PI;
      const radii = `${number(magnitude(curve.major))} ${number(magnitude(ellipseMinor(curve)))}`;
      return arcSteps(curve, `A${radii} ${number(turn)}`, curve.sweep > 0 === curve.ratio > 0);
    }
    case "spline":
      return flattenCurve(curve, tolerance)
        .slice(1)
        .map((point) => `L${pair(point)}`)
        .join("");
  }
}

/**
 * Arcs near or over a half turn go in two halves: a half turn's centre hangs on the last digit of its ends, and
 * SVG leaves out an arc that ends where it began.
 */
function arcSteps(
  curve: Extract<Curve, { kind: "arc" | "ellipse" }>,
  head: string,
  positive: boolean,
): string {
  const halves = Math.abs(curve.sweep) > 3 ? [0.5, 1] : [1];
  return halves.map((t) => `${head} 0 ${positive ? 1 : 0} ${pair(pointAt(curve, t))}`).join("");
}
