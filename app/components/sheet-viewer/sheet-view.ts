/** A sheet with parts lying on it, as it is drawn: millimetres, the length along x and the grain, y up. */
export interface SheetView {
  readonly length: number;
  readonly width: number;
  readonly margin: number;
  readonly spacing: number;
  readonly hasGrain: boolean;
  /** Share of the sheet that becomes parts, 0 to 1. */
  readonly yield: number;
  readonly minutes: number;
  readonly parts: readonly SheetPart[];
}

export interface SheetPart {
  readonly id: string;
  /** What its label says: `2047 A·1`. */
  readonly label: string;
  /** Which of the orders on the sheet it belongs to, from 0: orders are told apart by pattern. */
  readonly order: number;
  /** The outline and its openings in the part's own frame, as SVG path text; null draws the box alone. */
  readonly d: string | null;
  /** The turn about the origin, then the move, that carry that frame onto the sheet. */
  readonly turnDegrees: number;
  readonly x: number;
  readonly y: number;
  /** Where it lies. */
  readonly box: SheetBox;
}

export interface SheetBox {
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}

/** A remaining strip shorter than this is waste, in millimetres (common practice, no source). */
const LEAST_OFFCUT = 150;

/** The strip beyond the last part, the sheet's whole width, where it is worth keeping. */
export function offcutOf({ length, width, spacing, parts }: SheetView): SheetBox | null {
  const reach = parts.reduce((most, { box }) => Math.max(most, box.maxX), 0) + spacing;
  return parts.length > 0 && length - reach >= LEAST_OFFCUT
    ? { minX: reach, minY: 0, maxX: length, maxY: width }
    : null;
}

/** The box of a box after a turn about the origin and a move. Quarter turns stay exact. */
export function placedBox(
  box: SheetBox,
  { turnDegrees, x, y }: { readonly turnDegrees: number; readonly x: number; readonly y: number },
): SheetBox {
  const radians = (turnDegrees * Math.PI) / 180;
  const isQuarter = turnDegrees % 90 === 0;
  const cos = isQuarter ? Math.round(Math.cos(radians)) : Math.cos(radians);
  const sin = isQuarter ? Math.round(Math.sin(radians)) : Math.sin(radians);
  const corners = [box.minX, box.maxX].flatMap((cx) =>
    [box.minY, box.maxY].map((cy) => [cx * cos - cy * sin + x, cx * sin + cy * cos + y] as const),
  );
  const xs = corners.map(([cx]) => cx);
  const ys = corners.map(([, cy]) => cy);
  return { minX: Math.min(...xs), minY: Math.min(...ys), maxX: Math.max(...xs), maxY: Math.max(...ys) };
}
