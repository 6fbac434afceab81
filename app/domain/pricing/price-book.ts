import { z } from "zod";

const money = z.number().int().min(0);
const share = z.number().min(0);

/**
 * A version of the shop's prices. Money in integer cents; rates per hour in cents; times in minutes; speeds in
 * millimetres per minute. Sheet prices stand with the materials; the mark-up on them stands here.
 */
export const priceBookSchema = z.object({
  currency: z.literal("usd"),
  /** Share added to the sheet's price. */
  materialMarkUp: share,
  /** Machine time, cents per hour. */
  machineHour: money,
  /** Bench labour, cents per hour. */
  benchHour: money,
  /** Once per order, and once more for every further stock. */
  setUp: money,
  setUpPerFurtherStock: money,
  /** Average speed of cutting through the material, millimetres per minute, by nominal thickness up to and including. */
  cutSpeeds: z
    .array(
      z.object({
        upToThickness: z.number().positive(),
        speed: z.number().positive(),
        passes: z.number().int().positive(),
      }),
    )
    .min(1),
  secondsPerHole: share,
  minutesPerSheet: share,
  toolChangeMinutes: share,
  /** Tabs by outer length, at least two a part. */
  tabSpacing: z.number().positive(),
  secondsPerTab: share,
  /** Sanding, seconds per metre of edge. */
  sanding: z.object({ none: share, arrises: share, "grit-150": share }),
  packing: z.object({ perOrder: money, perPiece: money }),
  /**
   * Freight until carrier rates are asked live: a base per parcel and cents per kilogram, or on pallets, which
   * is what a panel too large or heavy for a parcel needs.
   */
  freight: z.object({
    perParcel: money,
    perKilogram: money,
    maxParcelKilograms: z.number().positive(),
    perPallet: money,
    palletPerKilogram: money,
    maxPalletKilograms: z.number().positive(),
  }),
  minimumOrder: money,
});
export type PriceBook = z.infer<typeof priceBookSchema>;
