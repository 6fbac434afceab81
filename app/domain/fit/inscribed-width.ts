import { boxOfPoints, distanceToSegment, type Point, polygonContains } from "../geometry";

/** Cells looked at for one polygon: a bound on work; the best found by then is given. */
const MOST_CELLS = 20_000;

/**
 * The diameter of the largest circle inside a polygon, within `tolerance` and never too large by more than that:
 * squares over the polygon are halved where they could hold a better centre than the best so far.
 */
export function inscribedWidth(polygon: readonly Point[], tolerance: number): number {
  const { minX, minY, maxX, maxY } = boxOfPoints(polygon);
  const side = Math.min(maxX - minX, maxY - minY);
  if (!(side > 0)) return 0;
  const cells: Cell[] = [];
  for (let x = minX; x < maxX; x += side) {
    for (let y = minY; y < maxY; y += side) cells.push(cellAt(polygon, x + side / 2, y + side / 2, side / 2));
  }
  let best = Math.max(0, ...cells.map(({ room }) => room));
  for (let looked = 0; looked < MOST_CELLS; looked++) {
    const cell = cells.pop();
    if (!cell) break;
    if (cell.most - best <= tolerance / 2) continue;
    const half = cell.half / 2;
    for (const dx of [-half, half]) {
      for (const dy of [-half, half]) {
        const next = cellAt(polygon, cell.x + dx, cell.y + dy, half);
        best = Math.max(best, next.room);
        if (next.most - best > tolerance / 2) cells.push(next);
      }
    }
  }
  return 2 * best;
}

interface Cell {
  readonly x: number;
  readonly y: number;
  readonly half: number;
  /** Distance of the centre from the edge, negative outside. */
  readonly room: number;
  /** What no point of the cell can better. */
  readonly most: number;
}

function cellAt(polygon: readonly Point[], x: number, y: number, half: number): Cell {
  const at = { x, y };
  let nearest = Infinity;
  let last = polygon[polygon.length - 1];
  for (const next of polygon) {
    nearest = Math.min(nearest, distanceToSegment(at, last, next));
    last = next;
  }
  const room = polygonContains(polygon, at) ? nearest : -nearest;
  return { x, y, half, room, most: room + half * Math.SQRT2 };
}
