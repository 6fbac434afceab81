import {
  type Affine,
  affineCompose,
  affineMove,
  affineRotation,
  affineScale,
  type Curve,
  distance,
  ellipseFromDiameters,
  endOf,
  FULL_TURN,
  magnitude,
  type Path,
  type Point,
  perpendicular,
  scale,
  startOf,
  sweepIsFull,
  transformPath,
} from "../geometry";
import { type EntityContent, type GroupNumbers, refused } from "./entity-content";
import { flatPlacement } from "./extrusion";
import { polylineCurves } from "./polyline-curves";
import { splineCurves } from "./spline-curves";

const RADIANS = Math.PI / 180;

/** Rise over run below which a thing counts as lying flat: its length is then off by less than 1e-6. */
const FLAT_SLOPE = 1e-3;

/** A whole ellipse is often written as 0 to 6.283185: within this of a full turn it is one. */
const FULL_TURN_SLACK = 1e-5;

const point = (numbers: GroupNumbers, code: number): Point => ({
  x: numbers.first(code, 0),
  y: numbers.first(code + 10, 0),
});

/** Whether heights, absent ones zero, vary no more than the flat slope allows over a thing of this extent. */
function isFlat(heights: readonly number[], points: readonly Point[]): boolean {
  if (heights.length === 0) return true;
  let low = heights.length < points.length ? 0 : Infinity;
  let high = heights.length < points.length ? 0 : -Infinity;
  for (const z of heights) {
    low = Math.min(low, z);
    high = Math.max(high, z);
  }
  const first = points[0];
  const reach = points.reduce((most, p) => Math.max(most, distance(first, p)), 0);
  return high - low <= FLAT_SLOPE * reach;
}

const placement = (numbers: GroupNumbers): Affine | null =>
  flatPlacement({ x: numbers.first(210, 0), y: numbers.first(220, 0), z: numbers.first(230, 1) });

/** Puts curves drawn in an object's own plane into the world's; refuses a plane at an angle. */
function placed(numbers: GroupNumbers, path: Path): EntityContent {
  const into = placement(numbers);
  if (!into) return refused("three-dimensional");
  return { kind: "path", path: into.a === 1 ? path : transformPath(path, into) };
}

/** Curves end to end; closed when told so or when the ends meet within 1e-9 of the largest coordinate. */
function joined(curves: readonly Curve[], closed = false): Path {
  const start = startOf(curves[0]);
  const end = endOf(curves[curves.length - 1]);
  const size = Math.max(Math.abs(start.x), Math.abs(start.y), Math.abs(end.x), Math.abs(end.y));
  const meets = curves.length > 1 && distance(start, end) <= 1e-9 * size;
  return { curves, closed: closed || meets };
}

function readLine(numbers: GroupNumbers): EntityContent {
  const from = point(numbers, 10);
  const to = point(numbers, 11);
  if (!isFlat([numbers.first(30, 0), numbers.first(31, 0)], [from, to])) return refused("three-dimensional");
  if (distance(from, to) === 0) return refused("not-a-curve");
  return { kind: "path", path: { curves: [{ kind: "line", from, to }], closed: false } };
}

function readArc(numbers: GroupNumbers): EntityContent {
  const radius = numbers.first(40, 0);
  if (!(radius > 0)) return refused("damaged");
  const start = numbers.first(50, 0) * RADIANS;
  const span = ((numbers.first(51, 360) - numbers.first(50, 0)) * RADIANS) % FULL_TURN;
  const sweep = span <= 1e-12 ? span + FULL_TURN : span;
  const closed = sweepIsFull(sweep);
  return placed(numbers, {
    curves: [{ kind: "arc", centre: point(numbers, 10), radius, start, sweep: closed ? FULL_TURN : sweep }],
    closed,
  });
}

/** Centre and major axis are in world coordinates; a downward extrusion turns the minor axis over. */
function readEllipse(numbers: GroupNumbers): EntityContent {
  const centre = point(numbers, 10);
  const major = point(numbers, 11);
  const into = placement(numbers);
  if (!into || Math.abs(numbers.first(31, 0)) > FLAT_SLOPE * magnitude(major))
    return refused("three-dimensional");
  const ratio = Math.abs(numbers.first(40, 1));
  if (magnitude(major) === 0 || ratio === 0) return refused("damaged");
  const start = numbers.first(41, 0);
  const span = (numbers.first(42, FULL_TURN) - start) % FULL_TURN;
  const sweep = span <= FULL_TURN_SLACK ? span + FULL_TURN : span;
  const closed = Math.abs(sweep - FULL_TURN) <= FULL_TURN_SLACK;
  const minor = scale(perpendicular(major), ratio * into.a);
  const curve = ellipseFromDiameters(centre, major, minor, start, closed ? FULL_TURN : sweep);
  return { kind: "path", path: { curves: [curve], closed } };
}

