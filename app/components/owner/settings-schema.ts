import { z } from "zod";
import { type ShopSettings, shopSettingsSchema } from "~/domain/orders";
import { dayLines, dollars, linesOf, millimetres, percent } from "./number-schemas";

const MEGABYTE = 1024 * 1024;
const text = (most: number) => z.string().trim().max(most);
const days = (most: number) => z.number().int().min(0).max(most);

function isZone(name: string): boolean {
  try {
    return new Intl.DateTimeFormat("en-US", { timeZone: name }).format(0) !== "";
  } catch {
    return false;
  }
}

const region = z
  .string()
  .trim()
  .toUpperCase()
  .regex(/^[A-Z]{2}$/, "Two letters of a state: WA.");

/** The settings as they are typed: money in dollars, rates in percent, lists one a line. Comes out as it is kept. */
export const settingsFormSchema = z.object({
  version: z.number().int(),
  shop: z.object({
    name: text(100).min(1),
    email: z.email(),
    phone: text(40).default(""),
    address: text(500)
      .transform(linesOf)
      .pipe(z.array(z.string()).min(1, "The address stands on labels and mails.")),
    timeZone: text(60).refine(isZone, "No such zone: write America/Los_Angeles."),
  }),
  tax: z.object({
    regions: z
      .array(z.object({ region, rate: percent(0, 20), freightTaxable: z.boolean().default(false) }))
      .max(60)
      .default([])
      .refine(
        (rows) => new Set(rows.map((row) => row.region)).size === rows.length,
        "A state stands here twice.",
      ),
    homeRegion: region,
  }),
  review: z.object({ cap: dollars.pipe(z.number().int().positive("More than nothing.")) }),
  quote: z.object({ validDays: z.number().int().min(1).max(90) }),
  upload: z.object({
    maxMegabytes: z.number().positive().max(512),
    maxFiles: z.number().int().min(1).max(500),
  }),
  lead: z.object({
    cutOffHour: z.number().int().min(0).max(23),
    bufferDays: days(60),
    transitDays: days(60),
    holidays: dayLines,
  }),
  nesting: z.object({
    spacing: millimetres,
    margin: z.number().min(0).max(500),
    plannedYield: percent(30, 95),
  }),
  fit: z.object({
    smallestTool: millimetres,
    bridge: z.number().min(0).max(10),
    bridgeAsk: z.number().min(0).max(10),
    smallestHeldArea: z.number().positive().max(1_000_000),
    smallestHeldWidth: millimetres,
    thinFloor: millimetres,
    thinnestFloor: millimetres,
  }),
  retention: z.object({ abandonedDraftDays: z.number().int().min(1).max(3650) }),
  terms: z.string().trim().max(20_000).default(""),
});
type SettingsForm = z.input<typeof settingsFormSchema>;

/** What is kept of a form that was filled in. */
export function settingsOf(form: z.output<typeof settingsFormSchema>): ShopSettings {
  const { version: _version, upload, shop, ...rest } = form;
  return shopSettingsSchema.parse({
    ...rest,
    shop: { ...shop, currency: "usd" },
    upload: { maxBytes: Math.round(upload.maxMegabytes * MEGABYTE), maxFiles: upload.maxFiles },
  });
}

const inPercent = (share: number): number => Math.round(share * 1e6) / 1e4;

/** What the form begins with. */
export function settingsFormOf(settings: ShopSettings, version: number): SettingsForm {
  const { currency: _currency, ...shop } = settings.shop;
  return {
    ...settings,
    version,
    shop: { ...shop, address: shop.address.join("\n") },
    tax: {
      homeRegion: settings.tax.homeRegion,
      regions: settings.tax.regions.map((row) => ({ ...row, rate: inPercent(row.rate) })),
    },
    review: { cap: settings.review.cap / 100 },
    upload: { maxMegabytes: settings.upload.maxBytes / MEGABYTE, maxFiles: settings.upload.maxFiles },
    lead: { ...settings.lead, holidays: settings.lead.holidays.join("\n") },
    nesting: { ...settings.nesting, plannedYield: inPercent(settings.nesting.plannedYield) },
  };
}
