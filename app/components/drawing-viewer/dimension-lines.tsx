import { formatInches, formatMillimetres, nearest64th, type ShownUnit } from "~/domain/units";
import { type Size, toScreen, type View } from "./view";
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
  /** Boxes of everything else, which the lines keep clear of where they can. */
  readonly others: readonly ViewBox[];
  readonly view: View;
  readonly size: Size;
  readonly unit: ShownUnit;
}

/** Distance of the dimension line from the part and how far its extension lines go beyond it, in pixels. */
const AWAY = 28;
const BEYOND = 6;
/** Room a dimension takes beside its part, its words included. */
const ROOM = 40;
/** A height is given where the part is at least this tall on the screen. */
const LEAST_TALL = 90;
/** Advance of one mono character and height of a line at 12 px. */
const CHARACTER = 7.3;
const LINE = 16;

/** Width beneath (or above) and height beside the chosen part, with thin extension lines, after ISO 129. */
export function DimensionLines({ box, others, view, size, unit }: DimensionLinesProps) {
  const [left, top] = toScreen(view, [box.minX, box.maxY]);
  const [right, bottom] = toScreen(view, [box.maxX, box.minY]);
  const room = ROOM / view.scale;
  const isClear = (strip: ViewBox) => !others.some((other) => overlap(strip, other));
  const below = isClear({ ...box, minY: box.minY - room, maxY: box.minY });
  const above = !below && isClear({ ...box, minY: box.maxY, maxY: box.maxY + room });
  const beside = isClear({ ...box, minX: box.maxX, maxX: box.maxX + room })
    ? right + AWAY
    : isClear({ ...box, minX: box.minX - room, maxX: box.minX })
      ? left - AWAY
      : null;
  const inside = beside !== null && beside > LINE && beside < size.width - BEYOND;
  const edge = above ? top : bottom;
  const line = above ? top - AWAY : bottom + AWAY;
  const words = lengthInBoth(box.maxX - box.minX, unit);
  const half = (words.length * CHARACTER) / 2 + 6;
  const between = right - left >= 2 * half;
  const middle = Math.min(Math.max((left + right) / 2, half), Math.max(size.width - half, half));
  const side = inside && bottom - top >= LEAST_TALL ? beside : null;
  return (
    <svg aria-hidden="true" className="pointer-events-none font-mono text-caption font-semibold">
      <g className="stroke-blue" strokeWidth="1" fill="none">
        <path d={dimensionPath("across", left, right, edge, line)} />
        <path d={slash(left, line) + slash(right, line)} strokeWidth="1.4" />
        {side !== null && (
          <>
            <path d={dimensionPath("down", top, bottom, side > right ? right : left, side)} />
            <path d={slash(side, top) + slash(side, bottom)} strokeWidth="1.4" />
          </>
        )}
      </g>
      <g className="fill-blue stroke-sheet [paint-order:stroke]" strokeWidth="4" strokeLinejoin="round">
        <text
          x={middle}
          y={between ? line - 6 : above ? line - BEYOND - 4 : line + BEYOND + 11}
          textAnchor="middle"
        >
          {words}
        </text>
        {side !== null && (
          <text transform={`translate(${side - 6} ${(top + bottom) / 2}) rotate(-90)`} textAnchor="middle">
            {lengthInBoth(box.maxY - box.minY, unit)}
          </text>
        )}
      </g>
    </svg>
  );
}

const overlap = (one: ViewBox, other: ViewBox): boolean =>
  one.minX < other.maxX && other.minX < one.maxX && one.minY < other.maxY && other.minY < one.maxY;

/** Two extension lines from an edge to just beyond the dimension line, and that line between them. */
function dimensionPath(way: "across" | "down", from: number, to: number, edge: number, line: number): string {
  const out = Math.sign(line - edge);
  const near = edge + 4 * out;
  const far = line + BEYOND * out;
  return way === "across"
    ? `M${from} ${near}V${far}M${to} ${near}V${far}M${from} ${line}H${to}`
    : `M${near} ${from}H${far}M${near} ${to}H${far}M${line} ${from}V${to}`;
}

const slash = (x: number, y: number): string => `M${x - 4} ${y + 4}L${x + 4} ${y - 4}`;
