import { z } from "zod";

const clock = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/);

/** A machine's week: shifts per weekday (0 is Sunday), in the shop's time zone, `HH:MM`. Days closed beyond that are `closed` dates. */
export const weekCalendarSchema = z.object({
  shifts: z.array(z.object({ weekday: z.number().int().min(0).max(6), from: clock, to: clock })),
  closed: z.array(z.iso.date()),
});
export type WeekCalendar = z.infer<typeof weekCalendarSchema>;
