import type { FlatPiece, ParcelSize } from "~/domain/shipping";

interface ParcelDrawingProps {
  readonly size: ParcelSize;
  /** The largest first: it lies at the bottom. */
  readonly pieces: readonly FlatPiece[];
  /** Of all the parcels shown: they stand to one scale. Millimetres. */
  readonly longest: number;
}

/** Pixels. */
const WIDTH = 300;

/** A parcel from above with the pieces in it, and from its side as they are stacked, to one scale. */
export function ParcelDrawing({ size, pieces, longest }: ParcelDrawingProps) {
  const scale = WIDTH / longest;
  const long = size.length * scale;
  const wide = size.width * scale;
  const high = Math.max(size.height * scale, 6);
  const around = ((size.height - pieces.reduce((sum, { thickness }) => sum + thickness, 0)) / 2) * scale;
  let top = high - around;
  const stacked = pieces.map((piece) => {
    top -= piece.thickness * scale;
    return { id: piece.id, piece, y: top };
  });
  return (
    <svg
      role="img"
      aria-label={`From above and from the side, ${pieces.length} pieces`}
      width={WIDTH + 2}
      height={wide + high + 14}
      className="max-w-full"
    >
      <rect x="1" y="1" width={long} height={wide} strokeWidth="1.3" className="fill-sheet stroke-ink" />
      {pieces.map((piece) => {
        const length = Math.max(piece.width, piece.height) * scale;
        const width = Math.min(piece.width, piece.height) * scale;
        return (
          <rect
            key={piece.id}
            x={1 + (long - length) / 2}
            y={1 + (wide - width) / 2}
            width={length}
            height={width}
            strokeWidth="0.8"
            className="fill-grain/55 stroke-edge"
          />
        );
      })}
      <g transform={`translate(0 ${wide + 12})`}>
        <rect x="1" y="0" width={long} height={high} strokeWidth="1.3" className="fill-sheet stroke-ink" />
        {stacked.map(({ id, piece, y }) => {
          const length = Math.max(piece.width, piece.height) * scale;
          return (
            <rect
              key={id}
              x={1 + (long - length) / 2}
              y={y}
              width={length}
              height={piece.thickness * scale}
              strokeWidth="0.6"
              className="fill-grain stroke-edge"
            />
          );
        })}
      </g>
    </svg>
  );
}
