import type { Nest, NestItem, NestRequest, Placement } from "./nest";
import { turnedSize } from "./nest";

export type NestCheck = { readonly ok: true } | { readonly ok: false; readonly problems: readonly string[] };

/** What rounding may take off a distance. Millimetres. */
const DEFAULT_TOLERANCE = 0.01;

interface PlacedBox {
  readonly name: string;
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}

const nameOf = ({ item, copy }: { item: string; copy: number }): string => `${item} no. ${copy}`;

/** Shortest distance between two boxes; zero where they touch or overlap. */
const gapBetween = (one: PlacedBox, other: PlacedBox): number =>
  Math.hypot(
    Math.max(0, one.minX - other.maxX, other.minX - one.maxX),
    Math.max(0, one.minY - other.maxY, other.minY - one.maxY),
  );

const overlaps = (one: PlacedBox, other: PlacedBox, tolerance: number): boolean =>
  Math.min(one.maxX, other.maxX) - Math.max(one.minX, other.minX) > tolerance &&
  Math.min(one.maxY, other.maxY) - Math.max(one.minY, other.minY) > tolerance;

function problemsOfCount(nest: Nest, request: NestRequest): string[] {
  const seen = new Map<string, number>();
  for (const one of [...nest.sheets.flatMap((sheet) => sheet.placements), ...nest.unplaced]) {
    seen.set(nameOf(one), (seen.get(nameOf(one)) ?? 0) + 1);
  }
  const problems: string[] = [];
  for (const { id, quantity } of request.items) {
    for (let copy = 1; copy <= quantity; copy++) {
      const name = nameOf({ item: id, copy });
      const times = seen.get(name) ?? 0;
      if (times !== 1) problems.push(`${name} is there ${times} times instead of once.`);
      seen.delete(name);
    }
  }
  return [...problems, ...[...seen.keys()].map((name) => `${name} was not asked for.`)];
}

function problemsOfSheet(
  placements: readonly Placement[],
  items: ReadonlyMap<string, NestItem>,
  { sheet, spacing, margin }: NestRequest,
  tolerance: number,
): string[] {
  const problems: string[] = [];
  const boxes: PlacedBox[] = [];
  for (const placement of placements) {
    const item = items.get(placement.item);
    if (!item) continue;
    const name = nameOf(placement);
    if (placement.turnDegrees !== 0 && !item.mayTurn90) problems.push(`${name} is turned against its grain.`);
    const { width, height } = turnedSize(item, placement.turnDegrees);
    const box = {
      name,
      minX: placement.x,
      minY: placement.y,
      maxX: placement.x + width,
      maxY: placement.y + height,
    };
    const edge = Math.min(box.minX, box.minY, sheet.length - box.maxX, sheet.width - box.maxY);
    if (!(edge >= margin - tolerance)) {
      problems.push(`${name} is ${edge.toFixed(2)} mm from the sheet's edge; the margin is ${margin} mm.`);
    }
    boxes.push(box);
  }

  boxes.sort((one, other) => one.minX - other.minX);
  for (let i = 0; i < boxes.length; i++) {
    for (let j = i + 1; j < boxes.length && boxes[j].minX < boxes[i].maxX + spacing; j++) {
      const gap = gapBetween(boxes[i], boxes[j]);
      if (overlaps(boxes[i], boxes[j], tolerance)) {
        problems.push(`${boxes[i].name} and ${boxes[j].name} overlap.`);
      } else if (gap < spacing - tolerance) {
        problems.push(
          `${boxes[i].name} and ${boxes[j].name} are ${gap.toFixed(2)} mm apart; the spacing is ${spacing} mm.`,
        );
      }
    }
  }
  return problems;
}

/**
 * Looks at a nest without knowing how it was made: every copy asked for is there once and nothing else, no box
 * is turned against its grain, off the margin, or nearer to another than the spacing. To be run before a nest
 * is stored or shown. `tolerance` is in millimetres.
 */
export function checkNest(nest: Nest, request: NestRequest, tolerance = DEFAULT_TOLERANCE): NestCheck {
  const items = new Map(request.items.map((item) => [item.id, item]));
  const problems = [
    ...problemsOfCount(nest, request),
    ...nest.sheets.flatMap(({ placements }, i) =>
      problemsOfSheet(placements, items, request, tolerance).map((problem) => `Sheet ${i + 1}: ${problem}`),
    ),
  ];
  return problems.length === 0 ? { ok: true } : { ok: false, problems };
}
