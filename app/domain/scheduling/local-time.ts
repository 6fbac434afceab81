/** A calendar day, `YYYY-MM-DD`, in the shop's zone. */
export type Day = string;

interface LocalTime {
  readonly day: Day;
  /** `HH:MM`, 24 hours. */
  readonly clock: string;
}

const MINUTE = 60_000;
const DAY = 24 * 60 * MINUTE;

const formats = new Map<string, Intl.DateTimeFormat>();
/** Making a format is slow; there is one for every zone. */
function formatOf(timeZone: string): Intl.DateTimeFormat {
  const known = formats.get(timeZone);
  if (known) return known;
  const made = new Intl.DateTimeFormat("en-US", {
    timeZone,
    hourCycle: "h23",
    year: "numeric",
    month: "2-digit",
    day: "2-digit",
    hour: "2-digit",
    minute: "2-digit",
  });
  formats.set(timeZone, made);
  return made;
}

/** What the calendar and the clock on the wall show. Throws a RangeError for a zone that does not exist. */
export function localTime(instant: Date, timeZone: string): LocalTime {
  const shown: Partial<Record<Intl.DateTimeFormatPartTypes, string>> = {};
  for (const { type, value } of formatOf(timeZone).formatToParts(instant)) shown[type] = value;
  return { day: `${shown.year}-${shown.month}-${shown.day}`, clock: `${shown.hour}:${shown.minute}` };
}

export const dayOf = (instant: Date, timeZone: string): Day => localTime(instant, timeZone).day;

const asUtc = ({ day, clock }: LocalTime): number => Date.parse(`${day}T${clock}:00Z`);

/** How far the wall clock is ahead of UTC at an instant. Milliseconds, whole minutes. */
const aheadOfUtc = (instant: number, timeZone: string): number =>
  asUtc(localTime(new Date(instant), timeZone)) - Math.floor(instant / MINUTE) * MINUTE;

/**
 * The instant at which the wall clock shows `clock` on `day`. Of two (clocks go back) the earlier; where there
 * is none (clocks go forward) the one as far past the change as the clock time is into the gap.
 */
export function instantAt(day: Day, clock: string, timeZone: string): Date {
  const wanted = asUtc({ day, clock });
  const before = wanted - aheadOfUtc(wanted - DAY, timeZone);
  const after = wanted - aheadOfUtc(wanted + DAY, timeZone);
  const shows = (instant: number): boolean => asUtc(localTime(new Date(instant), timeZone)) === wanted;
  const found = [before, after].filter(shows);
  return new Date(found.length > 0 ? Math.min(...found) : before);
}
