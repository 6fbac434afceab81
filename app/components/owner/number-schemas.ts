import { z } from "zod";

const MOST_DOLLARS = 1_000_000;

/** Dollars as typed, integer cents as kept. */
export const dollars = z
  .number()
  .min(0)
  .max(MOST_DOLLARS)
  .transform((amount) => Math.round(amount * 100));

/** Percent as typed, a share as kept. */
export const percent = (least: number, most: number) =>
  z
    .number()
    .min(least)
    .max(most)
    .transform((value) => Math.round(value * 1e6) / 1e8);

/** A length in millimetres that is one: above nothing, below a hundred metres. */
export const millimetres = z.number().positive().max(100_000);

/** Lines as typed, without empty ones. */
export const linesOf = (text: string): string[] =>
  text
    .split(/\r?\n/)
    .map((line) => line.trim())
    .filter((line) => line !== "");

const isDay = (line: string): boolean => z.iso.date().safeParse(line).success;

/** Days, one a line, `2026-12-25`, sorted. */
export const dayLines = z
  .string()
  .max(5_000)
  .default("")
  .transform((text, context) => {
    const days = linesOf(text);
    const wrong = days.find((day) => !isDay(day));
    if (wrong === undefined) return [...new Set(days)].toSorted();
    context.addIssue({ code: "custom", message: `${wrong} is not a day: write 2026-12-25, one a line.` });
    return z.NEVER;
  });
