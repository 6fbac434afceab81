import type { DrawnPath } from "../drawing";
import { type Arc, type Curve, distance, endOf, type Line, type Point, startOf } from "../geometry";
import { type Carrier, carriersOf, SAME_CARRIER } from "./carriers";

interface Held {
  readonly curve: Curve;
  readonly path: number;
}

/**
 * Open paths whose lines or arcs lie partly on each other, divided at each other's ends, so that what is doubled is
 * an equal curve and is dropped as one, and the rest still joins. Paths that lie on nothing are kept as they are;
 * closed ones are outlines already.
 */
export function splitOverlaps(paths: readonly DrawnPath[]): readonly DrawnPath[] {
  const held = paths.flatMap(({ path }, place): Held[] =>
    path.closed ? [] : path.curves.map((curve) => ({ curve, path: place })),
  );
  const cuts = new Map<Curve, Point[]>();
  for (const carrier of carriersOf(held)) addCuts(carrier, cuts);
  if (cuts.size === 0) return paths;
  return paths.flatMap((drawn) => {
    const { curves, closed } = drawn.path;
    if (closed || !curves.some((curve) => cuts.has(curve))) return [drawn];
    return curves
      .flatMap((curve) => divide(curve, cuts.get(curve) ?? []))
      .map((curve) => ({ ...drawn, path: { closed: false, curves: [curve] } }));
  });
}

/** For every curve on the carrier the ends of those that it overlaps, where they lie inside it. */
function addCuts({ stretches, scale }: Carrier<Held>, cuts: Map<Curve, Point[]>): void {
  const sorted = [...stretches].sort((p, q) => p.from - q.from);
  const slack = SAME_CARRIER / scale;
  for (let i = 0; i < sorted.length; i++) {
    for (let j = i + 1; j < sorted.length && sorted[j].from < sorted[i].to - slack; j++) {
      const [one, other] = [sorted[i].of.curve, sorted[j].of.curve];
      if (one === other) continue;
      cutAt(one, other, cuts);
      cutAt(other, one, cuts);
    }
  }
}

function cutAt(curve: Curve, by: Curve, cuts: Map<Curve, Point[]>): void {
  for (const end of [startOf(by), endOf(by)]) {
    const share = shareOf(curve, end);
    const inside = share * curveSize(curve);
    if (inside <= SAME_CARRIER || inside >= curveSize(curve) - SAME_CARRIER) continue;
    const held = cuts.get(curve) ?? [];
    if (held.every((point) => distance(point, end) > SAME_CARRIER)) cuts.set(curve, [...held, end]);
  }
}

const curveSize = (curve: Curve): number =>
  curve.kind === "arc" ? Math.abs(curve.sweep) * curve.radius : distance(startOf(curve), endOf(curve));

/** How far along the curve a point on its carrier lies, as a share; outside [0, 1] beyond its ends. */
function shareOf(curve: Curve, point: Point): number {
  if (curve.kind === "line") return shareOfLine(curve, point);
  return curve.kind === "arc" ? shareOfArc(curve, point) : -1;
}

function shareOfLine({ from, to }: Line, point: Point): number {
  const dx = to.x - from.x;
  const dy = to.y - from.y;
  return ((point.x - from.x) * dx + (point.y - from.y) * dy) / (dx * dx + dy * dy);
}

function shareOfArc({ centre, start, sweep }: Arc, point: Point): number {
  const turn = 2 * Math.PI;
  const angle = (Math.atan2(point.y - centre.y, point.x - centre.x) - start) * Math.sign(sweep);
  return (angle - turn * Math.floor(angle / turn)) / Math.abs(sweep);
}

function divide(curve: Curve, at: readonly Point[]): Curve[] {
  if (at.length === 0) return [curve];
  const inOrder = at
    .map((point) => ({ point, share: shareOf(curve, point) }))
    .sort((p, q) => p.share - q.share);
  if (curve.kind === "line") {
    const points = [curve.from, ...inOrder.map(({ point }) => point), curve.to];
    return points.slice(1).map((to, i) => ({ kind: "line", from: points[i], to }));
  }
  if (curve.kind !== "arc") return [curve];
  const shares = [0, ...inOrder.map(({ share }) => share), 1];
  return shares.slice(1).map((share, i) => ({
    ...curve,
    start: curve.start + curve.sweep * shares[i],
    sweep: curve.sweep * (share - shares[i]),
  }));
}
