import { z } from "zod";

/** What the forms of the staff's order page send, checked alike in the browser and on the server. */

const moving = {
  /** The order's version as its page was read. */
  version: z.coerce.number().int(),
  /** Made with the page: the same act sent twice moves once. */
  requestId: z.uuid(),
};
const reason = z
  .string({ error: "Write down why." })
  .trim()
  .min(3, "Write down why, in a few words.")
  .max(500, "At most 500 characters.");

export const moveSchema = z.object(moving);
export const reasonedSchema = z.object({ ...moving, reason });
export const somePiecesSchema = z.object({
  ...moving,
  piece: z.array(z.string(), { error: "Tick at least one piece." }).min(1, "Tick at least one piece."),
});

export const PAYERS = ["shop", "builder", "carrier", "supplier"] as const;
export const remakeSchema = z.object({
  ...moving,
  pieceId: z.string({ error: "Choose the piece." }).min(1, "Choose the piece."),
  state: z.enum(["spoiled", "missing"], { error: "Say what is wrong with it." }),
  payer: z.enum(PAYERS, { error: "Say who pays." }),
  reason,
});

export const startRunSchema = z.object({ runId: z.string(), runVersion: z.coerce.number().int() });
export const finishRunSchema = startRunSchema.extend({
  minutes: z.coerce
    .number({ error: "Minutes are a number." })
    .min(0, "Minutes are 0 or more.")
    .max(1440, "At most a day.")
    .optional(),
});

export const refundSchema = z.object({
  checkoutId: z.string(),
  refundId: z.uuid(),
  /** Typed in whole units of the currency, kept in cents. */
  amount: z
    .string({ error: "Say how much." })
    .trim()
    .regex(/^\d{1,7}([.,]\d{1,2})?$/, "An amount like 18.50.")
    .transform((typed) => Math.round(Number(typed.replace(",", ".")) * 100)),
  reason,
});
