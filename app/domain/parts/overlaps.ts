import {
  type Arc,
  type Curve,
  cross,
  curveBox,
  curveLength,
  type Line,
  normaliseAngle,
  type Path,
  pointAt,
} from "../geometry";

/** Lines and circles nearer than this carry one cut, millimetres. */
const SAME_CARRIER = 0.001;
/** Directions nearer than this are one, radians: 0.001 mm over a metre. */
const SAME_ANGLE = 1e-6;

interface Stretch {
  readonly from: number;
  readonly to: number;
}

/**
 * Length of all paths together, what lies on top of each other counted once: stretches of one straight line,
 * arcs of one circle, and other curves that are the same from end to end.
 */
export function lengthWithoutOverlaps(paths: Iterable<Path>): number {
  const lines: Line[] = [];
  const arcs: Arc[] = [];
  const others = new Map<string, number>();
  for (const { curves } of paths) {
    for (const curve of curves) {
      if (curve.kind === "line") lines.push(curve);
      else if (curve.kind === "arc") arcs.push(curve);
      else others.set(keyOf(curve), curveLength(curve));
    }
  }
  let total = 0;
  for (const length of others.values()) total += length;
  return total + lengthOfLines(lines) + lengthOfArcs(arcs);
}

/** Equal for two curves with the same box and middle to a thousandth of a millimetre, either direction. */
function keyOf(curve: Curve): string {
  const { minX, minY, maxX, maxY } = curveBox(curve);
  const middle = pointAt(curve, 0.5);
  return [minX, minY, maxX, maxY, middle.x, middle.y]
    .map((value) => Math.round(value / SAME_CARRIER))
    .join(" ");
}

/** Groups of things whose keys differ by at most `reach` from the next one in order. */
function runsOf<T>(things: T[], keyOf: (thing: T) => number, reach: number): T[][] {
  const sorted = things.map((thing) => ({ thing, key: keyOf(thing) })).sort((p, q) => p.key - q.key);
  const runs: T[][] = [];
  for (let i = 0; i < sorted.length; i++) {
    if (i > 0 && sorted[i].key - sorted[i - 1].key <= reach) runs[runs.length - 1].push(sorted[i].thing);
    else runs.push([sorted[i].thing]);
  }
  return runs;
}

const covered = (stretches: Stretch[]): number => {
  const sorted = [...stretches].sort((p, q) => p.from - q.from);
  let total = 0;
  let reached = -Infinity;
  for (const { from, to } of sorted) {
    if (to <= reached) continue;
    total += to - Math.max(from, reached);
    reached = to;
  }
  return total;
};

function lengthOfLines(lines: readonly Line[]): number {
  const directed = lines.flatMap((line) => {
    const dx = line.to.x - line.from.x;
    const dy = line.to.y - line.from.y;
    const size = Math.hypot(dx, dy);
    if (size === 0) return [];
    // An undirected line's angle in [0, π); just under π is just under 0.
    const turned = Math.atan2(dy, dx);
    const half = turned < 0 ? turned + Math.PI : turned;
    return [{ line, angle: half > Math.PI - SAME_ANGLE ? half - Math.PI : half }];
  });
  let total = 0;
  for (const parallel of runsOf(directed, ({ angle }) => angle, SAME_ANGLE)) {
    const { angle } = parallel[0];
    const along = { x: Math.cos(angle), y: Math.sin(angle) };
    for (const carried of runsOf(parallel, ({ line }) => cross(along, line.from), SAME_CARRIER)) {
      total += covered(
        carried.map(({ line }) => {
          const a = line.from.x * along.x + line.from.y * along.y;
          const b = line.to.x * along.x + line.to.y * along.y;
          return { from: Math.min(a, b), to: Math.max(a, b) };
        }),
      );
    }
  }
  return total;
}

function lengthOfArcs(arcs: readonly Arc[]): number {
  let total = 0;
  for (const column of runsOf([...arcs], ({ centre }) => centre.x, SAME_CARRIER)) {
    for (const spot of runsOf(column, ({ centre }) => centre.y, SAME_CARRIER)) {
      for (const circle of runsOf(spot, ({ radius }) => radius, SAME_CARRIER))
        total += lengthOnCircle(circle);
    }
  }
  return total;
}

function lengthOnCircle(arcs: readonly Arc[]): number {
  const turn = 2 * Math.PI;
  const stretches = arcs.flatMap((arc) => {
    const from = normaliseAngle(arc.sweep < 0 ? arc.start + arc.sweep : arc.start);
    const to = from + Math.min(turn, Math.abs(arc.sweep));
    return to <= turn
      ? [{ from, to }]
      : [
          { from, to: turn },
          { from: 0, to: to - turn },
        ];
  });
  return arcs[0].radius * covered(stretches);
}
