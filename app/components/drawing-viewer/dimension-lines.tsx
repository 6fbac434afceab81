import { formatInches, formatMillimetres, nearest64th, type ShownUnit } from "~/domain/units";
import { toScreen, type View } from "./view";
import type { ViewBox } from "./view-geometry";

/** `420.00 mm · 16 17/32 in`, the reader's own unit first. */
export function lengthInBoth(length: number, unit: ShownUnit): string {
  const millimetres = `${formatMillimetres(length, 2)} mm`;
  return unit === "mm"
    ? `${millimetres} · ${nearest64th(length)} in`
    : `${formatInches(length)} in (${nearest64th(length)}) · ${millimetres}`;
}

interface DimensionLinesProps {
  readonly box: ViewBox;
  readonly view: View;
  readonly unit: ShownUnit;
}

/** Distance of the dimension line from the part and how far its extension lines go beyond it, in pixels. */
const AWAY = 28;
const BEYOND = 6;
/** A height is written along its line where the part is at least this tall on the screen. */
const LEAST_TALL = 90;

/** Width beneath and height beside the chosen part, with thin extension lines, after ISO 129. */
export function DimensionLines({ box, view, unit }: DimensionLinesProps) {
  const [left, top] = toScreen(view, [box.minX, box.maxY]);
  const [right, bottom] = toScreen(view, [box.maxX, box.minY]);
  const line = bottom + AWAY;
  const side = right + AWAY;
  const tall = bottom - top >= LEAST_TALL;
  return (
    <svg aria-hidden="true" className="pointer-events-none font-mono text-caption font-semibold">
      <g className="stroke-blue" strokeWidth="1" fill="none">
        <path
          d={`M${left} ${bottom + 4}V${line + BEYOND}M${right} ${bottom + 4}V${line + BEYOND}M${left} ${line}H${right}`}
        />
        <path d={slash(left, line) + slash(right, line)} strokeWidth="1.4" />
        {tall && (
          <>
            <path
              d={`M${right + 4} ${top}H${side + BEYOND}M${right + 4} ${bottom}H${side + BEYOND}M${side} ${top}V${bottom}`}
            />
            <path d={slash(side, top) + slash(side, bottom)} strokeWidth="1.4" />
          </>
        )}
      </g>
      <g className="fill-blue stroke-sheet [paint-order:stroke]" strokeWidth="4" strokeLinejoin="round">
        <text x={(left + right) / 2} y={line - 6} textAnchor="middle">
          {lengthInBoth(box.maxX - box.minX, unit)}
        </text>
        {tall && (
          <text transform={`translate(${side - 6} ${(top + bottom) / 2}) rotate(-90)`} textAnchor="middle">
            {lengthInBoth(box.maxY - box.minY, unit)}
          </text>
        )}
      </g>
    </svg>
  );
}

const slash = (x: number, y: number): string => `M${x - 4} ${y + 4}L${x + 4} ${y - 4}`;
