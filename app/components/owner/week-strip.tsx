import type { WeekCalendar } from "~/domain/scheduling";
import { WEEKDAYS } from "./machine-forms";

const sinceMidnight = (clock: string): number => {
  const [hours = 0, minutes = 0] = clock.split(":").map(Number);
  return hours * 60 + minutes;
};
const DAY = 24 * 60;
const at = (minutes: number): string => `${Math.round((minutes / DAY) * 1e4) / 100}%`;
const HOURS = Array.from({ length: 25 }, (_, hour) => hour);

/** A machine's week: a rule of 24 hours a day, shifts as bars on it. */
export function WeekStrip({ calendar }: { readonly calendar: WeekCalendar }) {
  return (
    <div className="mt-4 max-w-4xl space-y-1">
      {WEEKDAYS.map(([weekday, name]) => {
        const shifts = calendar.shifts.filter((shift) => shift.weekday === weekday);
        const words = shifts.map(({ from, to }) => `${from}–${to}`).join(", ");
        return (
          <div
            key={weekday}
            className="grid grid-cols-[2.5rem_minmax(0,1fr)] items-center gap-3 sm:grid-cols-[6rem_minmax(0,1fr)_13rem]"
          >
            <span className="text-small">
              <span className="sm:hidden">{name.slice(0, 3)}</span>
              <span className="hidden sm:inline">{name}</span>
            </span>
            <svg
              role="img"
              aria-label={`${name}: ${words || "closed"}`}
              width="100%"
              height="18"
              className="block"
            >
              <g shapeRendering="crispEdges">
                {shifts.map(({ from, to }) => (
                  <rect
                    key={from}
                    x={at(sinceMidnight(from))}
                    width={at(sinceMidnight(to) - sinceMidnight(from))}
                    y="1"
                    height="10"
                    className="fill-grain stroke-ink"
                  />
                ))}
                {HOURS.map((hour) => (
                  <line
                    key={hour}
                    x1={at(hour * 60)}
                    x2={at(hour * 60)}
                    y1="18"
                    y2={hour % 6 === 0 ? 10 : 14}
                    className={hour % 6 === 0 ? "stroke-edge" : "stroke-line"}
                  />
                ))}
              </g>
            </svg>
            <span className="measure hidden text-small text-soft sm:block">{words || "closed"}</span>
          </div>
        );
      })}
    </div>
  );
}
