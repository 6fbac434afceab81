import type { ShownUnit } from "~/domain/units";
import { lengthInBoth } from "./dimension-lines";
import { toScreen, type View } from "./view";
import type { Spot } from "./view-geometry";

/** A point of a measure: held by an end or a centre of the drawing, or free. */
export interface Held {
  readonly at: Spot;
  readonly exact: boolean;
}

/** How near the pointer must come for a point to hold it, in pixels. */
const REACH = 12;

/** The nearest point of the drawing within reach, else the place itself. `snaps` are flat x, y pairs. */
export function heldPoint(snaps: readonly number[], at: Spot, scale: number): Held {
  let least = (REACH / scale) ** 2;
  let nearest: Spot | null = null;
  for (let i = 0; i + 1 < snaps.length; i += 2) {
    const square = (snaps[i] - at[0]) ** 2 + (snaps[i + 1] - at[1]) ** 2;
    if (square <= least) {
      least = square;
      nearest = [snaps[i], snaps[i + 1]];
    }
  }
  return nearest ? { at: nearest, exact: true } : { at, exact: false };
}

/** The distance between two points in both units; "about" where one of them was free. */
export function measuredWords(from: Held, to: Held, unit: ShownUnit): string {
  const length = Math.hypot(to.at[0] - from.at[0], to.at[1] - from.at[1]);
  return `${from.exact && to.exact ? "" : "about "}${lengthInBoth(length, unit)}`;
}

interface MeasureLineProps {
  readonly points: readonly Held[];
  /** Where the pointer is held now, until the second point is set. */
  readonly hover: Held | null;
  readonly view: View;
  readonly unit: ShownUnit;
}

/** The points set so far, the line between them and its length. */
export function MeasureLine({ points, hover, view, unit }: MeasureLineProps) {
  const from = points[0];
  const to = points[1] ?? hover;
  const marks = [
    { role: "from", held: from },
    { role: "to", held: points[1] },
    { role: "pointer", held: points.length === 2 ? null : hover },
  ];
  const [x1, y1] = from ? toScreen(view, from.at) : [0, 0];
  const [x2, y2] = to ? toScreen(view, to.at) : [0, 0];
  return (
    <svg aria-hidden="true" className="pointer-events-none">
      {from && to && (
        <>
          <line x1={x1} y1={y1} x2={x2} y2={y2} strokeWidth="1.2" className="stroke-blue" />
          <text
            x={(x1 + x2) / 2}
            y={(y1 + y2) / 2 - 8}
            textAnchor="middle"
            strokeWidth="4"
            strokeLinejoin="round"
            className="fill-blue stroke-sheet font-mono text-caption font-semibold [paint-order:stroke]"
          >
            {measuredWords(from, to, unit)}
          </text>
        </>
      )}
      {marks.map(({ role, held }) => {
        if (!held) return null;
        const [x, y] = toScreen(view, held.at);
        return (
          <g key={role} className="stroke-blue" strokeWidth="1.4">
            <circle
              cx={x}
              cy={y}
              r={held.exact ? 4 : 2}
              className={held.exact ? "fill-sheet" : "fill-blue"}
            />
            {held.exact && <path d={`M${x - 8} ${y}h16M${x} ${y - 8}v16`} strokeWidth="0.8" />}
          </g>
        );
      })}
    </svg>
  );
}
