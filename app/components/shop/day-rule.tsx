import { useId } from "react";
import type { MachineDay, ScheduledRun } from "./schedule-view";

const percent = (share: number): string => `${Math.round(share * 1e4) / 100}%`;

/** A machine's day as a rule graduated in hours: runs as blocks, one after another; now as a blue line. */
export function DayRule({ day, machine }: { readonly day: MachineDay; readonly machine: string }) {
  const ids = useId();
  const { openMinutes, bookedMinutes, gone } = day;
  const whole = Math.max(openMinutes, bookedMinutes, 60);
  const hours = Array.from({ length: Math.floor(whole / 60) + 1 }, (_, hour) => hour);
  let at = 0;
  const blocks = day.runs.map((run) => {
    const block = { run, x: at / whole, width: run.plannedMinutes / whole };
    at += run.plannedMinutes;
    return block;
  });
  return (
    <svg
      role="img"
      aria-label={`Router ${machine}, ${day.words}: ${Math.round(bookedMinutes)} of ${openMinutes} minutes booked`}
      width="100%"
      height="42"
      className="block overflow-visible"
    >
      <RunPatterns ids={ids} />
      <g shapeRendering="crispEdges">
        <line x1="0" x2={percent(openMinutes / whole)} y1="0.5" y2="0.5" className="stroke-edge" />
        {hours.map((hour) => (
          <line
            key={hour}
            x1={percent((hour * 60) / whole)}
            x2={percent((hour * 60) / whole)}
            y1="0"
            y2={hour % 4 === 0 ? 12 : 7}
            className="stroke-edge"
          />
        ))}
      </g>
      {blocks.map(({ run, x, width }) => (
        <RunBlock key={run.id} run={run} x={x} width={width} ids={ids} />
      ))}
      {bookedMinutes > openMinutes && (
        <line
          x1={percent(openMinutes / whole)}
          x2={percent(openMinutes / whole)}
          y1="0"
          y2="42"
          strokeWidth="2"
          className="stroke-amber"
        />
      )}
      {gone !== null && (
        <line
          x1={percent(Math.min(1, gone / whole))}
          x2={percent(Math.min(1, gone / whole))}
          y1="0"
          y2="42"
          strokeWidth="2"
          className="stroke-blue"
        />
      )}
    </svg>
  );
}

/** A run is labelled where it takes at least this share of the day. */
const LABEL_SHARE = 0.12;

interface RunBlockProps {
  readonly run: ScheduledRun;
  readonly x: number;
  readonly width: number;
  readonly ids: string;
}

function RunBlock({ run, x, width, ids }: RunBlockProps) {
  const late = run.overdue || run.tooLateFor.length > 0;
  const box = { x: percent(x), width: percent(width), y: 14, height: 27 };
  return (
    <g>
      <rect
        {...box}
        strokeWidth={run.startedAt && !run.finishedAt ? 2.2 : 1.2}
        className={`${run.finishedAt ? "fill-sheet" : "fill-grain"} ${late ? "stroke-amber" : run.startedAt && !run.finishedAt ? "stroke-blue" : "stroke-ink"}`}
      />
      {!run.finishedAt && <rect {...box} fill={`url(#${ids}${run.materialIndex % 4})`} />}
      {width >= LABEL_SHARE && (
        <text
          x={percent(x + width / 2)}
          y="28"
          textAnchor="middle"
          dominantBaseline="central"
          paintOrder="stroke"
          strokeWidth="4"
          strokeLinejoin="round"
          className="measure fill-ink stroke-sheet text-[0.625rem] font-semibold"
        >
          {run.label}
        </text>
      )}
    </g>
  );
}

/** Hatching by material, a few pixels apart. */
function RunPatterns({ ids }: { readonly ids: string }) {
  const turns = [45, -45, 0, 90];
  return (
    <defs>
      {turns.map((turn, index) => (
        <pattern
          key={turn}
          id={`${ids}${index}`}
          width="6"
          height="6"
          patternUnits="userSpaceOnUse"
          patternTransform={`rotate(${turn})`}
        >
          <path d="M0 0V6" strokeWidth="0.8" className="stroke-edge" />
        </pattern>
      ))}
    </defs>
  );
}
