import { z } from "zod";
import { READING_POINTS, type ThicknessReading } from "~/domain/fit";
import { dollars, millimetres } from "./number-schemas";

export const MATERIAL_KINDS = [
  "birch-plywood",
  "hardwood-plywood",
  "softwood-plywood",
  "mdf",
  "acrylic",
  "hdpe",
  "composite",
] as const;

const code = z
  .string()
  .trim()
  .max(24)
  .regex(/^[\w./-]+$/, "Letters, digits and . / - only: it is printed on labels.");

/** A material as it is typed. */
export const materialSchema = z.object({
  version: z.number().int().optional(),
  code,
  name: z.string().trim().min(1).max(80),
  kind: z.enum(MATERIAL_KINDS),
  nominalThickness: z.number().positive().max(200),
  sheetLength: millimetres,
  sheetWidth: millimetres,
  hasGrain: z.boolean().default(false),
  density: z.number().min(10).max(10_000),
  sheetPrice: dollars,
});

const optionalText = z
  .string()
  .trim()
  .max(120)
  .optional()
  .transform((words) => words ?? null);

/** What is written down of a lot beside its thickness. */
export const lotSchema = z.object({
  version: z.number().int().optional(),
  code,
  supplierLot: optionalText,
  supplierDocument: optionalText,
  sheetsOnHand: z.number().int().min(0).max(10_000),
});

/** How many sheets of a stack the form has room for: top, middle, bottom. */
export const MEASURED_SHEETS = 3;

const point = z
  .number("A number of millimetres.")
  .positive()
  .max(200, "Thicker than anything here.")
  .optional();

/** Readings as they are typed: a row a sheet, a box a point, empty boxes left out. */
export const readingsSchema = z.object({
  version: z.number().int().optional(),
  sheets: z
    .array(
      z.object({
        sheet: z.number().int().min(1).max(10_000).optional(),
        points: z.array(point).max(READING_POINTS.length).default([]),
      }),
    )
    .max(MEASURED_SHEETS)
    .default([]),
});

export const newLotSchema = lotSchema.extend(readingsSchema.shape);

/** The readings that were given. A row without a number counts as the sheet at its place. */
export const readingsOf = (form: Pick<z.output<typeof readingsSchema>, "sheets">): ThicknessReading[] =>
  form.sheets.flatMap(({ sheet, points }, row) =>
    points.flatMap((thickness, at) =>
      thickness === undefined ? [] : [{ sheet: sheet ?? row + 1, position: READING_POINTS[at], thickness }],
    ),
  );
