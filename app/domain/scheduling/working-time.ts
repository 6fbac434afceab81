import type { WeekCalendar } from "./calendar";
import { type Day, dayOf, instantAt } from "./local-time";
import { addDays, weekdayOf } from "./working-days";

const MINUTE = 60_000;
/** A calendar without a shift for so long has none. */
const HORIZON_DAYS = 366;

/** Shifts of a day from the earliest on; none on a closed day. */
export const shiftsOn = (
  day: Day,
  calendar: WeekCalendar,
): readonly { readonly from: string; readonly to: string }[] =>
  calendar.closed.includes(day)
    ? []
    : calendar.shifts
        .filter((shift) => shift.weekday === weekdayOf(day) && shift.from < shift.to)
        .toSorted((one, other) => one.from.localeCompare(other.from));

/** Minutes of a clock time since midnight. */
const sinceMidnight = (clock: string): number => {
  const [hours, minutes] = clock.split(":").map(Number);
  return hours * 60 + minutes;
};

/** Working minutes of a day by the clock on the wall. */
export const minutesOn = (day: Day, calendar: WeekCalendar): number =>
  shiftsOn(day, calendar).reduce((sum, { from, to }) => sum + sinceMidnight(to) - sinceMidnight(from), 0);

/**
 * When work of so many minutes ends that starts at `start` or at the first shift after it. Work that ends with
 * the shift ends on that day. Null where the calendar has no shift within a year.
 */
export function finishOf({
  start,
  minutes,
  calendar,
  timeZone,
}: {
  start: Date;
  minutes: number;
  calendar: WeekCalendar;
  timeZone: string;
}): Date | null {
  let left = minutes * MINUTE;
  let idleDays = 0;
  for (let day = dayOf(start, timeZone); idleDays < HORIZON_DAYS; day = addDays(day, 1)) {
    idleDays++;
    for (const { from, to } of shiftsOn(day, calendar)) {
      const opens = Math.max(start.getTime(), instantAt(day, from, timeZone).getTime());
      const room = instantAt(day, to, timeZone).getTime() - opens;
      if (room <= 0) continue;
      if (left <= room) return new Date(opens + left);
      left -= room;
      idleDays = 0;
    }
  }
  return null;
}
