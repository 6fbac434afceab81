import type { Point } from "../geometry";

/** Two places in a list of points and how far apart they are. */
export interface Pair {
  readonly a: number;
  readonly b: number;
  readonly gap: number;
}

/** Cells are this many times the reach: most points then lie in one cell only, and few points in each. */
const CELL_OF_REACH = 8;

/** Points met one after another, asked for those met before within a reach. */
class PointGrid {
  private readonly cells = new Map<string, number[]>();
  private readonly cell: number;

  constructor(
    private readonly points: readonly Point[],
    private readonly reach: number,
  ) {
    this.cell = reach > 0 ? reach * CELL_OF_REACH : 1;
  }

  /** Calls `met` for every held point within reach of point `i`. */
  visit(i: number, met: (other: number, gap: number) => void): void {
    const { x, y } = this.points[i];
    const toX = Math.floor((x + this.reach) / this.cell);
    const toY = Math.floor((y + this.reach) / this.cell);
    for (let cx = Math.floor((x - this.reach) / this.cell); cx <= toX; cx++) {
      for (let cy = Math.floor((y - this.reach) / this.cell); cy <= toY; cy++) {
        const held = this.cells.get(`${cx} ${cy}`);
        if (!held) continue;
        for (const other of held) {
          const gap = Math.hypot(x - this.points[other].x, y - this.points[other].y);
          if (gap <= this.reach) met(other, gap);
        }
      }
    }
  }

  hold(i: number): void {
    const key = `${Math.floor(this.points[i].x / this.cell)} ${Math.floor(this.points[i].y / this.cell)}`;
    const held = this.cells.get(key);
    if (held) held.push(i);
    else this.cells.set(key, [i]);
  }
}

/** Partners kept of each point: a bound on memory where thousands of ends crowd together. */
const MOST_PARTNERS = 16;

/** Pairs of points at most `reach` apart; of a point with many such neighbours the nearest sixteen met before it. */
export function pairsWithin(points: readonly Point[], reach: number): Pair[] {
  const pairs: Pair[] = [];
  const grid = new PointGrid(points, reach);
  for (let i = 0; i < points.length; i++) {
    let near: Pair[] = [];
    grid.visit(i, (other, gap) => {
      near.push({ a: other, b: i, gap });
      if (near.length >= 2 * MOST_PARTNERS) near = nearest(near);
    });
    pairs.push(...nearest(near));
    grid.hold(i);
  }
  return pairs;
}

const nearest = (pairs: Pair[]): Pair[] =>
  pairs.length <= MOST_PARTNERS ? pairs : pairs.sort((p, q) => p.gap - q.gap).slice(0, MOST_PARTNERS);

/** Sets that grow together; `find` names the set of a member. */
export class DisjointSets {
  private readonly parents: Int32Array;

  constructor(size: number) {
    this.parents = Int32Array.from({ length: size }, (_, i) => i);
  }

  find(member: number): number {
    let root = member;
    while (this.parents[root] !== root) root = this.parents[root];
    for (let at = member; this.parents[at] !== root; ) {
      const next = this.parents[at];
      this.parents[at] = root;
      at = next;
    }
    return root;
  }

  /** Puts two sets together under the name of the first. */
  join(one: number, other: number): void {
    this.parents[this.find(other)] = this.find(one);
  }
}

/** One number per point, from 0, equal for points at most `reach` apart or linked by such steps. */
export function clusterPoints(
  points: readonly Point[],
  reach: number,
): { readonly of: Int32Array; readonly count: number } {
  const sets = new DisjointSets(points.length);
  const grid = new PointGrid(points, reach);
  for (let i = 0; i < points.length; i++) {
    let isRepeated = false;
    grid.visit(i, (other, gap) => {
      sets.join(other, i);
      if (gap === 0) isRepeated = true;
    });
    if (!isRepeated) grid.hold(i);
  }
  const of = new Int32Array(points.length);
  const numbers = new Map<number, number>();
  for (let i = 0; i < points.length; i++) {
    const root = sets.find(i);
    const number = numbers.get(root) ?? numbers.size;
    numbers.set(root, number);
    of[i] = number;
  }
  return { of, count: numbers.size };
}
