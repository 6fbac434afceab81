import type { ParcelLimits } from "./parcel-limits";
import { lengthPlusGirth, longestSide, type ParcelSize } from "./parcel-size";

/** A flat piece to be packed. Millimetres, kilograms. */
export interface FlatPiece {
  readonly id: string;
  readonly width: number;
  readonly height: number;
  readonly thickness: number;
  readonly kilograms: number;
}

/** What packing adds: millimetres on every side, kilograms to a square metre of the stack's face. */
export interface PackingAllowance {
  readonly around: number;
  readonly kilogramsPerSquareMetre: number;
}

/** Edge board all round, a foam sheet and a double-wall sleeve (common practice, no source). */
export const SLEEVE: PackingAllowance = { around: 15, kilogramsPerSquareMetre: 2 };

/** A stack of pieces, the largest first. Sizes and weight are outside, packing included; length is the longer side of the face. */
export interface SuggestedParcel extends ParcelSize {
  readonly pieces: readonly string[];
  readonly kilograms: number;
  /** Beyond what a parcel may be: it travels on a pallet. */
  readonly oversize: boolean;
}

type SizeLimits = Pick<ParcelLimits, "maxKilograms" | "maxLength" | "maxLengthPlusGirth">;

const longSide = ({ width, height }: FlatPiece): number => Math.max(width, height);
const shortSide = ({ width, height }: FlatPiece): number => Math.min(width, height);

/** The size and weight of these pieces closed up as one stack. There is at least one. */
export function stackPieces(
  pieces: readonly FlatPiece[],
  limits: SizeLimits,
  packing: PackingAllowance = SLEEVE,
): SuggestedParcel {
  const face = {
    long: Math.max(...pieces.map(longSide)) + 2 * packing.around,
    short: Math.max(...pieces.map(shortSide)) + 2 * packing.around,
  };
  const height = pieces.reduce((sum, piece) => sum + piece.thickness, 0) + 2 * packing.around;
  const kilograms =
    pieces.reduce((sum, piece) => sum + piece.kilograms, 0) +
    ((face.long * face.short) / 1e6) * packing.kilogramsPerSquareMetre;
  const size = { length: face.long, width: face.short, height };
  return {
    ...size,
    pieces: pieces.map((piece) => piece.id),
    kilograms,
    oversize:
      kilograms > limits.maxKilograms ||
      longestSide(size) > limits.maxLength ||
      lengthPlusGirth(size) > limits.maxLengthPlusGirth,
  };
}

/** The largest first: outside, where it takes the knocks. */
export const bySize = (one: FlatPiece, other: FlatPiece): number =>
  longSide(other) - longSide(one) || shortSide(other) - shortSide(one) || one.id.localeCompare(other.id);

/**
 * Stacks of flat pieces, sorted by size with the largest outside, each as full as the limits allow before the
 * next is begun. A piece that is beyond the limits on its own is a stack of one, marked oversize. Any part of a
 * stack within the limits is within them too, so this is the fewest stacks that keep the order of size, and
 * more pieces never make fewer.
 */
export function suggestParcels(
  pieces: readonly FlatPiece[],
  limits: SizeLimits,
  packing: PackingAllowance = SLEEVE,
): readonly SuggestedParcel[] {
  const sorted = pieces.toSorted(bySize);
  const parcels: SuggestedParcel[] = [];
  let open: FlatPiece[] = [];
  for (const piece of sorted) {
    if (open.length > 0 && stackPieces([...open, piece], limits, packing).oversize) {
      parcels.push(stackPieces(open, limits, packing));
      open = [];
    }
    open.push(piece);
  }
  if (open.length > 0) parcels.push(stackPieces(open, limits, packing));
  return parcels;
}
