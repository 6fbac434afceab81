import { z } from "zod";
import { type PriceBook, priceBookSchema } from "~/domain/pricing";
import { dollars, percent } from "./number-schemas";

const amount = z.number().min(0).max(1_000_000);
const size = z.number().positive().max(1_000_000);

/** The price book as it is typed: money in dollars, the mark-up in percent. Comes out as it is kept. */
export const priceBookFormSchema = z.object({
  stamp: z.string(),
  note: z.string().trim().max(500).optional(),
  materialMarkUp: percent(0, 500),
  machineHour: dollars,
  benchHour: dollars,
  setUp: dollars,
  setUpPerFurtherStock: dollars,
  cutSpeeds: z
    .array(
      z.object({
        upToThickness: size,
        speed: size,
        passes: z.number().int().min(1).max(50),
      }),
    )
    .min(1, "At least one speed is needed.")
    .max(12)
    .transform((speeds) => speeds.toSorted((one, other) => one.upToThickness - other.upToThickness)),
  secondsPerHole: amount,
  minutesPerSheet: amount,
  toolChangeMinutes: amount,
  tabSpacing: size,
  secondsPerTab: amount,
  sanding: z.object({ none: amount, arrises: amount, "grit-150": amount }),
  packing: z.object({ perOrder: dollars, perPiece: dollars }),
  freight: z.object({
    perParcel: dollars,
    perKilogram: dollars,
    maxParcelKilograms: size,
    perPallet: dollars,
    palletPerKilogram: dollars,
    maxPalletKilograms: size,
  }),
  minimumOrder: dollars,
});
type PriceBookForm = z.input<typeof priceBookFormSchema>;

/** What is kept of a form that was filled in. */
export function priceBookOf(form: z.output<typeof priceBookFormSchema>): PriceBook {
  const { stamp: _stamp, note: _note, ...book } = form;
  return priceBookSchema.parse({ ...book, currency: "usd" });
}

const inDollars = (cents: number): number => cents / 100;

/** What the form begins with. */
export function priceBookFormOf(book: PriceBook, note: string | null, stamp: string): PriceBookForm {
  const { currency: _currency, ...rest } = book;
  const { freight, packing } = book;
  return {
    ...rest,
    stamp,
    note: note ?? undefined,
    materialMarkUp: Math.round(book.materialMarkUp * 1e6) / 1e4,
    machineHour: inDollars(book.machineHour),
    benchHour: inDollars(book.benchHour),
    setUp: inDollars(book.setUp),
    setUpPerFurtherStock: inDollars(book.setUpPerFurtherStock),
    packing: { perOrder: inDollars(packing.perOrder), perPiece: inDollars(packing.perPiece) },
    freight: {
      ...freight,
      perParcel: inDollars(freight.perParcel),
      perKilogram: inDollars(freight.perKilogram),
      perPallet: inDollars(freight.perPallet),
      palletPerKilogram: inDollars(freight.palletPerKilogram),
    },
    minimumOrder: inDollars(book.minimumOrder),
  };
}
