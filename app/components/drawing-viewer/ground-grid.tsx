import { roundLength, type View } from "./view";

interface GroundGridProps {
  readonly id: string;
  readonly view: View;
}

/** Least distance between two lines of the grid, in pixels. */
const PITCH = 24;

/** The bench's faint squares: a round number of millimetres each, standing with the drawing. */
export function GroundGrid({ id, view }: GroundGridProps) {
  const step = roundLength(view.scale, PITCH) * view.scale;
  return (
    <>
      <defs>
        <pattern
          id={id}
          width={step}
          height={step}
          patternUnits="userSpaceOnUse"
          patternTransform={`translate(${view.x % step} ${view.y % step})`}
        >
          <path d={`M${step} 0H0V${step}`} fill="none" strokeWidth="1" className="stroke-line/35" />
        </pattern>
      </defs>
      <rect width="100%" height="100%" fill={`url(#${id})`} className="print:hidden" />
    </>
  );
}
