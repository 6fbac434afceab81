import { type Arc, type Curve, cross, type Line, normaliseAngle, type Point } from "../geometry";

/** Lines and circles nearer than this carry one cut, millimetres. */
export const SAME_CARRIER = 0.001;
/** Directions nearer than this are one, radians: 0.001 mm over a metre. */
const SAME_ANGLE = 1e-6;

/** Where a curve lies on its carrier: a line's measure along it in millimetres, an arc's angle in [0, 2π]. */
export interface Stretch<T> {
  readonly from: number;
  readonly to: number;
  readonly of: T;
}

/** A straight line or a circle with all that is drawn on it. */
export interface Carrier<T> {
  readonly stretches: readonly Stretch<T>[];
  /** Millimetres in one of the measure. */
  readonly scale: number;
  readonly at: (measure: number) => Point;
}

/** The straight lines and circles that lines and arcs lie on; other curves are left out. An arc through the angle 0 lies on its circle in two stretches. */
export function carriersOf<T extends { readonly curve: Curve }>(things: Iterable<T>): Carrier<T>[] {
  const lines: { of: T; line: Line }[] = [];
  const arcs: { of: T; arc: Arc }[] = [];
  for (const of of things) {
    const { curve } = of;
    if (curve.kind === "line") lines.push({ of, line: curve });
    else if (curve.kind === "arc") arcs.push({ of, arc: curve });
  }
  return [...straightCarriers(lines), ...circles(arcs)];
}

/** Groups of things whose keys differ by at most `reach` from the next one in order. */
function runsOf<T>(things: readonly T[], keyOf: (thing: T) => number, reach: number): T[][] {
  const sorted = things.map((thing) => ({ thing, key: keyOf(thing) })).sort((p, q) => p.key - q.key);
  const runs: T[][] = [];
  for (let i = 0; i < sorted.length; i++) {
    if (i > 0 && sorted[i].key - sorted[i - 1].key <= reach) runs[runs.length - 1].push(sorted[i].thing);
    else runs.push([sorted[i].thing]);
  }
  return runs;
}

function straightCarriers<T>(lines: readonly { of: T; line: Line }[]): Carrier<T>[] {
  const directed = lines.flatMap((one) => {
    const dx = one.line.to.x - one.line.from.x;
    const dy = one.line.to.y - one.line.from.y;
    if (dx === 0 && dy === 0) return [];
    // An undirected line's angle in [0, π); just under π is just under 0.
    const turned = Math.atan2(dy, dx);
    const half = turned < 0 ? turned + Math.PI : turned;
    return [{ ...one, angle: half > Math.PI - SAME_ANGLE ? half - Math.PI : half }];
  });
  return runsOf(directed, ({ angle }) => angle, SAME_ANGLE).flatMap((parallel) => {
    const { angle } = parallel[0];
    const along = { x: Math.cos(angle), y: Math.sin(angle) };
    return runsOf(parallel, ({ line }) => cross(along, line.from), SAME_CARRIER).map((carried) => {
      const off = cross(along, carried[0].line.from);
      const measure = ({ x, y }: Point) => x * along.x + y * along.y;
      return {
        scale: 1,
        at: (u: number) => ({ x: u * along.x - off * along.y, y: u * along.y + off * along.x }),
        stretches: carried.map(({ of, line }) => {
          const [a, b] = [measure(line.from), measure(line.to)];
          return { of, from: Math.min(a, b), to: Math.max(a, b) };
        }),
      };
    });
  });
}

function circles<T>(arcs: readonly { of: T; arc: Arc }[]): Carrier<T>[] {
  return runsOf(arcs, ({ arc }) => arc.centre.x, SAME_CARRIER)
    .flatMap((column) => runsOf(column, ({ arc }) => arc.centre.y, SAME_CARRIER))
    .flatMap((spot) => runsOf(spot, ({ arc }) => arc.radius, SAME_CARRIER))
    .map((circle) => {
      const { centre, radius } = circle[0].arc;
      return {
        scale: radius,
        at: (u: number) => ({ x: centre.x + radius * Math.cos(u), y: centre.y + radius * Math.sin(u) }),
        stretches: circle.flatMap(({ of, arc }) => stretchesOfArc(of, arc)),
      };
    });
}

function stretchesOfArc<T>(of: T, { start, sweep }: Arc): Stretch<T>[] {
  const turn = 2 * Math.PI;
  const from = normaliseAngle(sweep < 0 ? start + sweep : start);
  const to = from + Math.min(turn, Math.abs(sweep));
  return to <= turn
    ? [{ of, from, to }]
    : [
        { of, from, to: turn },
        { of, from: 0, to: to - turn },
      ];
}
