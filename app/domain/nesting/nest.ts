/** Something to be placed: a part's box as drawn. Millimetres. Half turns are always allowed and change no box. */
export interface NestItem {
  readonly id: string;
  /** Along the sheet's length, and so along the grain, as drawn. */
  readonly width: number;
  readonly height: number;
  /** Whether a quarter turn is allowed: the grain of the part is free, or the stock has none. */
  readonly mayTurn90: boolean;
  readonly quantity: number;
}

/** Millimetres; the length runs along x and the grain. */
export interface SheetSize {
  readonly length: number;
  readonly width: number;
}

export interface NestRequest {
  readonly items: readonly NestItem[];
  readonly sheet: SheetSize;
  /** Least distance between two boxes. */
  readonly spacing: number;
  /** Least distance from a box to the sheet's edge. */
  readonly margin: number;
}

/** Copy `copy` (from 1) of an item; x and y are the lower left corner of its box after the turn. */
export interface Placement {
  readonly item: string;
  readonly copy: number;
  readonly x: number;
  readonly y: number;
  readonly turnDegrees: 0 | 90;
}

export interface NestedSheet {
  readonly placements: readonly Placement[];
  /** Share of the whole sheet that the boxes cover. */
  readonly yield: number;
}

export interface Nest {
  readonly sheets: readonly NestedSheet[];
  /** Copies too large for the sheet in any allowed turn. */
  readonly unplaced: readonly { readonly item: string; readonly copy: number }[];
}

/** The box of an item after a turn. */
export const turnedSize = (
  { width, height }: Pick<NestItem, "width" | "height">,
  turnDegrees: 0 | 90,
): { readonly width: number; readonly height: number } =>
  turnDegrees === 0 ? { width, height } : { width: height, height: width };
