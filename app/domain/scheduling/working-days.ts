import type { Day } from "./local-time";

const MILLISECONDS = 24 * 60 * 60_000;

/** 0 is Sunday. */
export const weekdayOf = (day: Day): number => new Date(`${day}T00:00:00Z`).getUTCDay();

/** A calendar day so many days later, or earlier for a negative count. */
export const addDays = (day: Day, count: number): Day =>
  new Date(Date.parse(`${day}T00:00:00Z`) + count * MILLISECONDS).toISOString().slice(0, 10);

/** Monday to Friday, less the shop's holidays. */
export const isWorkingDay = (day: Day, holidays: readonly Day[]): boolean => {
  const weekday = weekdayOf(day);
  return weekday !== 0 && weekday !== 6 && !holidays.includes(day);
};

/** The day itself where it is a working day, otherwise the first one after it. */
export function workingDayFrom(day: Day, holidays: readonly Day[]): Day {
  let at = day;
  while (!isWorkingDay(at, holidays)) at = addDays(at, 1);
  return at;
}

/** The working day `count` working days after a day; that day itself is not counted. For 0, `workingDayFrom`. */
export function addWorkingDays(day: Day, count: number, holidays: readonly Day[]): Day {
  if (count === 0) return workingDayFrom(day, holidays);
  let at = day;
  for (let left = count; left > 0; left--) at = workingDayFrom(addDays(at, 1), holidays);
  return at;
}

/** `Fri 4 Dec`, as on the steel rule. */
export function shownDay(day: Day): string {
  const parts = new Intl.DateTimeFormat("en-GB", {
    timeZone: "UTC",
    weekday: "short",
    day: "numeric",
    month: "short",
  });
  return parts.format(new Date(`${day}T00:00:00Z`)).replace(",", "");
}