/** LWPOLYLINE and POLYLINE; a 3D polyline (code 70, bit 8) is in world coordinates and must lie flat. */
function readPolyline(numbers: GroupNumbers): EntityContent {
  const ys = numbers.all(20);
  const vertices = numbers.all(10).map((x, index) => ({ x, y: ys[index] }));
  const flags = numbers.first(70, 0);
  const isWorld = (flags & 8) !== 0;
  if (isWorld && !isFlat(numbers.all(30), vertices)) return refused("three-dimensional");
  const closed = (flags & 1) !== 0;
  const curves = polylineCurves(vertices, numbers.all(42), closed);
  if (curves.length === 0) return refused("not-a-curve");
  const path = joined(curves, closed);
  return isWorld ? { kind: "path", path } : placed(numbers, path);
}

function readSpline(numbers: GroupNumbers): EntityContent {
  const list = (code: number) => {
    const ys = numbers.all(code + 10);
    return {
      points: numbers.all(code).map((x, i) => ({ x, y: ys[i] ?? Number.NaN })),
      heights: numbers.all(code + 20),
    };
  };
  const control = list(10);
  const fit = list(11);
  if ([...control.points, ...fit.points].some(({ y }) => Number.isNaN(y))) return refused("damaged");
  if (!isFlat(control.heights, control.points) || !isFlat(fit.heights, fit.points)) {
    return refused("three-dimensional");
  }
  const curves = splineCurves({
    degree: Math.trunc(numbers.first(71, 3)),
    flags: Math.trunc(numbers.first(70, 0)),
    knots: numbers.all(40),
    weights: numbers.all(41),
    control: control.points,
    fit: fit.points,
    startTangent: numbers.all(12).length > 0 ? point(numbers, 12) : null,
    endTangent: numbers.all(13).length > 0 ? point(numbers, 13) : null,
  });
  if (curves === null) return refused("damaged");
  if (curves.length === 0) return refused("not-a-curve");
  const start = startOf(curves[0]);
  const end = endOf(curves[curves.length - 1]);
  const reach = [...control.points, ...fit.points].reduce((most, p) => Math.max(most, distance(start, p)), 0);
  return { kind: "path", path: { curves, closed: distance(start, end) <= 1e-9 * reach } };
}

/** The block is scaled, set on its place in the array, turned and moved; all of it in the insert's own plane. */
function readInsert(numbers: GroupNumbers): EntityContent {
  const into = placement(numbers);
  if (!into) return refused("three-dimensional");
  const [scaleX, scaleY] = [numbers.first(41, 1), numbers.first(42, 1)];
  if (scaleX === 0 || scaleY === 0) return refused("damaged");
  const turn = affineRotation(numbers.first(50, 0) * RADIANS);
  const stand = affineCompose(into, affineCompose(affineMove(point(numbers, 10)), turn));
  const size = affineScale(scaleX, scaleY);
  const [stepX, stepY] = [numbers.first(44, 0), numbers.first(45, 0)];
  const place = (column: number, row: number, base: Point) =>
    [affineMove({ x: column * stepX, y: row * stepY }), size, affineMove(scale(base, -1))].reduce(
      affineCompose,
      stand,
    );
  const columns = Math.max(1, Math.trunc(numbers.first(70, 1)));
  const rows = Math.max(1, Math.trunc(numbers.first(71, 1)));
  return { kind: "insert", insert: { place, columns, rows } };
}

/** One reader per entity type that becomes curves. */
export const ENTITY_READERS: ReadonlyMap<string, (numbers: GroupNumbers) => EntityContent> = new Map([
  ["LINE", readLine],
  ["CIRCLE", readArc],
  ["ARC", readArc],
  ["ELLIPSE", readEllipse],
  ["LWPOLYLINE", readPolyline],
  ["POLYLINE", readPolyline],
  ["SPLINE", readSpline],
  ["INSERT", readInsert],
]);
