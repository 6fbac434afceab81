import { type Path, reversePath } from "../geometry";

/** One path as an edge between two nodes. */
export interface Edge {
  readonly path: Path;
  readonly from: number;
  readonly to: number;
}

/**
 * An edge as it is travelled: `2 · edge` from its first end, `2 · edge + 1` from its last. The other way is
 * the lowest bit turned.
 */
export type HalfEdge = number;

export const edgeOf = (half: HalfEdge): number => half >> 1;
export const otherWay = (half: HalfEdge): HalfEdge => half ^ 1;

/** Nodes and edges, with the half-edges that leave each node; an edge from a node to itself leaves it twice. */
export class EndGraph {
  readonly leaving: readonly HalfEdge[][];

  constructor(
    readonly edges: readonly Edge[],
    readonly nodes: number,
  ) {
    this.leaving = Array.from({ length: nodes }, () => []);
    for (let edge = 0; edge < edges.length; edge++) {
      this.leaving[edges[edge].from].push(2 * edge);
      this.leaving[edges[edge].to].push(2 * edge + 1);
    }
  }

  tail(half: HalfEdge): number {
    const edge = this.edges[edgeOf(half)];
    return half & 1 ? edge.to : edge.from;
  }

  head(half: HalfEdge): number {
    return this.tail(otherWay(half));
  }

  /** Half-edges joined end to end, in the sense that they are travelled. */
  pathOf(halves: readonly HalfEdge[], closed: boolean): Path {
    const curves = halves.flatMap((half) => {
      const { path } = this.edges[edgeOf(half)];
      return half & 1 ? reversePath(path).curves : path.curves;
    });
    return { closed, curves };
  }
}

/** A run of half-edges end to end. */
export interface Walk {
  readonly halves: readonly HalfEdge[];
  readonly closed: boolean;
}

/**
 * Walks the edges of `within` end to end. A walk stops where not just two edges of the whole graph meet and
 * where its edges leave `within`; a ring comes out closed. Each edge is walked once.
 */
export function walkEdges(graph: EndGraph, within: readonly number[]): Walk[] {
  const pending = new Set(within);
  const onward = (half: HalfEdge): HalfEdge | null => {
    const leaving = graph.leaving[graph.head(half)];
    if (leaving.length !== 2) return null;
    const next = leaving[0] === otherWay(half) ? leaving[1] : leaving[0];
    return pending.has(edgeOf(next)) ? next : null;
  };
  const walks: Walk[] = [];
  const walkFrom = (start: HalfEdge) => {
    const halves: HalfEdge[] = [];
    for (let half: HalfEdge | null = start; half !== null; half = onward(half)) {
      pending.delete(edgeOf(half));
      halves.push(half);
    }
    const home = graph.tail(start);
    const last = halves[halves.length - 1];
    walks.push({ halves, closed: graph.head(last) === home && graph.leaving[home].length === 2 });
  };
  const isEnd = (half: HalfEdge) => {
    const leaving = graph.leaving[graph.tail(half)];
    if (leaving.length !== 2) return true;
    const before = leaving[0] === half ? leaving[1] : leaving[0];
    return !pending.has(edgeOf(before)) && edgeOf(before) !== edgeOf(half);
  };
  for (const edge of within) {
    for (const half of [2 * edge, 2 * edge + 1]) if (pending.has(edge) && isEnd(half)) walkFrom(half);
  }
  for (const edge of within) if (pending.has(edge)) walkFrom(2 * edge);
  return walks;
}

/**
 * The edges on no ring: those whose removal parts the graph, dangling ones among them (R. E. Tarjan, "A note on
 * finding the bridges of a graph", 1974, with a stack in place of recursion).
 */
export function edgesOnNoRing(graph: EndGraph): Set<number> {
  const found = new Set<number>();
  const order = new Int32Array(graph.nodes).fill(-1);
  const lowest = new Int32Array(graph.nodes);
  let count = 0;
  for (let root = 0; root < graph.nodes; root++) {
    if (order[root] >= 0) continue;
    order[root] = lowest[root] = count++;
    const stack: { node: number; by: HalfEdge; next: number }[] = [{ node: root, by: -1, next: 0 }];
    for (let top = stack.at(-1); top; top = stack.at(-1)) {
      const { node, by } = top;
      if (top.next < graph.leaving[node].length) {
        const half = graph.leaving[node][top.next++];
        if (by >= 0 && half === otherWay(by)) continue;
        const head = graph.head(half);
        if (order[head] >= 0) {
          lowest[node] = Math.min(lowest[node], order[head]);
        } else {
          order[head] = lowest[head] = count++;
          stack.push({ node: head, by: half, next: 0 });
        }
        continue;
      }
      stack.pop();
      if (by < 0) continue;
      const parent = graph.tail(by);
      lowest[parent] = Math.min(lowest[parent], lowest[node]);
      if (lowest[node] > order[parent]) found.add(edgeOf(by));
    }
  }
  return found;
}
