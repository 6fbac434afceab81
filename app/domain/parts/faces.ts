import {
  type Curve,
  cross,
  endOf,
  normaliseAngle,
  type Point,
  pathArea,
  pointAt,
  startOf,
  subtract,
  tangentAt,
} from "../geometry";
import { type EndGraph, edgeOf, type HalfEdge, otherWay } from "./end-graph";

/** Directions nearer than this are the same; the curves' bending then tells which lies to the left. */
const SAME_DIRECTION = 1e-6;
/** The share of a curve's parameter from which its bending at the end is taken. */
const SHORT_WAY = 1e-3;

interface Leaving {
  readonly half: HalfEdge;
  /** Direction of leaving, [0, 2π). */
  readonly angle: number;
  /** Signed curvature, positive to the left. */
  readonly bend: number;
}

/**
 * Boundaries of the bounded faces that the edges of `within` make in the plane, counter-clockwise. Every edge
 * must lie on a ring of such edges, and edges may meet at nodes only. A face whose area is at most
 * `sliver` times the length of its boundary is none.
 */
export function faceBoundaries(graph: EndGraph, within: readonly number[], sliver: number): HalfEdge[][] {
  const isWithin = new Set(within);
  const onward = new Map<HalfEdge, HalfEdge>();
  const nodes = new Set(within.flatMap((edge) => [graph.edges[edge].from, graph.edges[edge].to]));
  for (const node of nodes) {
    const around = inTurn(
      graph.leaving[node].filter((half) => isWithin.has(edgeOf(half))).map((half) => leave(graph, half)),
    );
    // Arriving by the other way of an edge, the face on the left goes on by the next edge clockwise.
    for (let i = 0; i < around.length; i++) {
      onward.set(otherWay(around[i].half), around[(i + around.length - 1) % around.length].half);
    }
  }
  const boundaries: HalfEdge[][] = [];
  const walked = new Set<HalfEdge>();
  for (const edge of within) {
    for (const start of [2 * edge, 2 * edge + 1]) {
      if (walked.has(start)) continue;
      const boundary: HalfEdge[] = [];
      for (
        let half: HalfEdge | undefined = start;
        half !== undefined && !walked.has(half);
        half = onward.get(half)
      ) {
        walked.add(half);
        boundary.push(half);
      }
      const path = graph.pathOf(boundary, true);
      const reach = path.curves.reduce((sum, curve) => sum + chord(curve), 0);
      if (pathArea(path) > sliver * reach) boundaries.push(boundary);
    }
  }
  return boundaries;
}

const chord = (curve: Curve): number => {
  const middle = pointAt(curve, 0.5);
  const from = startOf(curve);
  const to = endOf(curve);
  return Math.hypot(middle.x - from.x, middle.y - from.y) + Math.hypot(to.x - middle.x, to.y - middle.y);
};

function leave(graph: EndGraph, half: HalfEdge): Leaving {
  const { curves } = graph.edges[edgeOf(half)].path;
  const back = (half & 1) === 1;
  const curve = back ? curves[curves.length - 1] : curves[0];
  const tangent = tangentAt(curve, back ? 1 : 0);
  const from = back ? endOf(curve) : startOf(curve);
  const step = subtract(pointAt(curve, back ? 1 - SHORT_WAY : SHORT_WAY), from);
  const sense = back ? -1 : 1;
  const isStill = Math.hypot(tangent.x, tangent.y) === 0;
  const direction: Point = isStill ? step : { x: tangent.x * sense, y: tangent.y * sense };
  const size = Math.hypot(direction.x, direction.y) || 1;
  const squared = step.x * step.x + step.y * step.y;
  const bend = curve.kind === "line" || squared === 0 ? 0 : (2 * cross(direction, step)) / (size * squared);
  const angle = normaliseAngle(Math.atan2(direction.y, direction.x));
  return { half, angle: angle > 2 * Math.PI - SAME_DIRECTION / 2 ? angle - 2 * Math.PI : angle, bend };
}

/** Counter-clockwise; of those that leave in one direction the one bending more to the left comes later. */
function inTurn(leaving: Leaving[]): Leaving[] {
  const sorted = [...leaving].sort((p, q) => p.angle - q.angle);
  const turned: Leaving[] = [];
  for (let i = 0; i < sorted.length; ) {
    let j = i + 1;
    while (j < sorted.length && sorted[j].angle - sorted[j - 1].angle <= SAME_DIRECTION) j++;
    turned.push(...sorted.slice(i, j).sort((p, q) => p.bend - q.bend));
    i = j;
  }
  return turned;
}
