import { type Curve, curveBox, curveLength, type Path, pointAt } from "../geometry";
import { carriersOf, SAME_CARRIER, type Stretch } from "./carriers";
import type { Overlap } from "./part";

/** Overlaps shorter than this come from rounding, millimetres. */
const SHORTEST_OVERLAP = 0.01;

/**
 * Length of all paths together, what lies on top of each other counted once: stretches of one straight line,
 * arcs of one circle, and other curves that are the same from end to end.
 */
export function lengthWithoutOverlaps(paths: Iterable<Path>): number {
  const carried: { curve: Curve }[] = [];
  const others = new Map<string, number>();
  for (const { curves } of paths) {
    for (const curve of curves) {
      if (curve.kind === "line" || curve.kind === "arc") carried.push({ curve });
      else others.set(keyOf(curve), curveLength(curve));
    }
  }
  let total = 0;
  for (const length of others.values()) total += length;
  for (const { stretches, scale } of carriersOf(carried)) total += scale * coveredMeasure(stretches);
  return total;
}

/** Equal for two curves with the same box and middle to a thousandth of a millimetre, either direction. */
function keyOf(curve: Curve): string {
  const { minX, minY, maxX, maxY } = curveBox(curve);
  const middle = pointAt(curve, 0.5);
  return [minX, minY, maxX, maxY, middle.x, middle.y]
    .map((value) => Math.round(value / SAME_CARRIER))
    .join(" ");
}

const inOrder = <T>(stretches: readonly Stretch<T>[]): Stretch<T>[] =>
  [...stretches].sort((p, q) => p.from - q.from);

function coveredMeasure<T>(stretches: readonly Stretch<T>[]): number {
  let total = 0;
  let reached = -Infinity;
  for (const { from, to } of inOrder(stretches)) {
    if (to <= reached) continue;
    total += to - Math.max(from, reached);
    reached = to;
  }
  return total;
}

/**
 * Where straight lines and arcs of the paths lie on each other: each place once, on the layer of what comes later
 * along the carrier, with the length and the middle of what is doubled.
 */
export function findOverlaps(drawn: readonly { readonly layer: string; readonly path: Path }[]): Overlap[] {
  const curves = drawn.flatMap(({ layer, path }) => path.curves.map((curve) => ({ layer, curve })));
  return carriersOf(curves).flatMap(({ stretches, scale, at }) => {
    const found: Overlap[] = [];
    let reached = -Infinity;
    for (const { from, to, of } of inOrder(stretches)) {
      const end = Math.min(to, reached);
      const length = (end - from) * scale;
      if (length > SHORTEST_OVERLAP) found.push({ layer: of.layer, length, at: at((from + end) / 2) });
      reached = Math.max(reached, to);
    }
    return found;
  });
}
