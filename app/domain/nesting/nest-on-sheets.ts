import type { Nest, NestedSheet, NestItem, NestRequest, Placement } from "./nest";
import { turnedSize } from "./nest";
import { type PlacingRule, Skyline, type Spot } from "./skyline";

type Turn = Placement["turnDegrees"];
/** Turn whenever that reaches less far, or only where the part does not fit otherwise. */
type TurningRule = "where-better" | "where-needed";

interface Attempt {
  readonly order: (a: NestItem, b: NestItem) => number;
  readonly placing: PlacingRule;
  readonly turning: TurningRule;
}

const long = ({ width, height }: NestItem): number => Math.max(width, height);
const short = ({ width, height }: NestItem): number => Math.min(width, height);
const ORDERS: readonly Attempt["order"][] = [
  (a, b) => b.width * b.height - a.width * a.height,
  (a, b) => long(b) - long(a) || short(b) - short(a),
  (a, b) => b.width - a.width || b.height - a.height,
  (a, b) => b.height - a.height || b.width - a.width,
];
const ATTEMPTS: readonly Attempt[] = ORDERS.flatMap((order) =>
  (["least-end", "least-start"] as const).flatMap((placing) =>
    (["where-better", "where-needed"] as const).map((turning) => ({ order, placing, turning })),
  ),
);

/** A sheet being filled: sizes grown by the spacing, so that boxes on the skyline may touch. */
interface OpenSheet {
  readonly skyline: Skyline;
  readonly placements: Placement[];
  covered: number;
}

class Filling {
  readonly sheets: OpenSheet[] = [];
  private readonly usable: { readonly along: number; readonly across: number };

  constructor(
    private readonly request: NestRequest,
    private readonly attempt: Attempt,
  ) {
    const grown = request.spacing - 2 * request.margin;
    this.usable = { along: request.sheet.length + grown, across: request.sheet.width + grown };
  }

  /** Every copy of an item that fits a sheet at all, each on the first sheet with room for it. */
  placeAll(item: NestItem): void {
    let first = 0;
    for (let copy = 1; copy <= item.quantity; copy++) {
      // A skyline only rises: a sheet that had no room for one copy has none for the next.
      while (!this.placeOn(first, item, copy)) first++;
    }
  }

  private placeOn(index: number, item: NestItem, copy: number): boolean {
    this.sheets[index] ??= {
      skyline: new Skyline(this.usable.across, this.usable.along),
      placements: [],
      covered: 0,
    };
    const sheet = this.sheets[index];
    const found = this.spotOn(sheet.skyline, item);
    if (!found) return false;
    const { margin, spacing } = this.request;
    const { width, height } = turnedSize(item, found.turn);
    sheet.skyline.take(found.spot, height + spacing, width + spacing);
    sheet.placements.push({
      item: item.id,
      copy,
      x: margin + found.spot.along,
      y: margin + found.spot.across,
      turnDegrees: found.turn,
    });
    sheet.covered += width * height;
    return true;
  }

  private spotOn(skyline: Skyline, item: NestItem): { readonly spot: Spot; readonly turn: Turn } | null {
    const { spacing } = this.request;
    const at = (turn: Turn) => {
      const { width, height } = turnedSize(item, turn);
      const spot = skyline.find(height + spacing, width + spacing, this.attempt.placing);
      return spot && { spot, turn, score: spot.score };
    };
    const straight = at(0);
    if (!item.mayTurn90 || (straight && this.attempt.turning === "where-needed")) return straight;
    const turned = at(90);
    return straight && turned ? (turned.score < straight.score ? turned : straight) : (straight ?? turned);
  }
}

/** Stricter than the skyline's own slack, so that what fits by it finds room on an empty sheet. Millimetres. */
const SLACK = 1e-7;

const fits = (item: NestItem, { sheet, margin }: NestRequest): boolean =>
  ([0, 90] as const).some((turn) => {
    if (turn === 90 && !item.mayTurn90) return false;
    const { width, height } = turnedSize(item, turn);
    return width <= sheet.length - 2 * margin + SLACK && height <= sheet.width - 2 * margin + SLACK;
  });

const filled = ({ placements, covered }: OpenSheet, request: NestRequest): NestedSheet => ({
  placements,
  yield: covered / (request.sheet.length * request.sheet.width),
});

/**
 * Boxes on as few sheets as the best of several simple orders needs, and of those the least length of the last
 * sheet, so that its offcut is the largest. Each box goes where it reaches least far along the first sheet with
 * room. The same request always gives the same nest; sizes and spacing must be positive, the margin not negative.
 */
export function nestOnSheets(request: NestRequest): Nest {
  const fitting = request.items.filter((item) => fits(item, request));
  const unplaced = request.items
    .filter((item) => !fits(item, request))
    .flatMap(({ id, quantity }) => Array.from({ length: quantity }, (_, i) => ({ item: id, copy: i + 1 })));

  let best: readonly OpenSheet[] | null = null;
  let bestReach = Infinity;
  for (const attempt of ATTEMPTS) {
    const filling = new Filling(request, attempt);
    for (const item of fitting.toSorted(attempt.order)) filling.placeAll(item);
    const { sheets } = filling;
    const reach = sheets.at(-1)?.skyline.reach() ?? 0;
    const isBetter =
      best === null ||
      sheets.length < best.length ||
      (sheets.length === best.length && reach < bestReach - 1e-6);
    if (isBetter) {
      best = sheets;
      bestReach = reach;
    }
  }
  return { sheets: (best ?? []).map((sheet) => filled(sheet, request)), unplaced };
}
