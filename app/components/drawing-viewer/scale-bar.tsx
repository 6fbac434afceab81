import type { ShownUnit } from "~/domain/units";
import { roundLength, type Size, type View } from "./view";

interface ScaleBarProps {
  readonly view: View;
  readonly size: Size;
  readonly unit: ShownUnit;
}

const MM_IN_INCH = 25.4;
const LEAST_PIXELS = 70;

/** A round length at the foot of the drawing, so that a print still says how large it is. */
export function ScaleBar({ view, size, unit }: ScaleBarProps) {
  const unitScale = unit === "mm" ? view.scale : view.scale * MM_IN_INCH;
  const length = roundLength(unitScale, LEAST_PIXELS);
  const width = length * unitScale;
  const right = size.width - 16;
  const y = size.height - 14;
  return (
    <svg aria-hidden="true" className="pointer-events-none">
      <path
        d={`M${right - width} ${y - 5}V${y}H${right}V${y - 5}M${right - width / 2} ${y - 3}V${y}`}
        fill="none"
        strokeWidth="1"
        className="stroke-soft"
      />
      <text x={right - width - 8} y={y + 1} textAnchor="end" className="fill-soft font-mono text-[11px]">
        {`${Number(length.toPrecision(3))} ${unit}`}
      </text>
    </svg>
  );
}
