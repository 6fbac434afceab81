import type { DrawnPath } from "../drawing";
import { endOf, interpolate, type Path, type Point, pathLength, startOf } from "../geometry";
import { type Edge, EndGraph, edgeOf, edgesOnNoRing, type HalfEdge, walkEdges } from "./end-graph";
import { faceBoundaries } from "./faces";
import { clusterPoints, DisjointSets, pairsWithin } from "./near-points";
import type { Bridge } from "./part";

export interface JoinTolerances {
  /** Ends nearer than this are one node. Millimetres, as all of these. */
  readonly node: number;
  /** Dangling ends up to this far apart are bridged and listed. */
  readonly bridge: number;
  /** Dangling ends up to this far apart are bridged and asked; not more than `bridge` where nothing is to be asked. */
  readonly ask: number;
}

/** Paths joined end to end. `members` are the places of the joined paths in the input. */
export interface Chain {
  readonly path: Path;
  /** The layer that most of its length is drawn on. */
  readonly layer: string;
  readonly length: number;
  readonly members: readonly number[];
}

export interface Joined {
  readonly loops: readonly Chain[];
  readonly open: readonly Chain[];
  readonly bridges: readonly Bridge[];
  /** Nodes where more than two ends meet. */
  readonly branches: number;
}

/** A gap is not bridged between the two ends of a chain shorter than this many times the gap. */
const CHAIN_OVER_GAP = 4;

/**
 * Joins drawn paths into closed loops and open chains, in two stages: ends within `node` are one node; then
 * dangling ends only, nearest first, are bridged by short lines. Where more than two ends meet, the
 * loops are the boundaries of the faces between the paths. A path that is closed in itself is a loop of its own.
 */
export function joinPaths(paths: readonly DrawnPath[], tolerances: JoinTolerances): Joined {
  const lengths = paths.map(({ path }) => pathLength(path));
  const chainOf = (path: Path, members: readonly number[]): Chain => ({
    path,
    members,
    layer: mainLayer(paths, lengths, members),
    length: pathLength(path),
  });

  const loops: Chain[] = [];
  const joinable: number[] = [];
  for (let i = 0; i < paths.length; i++) {
    const { path } = paths[i];
    if (path.curves.length === 0 || lengths[i] <= tolerances.node) continue;
    if (isClosed(path, tolerances.node)) loops.push(chainOf({ ...path, closed: true }, [i]));
    else joinable.push(i);
  }

  const ends = joinable.flatMap((i) => [pathStart(paths[i].path), pathEnd(paths[i].path)]);
  const nodes = clusterPoints(ends, tolerances.node);
  const drawnEdges: Edge[] = joinable.map((i, edge) => ({
    path: paths[i].path,
    from: nodes.of[2 * edge],
    to: nodes.of[2 * edge + 1],
  }));
  const { bridges, edges: bridgeEdges } = bridgeGaps(drawnEdges, nodes.count, ends, tolerances, (edge) => ({
    layer: paths[joinable[edge]].layer,
    length: lengths[joinable[edge]],
  }));

  const graph = new EndGraph([...drawnEdges, ...bridgeEdges], nodes.count);
  const membersOf = (halves: readonly HalfEdge[]) =>
    halves.flatMap((half) => (edgeOf(half) < joinable.length ? [joinable[edgeOf(half)]] : []));
  const offRing = edgesOnNoRing(graph);
  const open = walkEdges(graph, [...offRing]).map(({ halves }) =>
    chainOf(graph.pathOf(halves, false), membersOf(halves)),
  );
  for (const halves of ringsOf(graph, offRing, tolerances.node)) {
    loops.push(chainOf(graph.pathOf(halves, true), membersOf(halves)));
  }
  const branches = graph.leaving.filter((leaving) => leaving.length > 2).length;
  return { loops: inDrawnOrder(loops), open: inDrawnOrder(open), bridges, branches };
}

/** By the first drawn path in each, so that copies are numbered as they were drawn. */
function inDrawnOrder(chains: readonly Chain[]): Chain[] {
  const keyed = chains.map((chain) => ({
    chain,
    first: chain.members.reduce((least, member) => Math.min(least, member), Infinity),
  }));
  return keyed.sort((one, other) => one.first - other.first).map(({ chain }) => chain);
}

export const pathStart = (path: Path): Point => startOf(path.curves[0]);
export const pathEnd = (path: Path): Point => endOf(path.curves[path.curves.length - 1]);

function isClosed(path: Path, tolerance: number): boolean {
  if (path.closed) return true;
  const from = pathStart(path);
  const to = pathEnd(path);
  return Math.hypot(to.x - from.x, to.y - from.y) <= tolerance;
}

