import {
  type Box,
  type Curve,
  distance,
  distancePointToCurve,
  type Path,
  type Point,
  pathBox,
  pathLength,
  pointAt,
  reversePath,
} from "../geometry";
import type { Outline } from "./outline";

/** Shares of a curve's parameter at which two curves are compared; both ends and three points between. */
const COMPARED_AT = [0, 0.25, 0.5, 0.75, 1];

/** Whether two curves run through the same points from start to end. */
function curvesAgree(one: Curve, other: Curve, tolerance: number): boolean {
  return COMPARED_AT.every((t) => distance(pointAt(one, t), pointAt(other, t)) <= tolerance);
}

const isFullCircle = ({ curves, closed }: Path): boolean =>
  closed && curves.length === 1 && curves[0].kind === "arc" && Math.abs(curves[0].sweep) > 2 * Math.PI - 1e-9;

function circlesAgree(one: Path, other: Path, tolerance: number): boolean {
  const [a] = one.curves;
  const [b] = other.curves;
  if (a.kind !== "arc" || b.kind !== "arc") return false;
  return distance(a.centre, b.centre) <= tolerance && Math.abs(a.radius - b.radius) <= tolerance;
}

function agreesFrom(one: Path, other: Path, offset: number, tolerance: number): boolean {
  const count = one.curves.length;
  return one.curves.every((curve, i) => curvesAgree(curve, other.curves[(i + offset) % count], tolerance));
}

/** The same curves in the same order, travelled either way and, where closed, begun anywhere. */
export function pathsAgree(one: Path, other: Path, tolerance: number): boolean {
  const count = one.curves.length;
  if (count !== other.curves.length || count === 0) return false;
  if (isFullCircle(one) && isFullCircle(other)) return circlesAgree(one, other, tolerance);
  const isRing = one.closed && other.closed;
  const start = pointAt(one.curves[0], 0);
  for (const candidate of [other, reversePath(other)]) {
    for (let offset = 0; offset < (isRing ? count : 1); offset++) {
      if (distance(start, pointAt(candidate.curves[offset], 0)) > tolerance) continue;
      if (agreesFrom(one, candidate, offset, tolerance)) return true;
    }
  }
  return false;
}

/** Cells of values that may differ by `tolerance`: a value is looked up in its cell and the nearer neighbour. */
function cellsOf(value: number, tolerance: number): [number, number] {
  const cell = Math.floor(value / (tolerance * 4));
  const within = value / (tolerance * 4) - cell;
  return [cell, within < 0.5 ? cell - 1 : cell + 1];
}

/**
 * For each path the place of an earlier one that is the same within `tolerance`, or -1. Compared are only paths
 * whose box and length agree.
 */
export function findDuplicates(paths: readonly { readonly path: Path }[], tolerance: number): Int32Array {
  const earlier = new Int32Array(paths.length).fill(-1);
  const held = new Map<string, number[]>();
  const lengths = paths.map(({ path }) => pathLength(path));
  const boxes = paths.map(({ path }) => pathBox(path));
  const slack = tolerance * 4;
  for (let i = 0; i < paths.length; i++) {
    if (paths[i].path.curves.length === 0) continue;
    const middle = middleOf(boxes[i]);
    const [x, nearX] = cellsOf(middle.x, tolerance);
    const [y, nearY] = cellsOf(middle.y, tolerance);
    for (const key of [`${x} ${y}`, `${nearX} ${y}`, `${x} ${nearY}`, `${nearX} ${nearY}`]) {
      const same = held.get(key)?.find((j) => {
        const lengthsAgree = Math.abs(lengths[i] - lengths[j]) <= slack * paths[i].path.curves.length;
        return (
          lengthsAgree &&
          boxesAgree(boxes[i], boxes[j], slack) &&
          pathsAgree(paths[j].path, paths[i].path, tolerance)
        );
      });
      if (same !== undefined) {
        earlier[i] = same;
        break;
      }
    }
    if (earlier[i] >= 0) continue;
    const key = `${x} ${y}`;
    const cell = held.get(key);
    if (cell) cell.push(i);
    else held.set(key, [i]);
  }
  return earlier;
}

const middleOf = (box: Box): Point => ({ x: (box.minX + box.maxX) / 2, y: (box.minY + box.maxY) / 2 });

const boxesAgree = (one: Box, other: Box, tolerance: number): boolean =>
  Math.abs(one.minX - other.minX) <= tolerance &&
  Math.abs(one.minY - other.minY) <= tolerance &&
  Math.abs(one.maxX - other.maxX) <= tolerance &&
  Math.abs(one.maxY - other.maxY) <= tolerance;

/** Outlines without those that run where an earlier one runs, however each is divided into curves. */
export function distinctOutlines(outlines: readonly Outline[], tolerance: number): Outline[] {
  const held = new Map<string, Outline[]>();
  const slack = Math.max(tolerance * 4, 1e-9);
  return outlines.filter((outline) => {
    const middle = middleOf(outline.box);
    const [x, nearX] = cellsOf(middle.x, slack);
    const [y, nearY] = cellsOf(middle.y, slack);
    const isRepeated = [`${x} ${y}`, `${nearX} ${y}`, `${x} ${nearY}`, `${nearX} ${nearY}`].some((key) =>
      held.get(key)?.some((other) => outlinesAgree(outline, other, slack)),
    );
    if (!isRepeated) held.set(`${x} ${y}`, [...(held.get(`${x} ${y}`) ?? []), outline]);
    return !isRepeated;
  });
}

function outlinesAgree(one: Outline, other: Outline, tolerance: number): boolean {
  if (!boxesAgree(one.box, other.box, tolerance)) return false;
  if (Math.abs(one.length - other.length) > tolerance * (one.path.curves.length + other.path.curves.length))
    return false;
  if (Math.abs(one.area - other.area) > tolerance * one.length) return false;
  const isOn = (point: Point, path: Path) =>
    path.curves.some((curve) => distancePointToCurve(curve, point) <= tolerance);
  return (
    one.path.curves.every(
      (curve) => isOn(pointAt(curve, 0.5), other.path) && isOn(pointAt(curve, 0), other.path),
    ) &&
    other.path.curves.every(
      (curve) => isOn(pointAt(curve, 0.5), one.path) && isOn(pointAt(curve, 0), one.path),
    )
  );
}
