import { formatMinutes } from "~/domain/units";
import type { WeekCalendar } from "./calendar";
import { type Day, localTime } from "./local-time";
import { addDays, addWorkingDays, isWorkingDay, shownDay, workingDayFrom } from "./working-days";
import { minutesOn } from "./working-time";

export interface PromiseRequest {
  /** When the order is approved and paid, or would be. */
  readonly approvedAt: Date;
  readonly timeZone: string;
  readonly lead: {
    /** From this local hour on an approval counts from the next working day. */
    readonly cutOffHour: number;
    /** Working days for tabs, sanding and packing after cutting. */
    readonly bufferDays: number;
    readonly transitDays: number;
    readonly holidays: readonly Day[];
  };
  /** One for every machine in use. */
  readonly calendars: readonly WeekCalendar[];
  /** Machine minutes already planned, by day, all machines together. */
  readonly load: Readonly<Record<Day, number>>;
  /** Machine minutes that this order needs. */
  readonly minutes: number;
}

export interface Promised {
  /** The working day that the approval counts from. */
  readonly countedFrom: Day;
  readonly cutBy: Day;
  readonly shipsOn: Day;
  readonly arrivesOn: Day;
  /** How the day came about, in a sentence with its numbers. */
  readonly how: string;
}

export type PromiseResult =
  | { readonly ok: true; readonly promise: Promised }
  | { readonly ok: false; readonly reason: string };

/** How far ahead free machine time is looked for. */
const HORIZON_DAYS = 366;

const days = (count: number): string => `${count} working ${count === 1 ? "day" : "days"}`;

/** The first day by whose end enough machine time has been free, counting from the day after `from`. */
function cutDay(from: Day, { calendars, load, lead, minutes }: PromiseRequest): Day | null {
  let left = minutes;
  for (let day = addDays(from, 1), ahead = 1; ahead <= HORIZON_DAYS; day = addDays(day, 1), ahead++) {
    if (!isWorkingDay(day, lead.holidays)) continue;
    const open = calendars.reduce((sum, calendar) => sum + minutesOn(day, calendar), 0);
    if (open === 0) continue;
    left -= Math.max(0, open - (load[day] ?? 0));
    if (left <= 0) return day;
  }
  return null;
}

/**
 * The day an order ships: cut in the free time of the machines from the working day after its approval counts,
 * then the buffer for the bench, then (for the arrival) the carrier's days. Refuses when no machine has the time
 * within a year.
 */
export function promiseDate(request: PromiseRequest): PromiseResult {
  const { approvedAt, timeZone, lead } = request;
  const { day, clock } = localTime(approvedAt, timeZone);
  const isInTime = Number(clock.slice(0, 2)) < lead.cutOffHour;
  const countedFrom = workingDayFrom(isInTime ? day : addDays(day, 1), lead.holidays);
  const cutBy = cutDay(countedFrom, request);
  if (cutBy === null) return { ok: false, reason: "No machine has the time for this order within a year." };

  const shipsOn = addWorkingDays(cutBy, lead.bufferDays, lead.holidays);
  return {
    ok: true,
    promise: {
      countedFrom,
      cutBy,
      shipsOn,
      arrivesOn: addWorkingDays(shipsOn, lead.transitDays, lead.holidays),
      how:
        `Approved ${isInTime ? "before" : "after"} ${lead.cutOffHour}:00 it counts from ${shownDay(countedFrom)}; ` +
        `the machines have ${formatMinutes(request.minutes)} free by ${shownDay(cutBy)}; ` +
        `${days(lead.bufferDays)} for tabs, sanding and packing.`,
    },
  };
}