function mainLayer(
  paths: readonly DrawnPath[],
  lengths: readonly number[],
  members: readonly number[],
): string {
  const first = paths[members[0]].layer;
  if (members.every((i) => paths[i].layer === first)) return first;
  const byLayer = new Map<string, number>();
  for (const i of members) byLayer.set(paths[i].layer, (byLayer.get(paths[i].layer) ?? 0) + lengths[i]);
  return [...byLayer].reduce((best, next) => (next[1] > best[1] ? next : best))[0];
}

/** Short lines between dangling ends, nearest pair first, each end once. */
function bridgeGaps(
  edges: readonly Edge[],
  nodes: number,
  ends: readonly Point[],
  tolerances: JoinTolerances,
  drawn: (edge: number) => { readonly layer: string; readonly length: number },
): { bridges: Bridge[]; edges: Edge[] } {
  const degrees = new Int32Array(nodes);
  for (const { from, to } of edges) {
    degrees[from]++;
    degrees[to]++;
  }
  const dangling: { point: Point; node: number; edge: number }[] = [];
  for (let end = 0; end < ends.length; end++) {
    const edge = end >> 1;
    const node = end & 1 ? edges[edge].to : edges[edge].from;
    if (degrees[node] === 1) dangling.push({ point: ends[end], node, edge });
  }
  const sets = new DisjointSets(nodes);
  const lengthOf = new Float64Array(nodes);
  const unite = (a: number, b: number, length: number) => {
    const total =
      sets.find(a) === sets.find(b)
        ? lengthOf[sets.find(a)]
        : lengthOf[sets.find(a)] + lengthOf[sets.find(b)];
    sets.join(a, b);
    lengthOf[sets.find(a)] = total + length;
  };
  for (let i = 0; i < edges.length; i++) unite(edges[i].from, edges[i].to, drawn(i).length);

  const reach = Math.max(tolerances.bridge, tolerances.ask);
  const pairs = pairsWithin(
    dangling.map(({ point }) => point),
    reach,
  ).sort((p, q) => p.gap - q.gap || p.a - q.a || p.b - q.b);
  const isTaken = new Uint8Array(dangling.length);
  const found: { bridges: Bridge[]; edges: Edge[] } = { bridges: [], edges: [] };
  for (const { a, b, gap } of pairs) {
    if (isTaken[a] || isTaken[b]) continue;
    const one = dangling[a];
    const other = dangling[b];
    const isOneChain = sets.find(one.node) === sets.find(other.node);
    if (isOneChain && lengthOf[sets.find(one.node)] < CHAIN_OVER_GAP * gap) continue;
    isTaken[a] = isTaken[b] = 1;
    unite(one.node, other.node, gap);
    const line = { kind: "line", from: one.point, to: other.point } as const;
    found.edges.push({ path: { closed: false, curves: [line] }, from: one.node, to: other.node });
    found.bridges.push({
      layer: drawn(one.edge).layer,
      gap,
      at: interpolate(one.point, other.point, 0.5),
      asked: gap > tolerances.bridge,
    });
  }
  return found;
}

/** Plain rings as they are walked; where rings branch, the boundaries of their faces. */
function ringsOf(graph: EndGraph, offRing: ReadonlySet<number>, node: number): HalfEdge[][] {
  const onRing = graph.edges.flatMap((_, edge) => (offRing.has(edge) ? [] : [edge]));
  const degrees = new Int32Array(graph.nodes);
  const sets = new DisjointSets(graph.nodes);
  for (const edge of onRing) {
    const { from, to } = graph.edges[edge];
    degrees[from]++;
    degrees[to]++;
    sets.join(from, to);
  }
  const isBranched = new Set<number>();
  for (let i = 0; i < graph.nodes; i++) if (degrees[i] > 2) isBranched.add(sets.find(i));
  const branched = onRing.filter((edge) => isBranched.has(sets.find(graph.edges[edge].from)));
  const plain = onRing.filter((edge) => !isBranched.has(sets.find(graph.edges[edge].from)));
  return [...ringsWalked(graph, plain), ...faceBoundaries(graph, branched, node)];
}

/** Rings of edges of which just two meet at every node, whatever else hangs there. */
function ringsWalked(graph: EndGraph, plain: readonly number[]): HalfEdge[][] {
  const pending = new Set(plain);
  const rings: HalfEdge[][] = [];
  for (const first of plain) {
    if (!pending.has(first)) continue;
    const ring: HalfEdge[] = [];
    for (let half: HalfEdge | undefined = 2 * first; half !== undefined; ) {
      pending.delete(edgeOf(half));
      ring.push(half);
      half = graph.leaving[graph.head(half)].find((next) => pending.has(edgeOf(next)));
    }
    rings.push(ring);
  }
  return rings;
}
