import { z } from "zod";
import { SHOP_STAGES, STAGES, WAITING_CODES } from "~/domain/orders";

/** The shapes of the API's answers: what the routes give, and what the API's document is made from. */

const instant = z.iso.datetime().describe("An instant in UTC.");
const cents = z.int().describe("Integer cents.");
const millimetres = z.number().min(0).describe("Millimetres.");
const currency = z
  .string()
  .regex(/^[a-z]{3}$/)
  .describe("ISO 4217, in small letters.");
const stage = z.enum(STAGES).describe("The order's stage, spelled just so everywhere.");
const pieceStage = z.enum(SHOP_STAGES);

export const waitingSchema = z
  .object({
    who: z.enum(["builder", "shop"]).describe("Whose turn it is."),
    code: z.enum(WAITING_CODES),
    words: z.string(),
  })
  .describe("What the order waits for; null when it is shipped or cancelled.");

const summary = {
  id: z.string(),
  reference: z.string().describe("What people say on the telephone: KP-2047."),
  name: z.string(),
  builder: z.object({ name: z.string() }),
  stage,
  heldFrom: stage.nullable().describe("While on hold: the stage it goes back to."),
  waitingFor: waitingSchema.nullable(),
  delivery: z.enum(["ship", "pick-up"]).nullable(),
  total: z.object({ cents, currency }).nullable().describe("Of the current quote."),
  promisedFor: instant.nullable(),
  paidAt: instant.nullable(),
  shippedAt: instant.nullable(),
  createdAt: instant,
  updatedAt: instant,
  url: z.url(),
  statusUrl: z.url(),
};

export const orderSummarySchema = z.object(summary);
export type OrderSummary = z.infer<typeof orderSummarySchema>;

export const orderPageSchema = z.object({
  orders: z.array(orderSummarySchema).describe("Newest first."),
  next: z.url().nullable().describe("The page behind this one; null at the end."),
});

export const orderSchema = z.object({
  ...summary,
  trial: z.boolean(),
  holdReason: z.string().nullable(),
  shipTo: z
    .object({
      recipient: z.string(),
      company: z.string().nullable(),
      line1: z.string(),
      line2: z.string().nullable(),
      city: z.string(),
      region: z.string(),
      postcode: z.string(),
      country: z.string(),
    })
    .nullable(),
  drawings: z.array(
    z.object({
      id: z.string(),
      fileName: z.string(),
      sha256: z
        .string()
        .regex(/^[0-9a-f]{64}$/)
        .describe("Of the bytes as they were uploaded."),
      url: z.url(),
    }),
  ),
  parts: z
    .array(
      z.object({
        label: z.string(),
        name: z.string(),
        width: millimetres,
        height: millimetres,
        quantity: z.int().min(1),
        material: z.string().nullable(),
      }),
    )
    .describe("Of the frozen revision; empty until the order is quoted."),
  quote: z
    .object({
      number: z.int().min(1),
      lines: z.array(z.object({ kind: z.string(), label: z.string(), how: z.string(), amount: cents })),
      net: cents,
      tax: cents,
      total: cents,
      currency,
      machineMinutes: z.number().min(0),
      expiresAt: instant,
      expired: z.boolean(),
      approvedAt: instant.nullable(),
    })
    .nullable(),
  parcels: z.array(
    z.object({
      number: z.int().min(1),
      length: millimetres,
      width: millimetres,
      height: millimetres,
      weight: z.number().min(0).describe("Kilograms, packing included."),
      handedOverAt: instant.nullable(),
      trackingNumbers: z.array(z.string()),
    }),
  ),
});
export type OrderAnswer = z.infer<typeof orderSchema>;

export const statusSchema = z.object({
  id: z.string(),
  reference: z.string(),
  stage,
  heldFrom: stage.nullable(),
  waitingFor: waitingSchema.nullable(),
  promisedFor: instant.nullable(),
  shippedAt: instant.nullable(),
  late: z.boolean().describe("Paid, not shipped, and the promised day is over in the shop's time zone."),
  progress: z
    .array(z.object({ stage: pieceStage, reached: z.int().min(0), of: z.int().min(0) }))
    .describe("How many good pieces have reached each stage of the shop, those further on included."),
  pieces: z
    .array(
      z.object({
        part: z.string().describe("The part's label on drawing and list."),
        name: z.string(),
        number: z.int().min(1),
        of: z.int().min(1),
        stage: pieceStage,
        state: z.enum(["good", "spoiled", "missing", "cancelled"]),
        remake: z.boolean().describe("Made in place of a spoiled or missing one."),
      }),
    )
    .describe("Every physical piece; empty until the shop has received the order."),
  updatedAt: instant,
  eventsUrl: z.url(),
});
export type StatusAnswer = z.infer<typeof statusSchema>;

/** What may be asked of the list. A name that is not here is refused rather than passed over. */
export const orderListQuerySchema = z.strictObject({
  stage: z
    .preprocess(
      (given) => (typeof given === "string" ? given.split(",") : given),
      z.array(z.enum(STAGES)).min(1),
    )
    .optional()
    .describe("Only orders at these stages, parted by commas."),
  q: z.string().trim().min(1).max(80).optional().describe("Part of a name or a reference."),
  since: z.iso
    .datetime({ offset: true })
    .optional()
    .describe("Only orders changed at this instant or later."),
  limit: z.coerce.number().int().min(1).max(100).default(25).describe("Orders on a page."),
  cursor: z
    .string()
    .regex(/^\d{1,15}\.[\w-]{1,64}$/, "Take it from the address in next")
    .optional()
    .describe("Where the page before ended: part of the address in next, not made by hand."),
});
