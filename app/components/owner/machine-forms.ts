import { z } from "zod";
import { type WeekCalendar, weekCalendarSchema } from "~/domain/scheduling";
import { dayLines, millimetres } from "./number-schemas";

export const TOOL_KINDS = ["compression", "up-cut", "down-cut", "drill", "boring", "engraver"] as const;
/** Monday first; 0 is Sunday in the calendar. */
export const WEEKDAYS = [
  [1, "Monday"],
  [2, "Tuesday"],
  [3, "Wednesday"],
  [4, "Thursday"],
  [5, "Friday"],
  [6, "Saturday"],
  [0, "Sunday"],
] as const;

const perMinute = z.number().positive().max(200_000);

/** A tool as it is typed. Millimetres and minutes. */
export const toolSchema = z.object({
  version: z.number().int().optional(),
  number: z.number().int().min(1).max(999),
  name: z.string().trim().min(1).max(60),
  kind: z.enum(TOOL_KINDS),
  nominalDiameter: z.number().positive().max(200),
  measuredDiameter: z.number().positive().max(200),
  measuredOn: z.iso.date(),
  flutes: z.number().int().min(1).max(12),
  feed: perMinute,
  plunge: perMinute,
  rpm: z.number().int().min(100).max(60_000),
  maxPassDepth: z.number().positive().max(200),
});

type Shift = Omit<WeekCalendar["shifts"][number], "weekday">;

/** `08:00-12:00, 12:30-16:30`: shifts that end after they begin and do not overlap. */
const dayShifts = z
  .string()
  .trim()
  .max(120)
  .default("")
  .transform((text, context): Shift[] => {
    const shifts: Shift[] = [];
    const wrong = (message: string) => {
      context.addIssue({ code: "custom", message });
      return z.NEVER;
    };
    for (const words of text.split(",").filter((part) => part.trim() !== "")) {
      const [, from, to] =
        /^\s*((?:[01]\d|2[0-3]):[0-5]\d)\s*[-–]\s*((?:[01]\d|2[0-3]):[0-5]\d)\s*$/.exec(words) ?? [];
      if (!from || !to) return wrong(`“${words.trim()}” is not a shift: write 08:00-16:30.`);
      if (from >= to) return wrong(`${from}-${to} ends before it begins.`);
      const last = shifts.at(-1);
      if (last && from < last.to) return wrong(`${from} is before ${last.to}.`);
      shifts.push({ from, to });
    }
    return shifts;
  });

/** A machine as it is typed; the week by weekday, Sunday first as the calendar counts. */
export const machineSchema = z.object({
  version: z.number().int().optional(),
  name: z.string().trim().min(1).max(60),
  bedLength: millimetres,
  bedWidth: millimetres,
  rapid: perMinute,
  acceleration: z.number().positive().max(100_000),
  toolChangeMinutes: z.number().min(0).max(60),
  sheetHandlingMinutes: z.number().min(0).max(240),
  week: z.array(dayShifts).length(7),
  closed: dayLines,
});

/** What is kept of a form that was filled in. */
export function machineOf({ week, closed, version: _version, ...fields }: z.output<typeof machineSchema>) {
  const shifts = week.flatMap((own, weekday) => own.map((shift) => ({ weekday, ...shift })));
  return { ...fields, calendar: weekCalendarSchema.parse({ shifts, closed }) };
}

/** The week as it is typed, Sunday first. */
export const weekInWords = ({ shifts }: WeekCalendar): string[] =>
  Array.from({ length: 7 }, (_, weekday) =>
    shifts
      .filter((shift) => shift.weekday === weekday)
      .map(({ from, to }) => `${from}-${to}`)
      .join(", "),
  );
