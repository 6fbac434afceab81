import { z } from "zod";

/** What the owner sets that is not a price. Money in integer cents, lengths in millimetres, shares between 0 and 1. */
export const shopSettingsSchema = z.object({
  shop: z.object({
    name: z.string().min(1),
    email: z.email(),
    phone: z.string(),
    address: z.array(z.string()).min(1),
    timeZone: z.string(),
    currency: z.literal("usd"),
    /** The shop's own GS1 company prefix, for container codes on its parcels; most small shops have none. */
    gs1Prefix: z
      .string()
      .regex(/^\d{7,10}$/)
      .optional(),
  }),
  /** Where the shop collects sales tax. An accountant sets these. */
  tax: z.object({
    regions: z.array(
      z.object({ region: z.string(), rate: z.number().min(0).max(0.2), freightTaxable: z.boolean() }),
    ),
    /** Where pick-up is taxed. */
    homeRegion: z.string(),
  }),
  review: z.object({
    /** An order above this waits for a person before it can be paid. */
    cap: z.number().int().positive(),
  }),
  quote: z.object({ validDays: z.number().int().min(1).max(90) }),
  upload: z.object({ maxBytes: z.number().int().positive(), maxFiles: z.number().int().positive() }),
  lead: z.object({
    /** Approvals after this local hour count from the next working day. */
    cutOffHour: z.number().int().min(0).max(23),
    bufferDays: z.number().int().min(0),
    transitDays: z.number().int().min(0),
    holidays: z.array(z.iso.date()),
  }),
  nesting: z.object({
    spacing: z.number().positive(),
    margin: z.number().min(0),
    /** Share of a sheet planned to become parts, until an order is really nested. */
    plannedYield: z.number().min(0.3).max(0.95),
  }),
  fit: z.object({
    smallestTool: z.number().positive(),
    bridge: z.number().min(0),
    bridgeAsk: z.number().min(0),
    smallestHeldArea: z.number().positive(),
    smallestHeldWidth: z.number().positive(),
    thinFloor: z.number().positive(),
    thinnestFloor: z.number().positive(),
  }),
  retention: z.object({ abandonedDraftDays: z.number().int().positive() }),
  terms: z.string(),
});
export type ShopSettings = z.infer<typeof shopSettingsSchema>;
