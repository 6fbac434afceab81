/** A piece as a scanner finds it. */
export interface Scannable {
  readonly id: string;
  /** What its label's QR says. */
  readonly code: string;
  readonly reference: string;
  readonly label: string;
  readonly number: number;
}

const bare = (words: string): string => words.toUpperCase().replace(/[^A-Z0-9]/g, "");

/**
 * The piece that was scanned or typed: by its code; by what stands on its label (`KP-2047 A 2`, or `A 2`); or by its
 * part alone (`A`), then the first of them that still waits. Undefined when there is none, or more than one fits.
 */
export function matchScan<Piece extends Scannable>(
  pieces: readonly Piece[],
  typed: string,
  waits: (piece: Piece) => boolean,
): Piece | undefined {
  const words = typed.trim();
  const byCode = pieces.find(({ code }) => code === words);
  if (byCode || words === "") return byCode;
  const wanted = bare(words);
  const named = pieces.filter(({ reference, label, number }) =>
    [`${reference}${label}${number}`, `${label}${number}`].some((name) => bare(name) === wanted),
  );
  const candidates =
    named.length > 0
      ? named
      : pieces.filter(({ reference, label }) =>
          [`${reference}${label}`, label].some((name) => bare(name) === wanted),
        );
  const open = candidates.filter(waits);
  const orders = new Set(candidates.map(({ reference }) => reference));
  return orders.size > 1 ? undefined : (open[0] ?? candidates[0]);
}
