export interface SilhouetteShape {
  /** SVG path text of the outline and its openings, in millimetres with y up. */
  readonly d: string;
  /** Millimetres. */
  readonly box: {
    readonly minX: number;
    readonly minY: number;
    readonly maxX: number;
    readonly maxY: number;
  };
}

interface SilhouetteProps {
  readonly shape: SilhouetteShape | null;
  /** Names the part for a screen reader; without it the picture is ornament beside its own words. */
  readonly label?: string;
  readonly width?: number;
  readonly height?: number;
  /** Pixels in a millimetre, so that several silhouettes stand to one scale; fitted to its place otherwise. */
  readonly scale?: number;
}

/** A part's outline, small, with its openings cut out. */
export function Silhouette({ shape, label, width = 84, height = 48, scale }: SilhouetteProps) {
  if (!shape) return <span className="inline-block" aria-hidden="true" />;
  const { box, d } = shape;
  const wide = Math.max(box.maxX - box.minX, 1e-6);
  const high = Math.max(box.maxY - box.minY, 1e-6);
  const pixels = Math.min((width - 4) / wide, (height - 4) / high, scale ?? Number.POSITIVE_INFINITY);
  const x = width / 2 - (pixels * (box.minX + box.maxX)) / 2;
  const y = height / 2 + (pixels * (box.minY + box.maxY)) / 2;
  return (
    <svg
      role={label ? "img" : "presentation"}
      aria-label={label}
      aria-hidden={label ? undefined : true}
      width={width}
      height={height}
      className="shrink-0"
    >
      <path
        d={d}
        transform={`matrix(${pixels} 0 0 ${-pixels} ${x} ${y})`}
        fillRule="evenodd"
        vectorEffect="non-scaling-stroke"
        strokeWidth="1.3"
        strokeLinejoin="round"
        className="fill-grain stroke-ink"
      />
    </svg>
  );
}
