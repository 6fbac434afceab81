import { z } from "zod";
import { type LayerChoice, partChoiceSchema, sandingSchema, shipToSchema } from "~/domain/orders";
import { INCH_IN_MM, LENGTH_UNITS } from "~/domain/units";

/** What the forms of an order's page send, checked alike in the browser and on the server. */

const count = z.coerce.number().int().min(0);
const sha = z.string().regex(/^[0-9a-f]{64}$/);
/** The order's version as its page was read. */
const versioned = { version: count };
/** The number of the interpretation that a change is made from. */
const numbered = { after: count };
/** Made with the page: the same act sent twice moves once. */
const moving = { ...versioned, requestId: z.uuid() };

export const renameSchema = z.object({
  intent: z.literal("rename"),
  ...versioned,
  name: z.string({ error: "A name has 1 to 80 characters." }).trim().min(1).max(80),
  trial: z.stringbool().default(false),
});

/** The two questions of a new order; whichever is still open. */
export const startSchema = z.object({
  intent: z.literal("start"),
  ...numbered,
  unitFor: z.array(sha).default([]),
  unit: z.enum(LENGTH_UNITS, { error: "Say which size is right." }).optional(),
  stockFor: z.array(sha).default([]),
  materialId: z.string({ error: "Choose what it is cut from." }).min(1).optional(),
});

export const fileSchema = z.object({
  intent: z.literal("file"),
  ...numbered,
  sha256: sha,
  unit: z.enum(LENGTH_UNITS),
  materialId: z.string({ error: "Choose what it is cut from." }).min(1),
});

/** A layer as its line of the form sends it: the depth is a number in the unit that the form was shown in. */
const layerLineSchema = z
  .object({
    layer: z.string(),
    kind: z.enum(["by-shape", "outside", "cut-through", "pocket", "drill", "engrave", "set-aside"]),
    how: z.enum(["through", "depth", "leave"]).default("through"),
    value: z.coerce.number({ error: "A depth is a number." }).positive("More than nothing.").optional(),
  })
  .refine(({ kind, how, value }) => !takesDepth(kind) || how === "through" || value !== undefined, {
    path: ["value"],
    error: "Say how much.",
  });

/** Operations that may stop inside the sheet. */
export const takesDepth = (kind: string): boolean =>
  kind === "pocket" || kind === "drill" || kind === "engrave";

export const layersSchema = z.object({
  intent: z.literal("layers"),
  ...numbered,
  sha256: sha,
  shown: z.enum(["mm", "in"]),
  layers: z.array(layerLineSchema),
});

/** Rules out of the lines of the form; layers left to their shapes have none. Depths in millimetres. */
export function rulesOfLines({
  layers,
  shown,
}: Pick<z.infer<typeof layersSchema>, "layers" | "shown">): LayerChoice[] {
  return layers.flatMap(({ layer, kind, how, value }): LayerChoice[] => {
    if (kind === "by-shape") return [];
    if (!takesDepth(kind) || how === "through" || value === undefined) return [{ layer, kind, depth: null }];
    const length = shown === "in" ? value * INCH_IN_MM : value;
    return [{ layer, kind, depth: how === "leave" ? { leave: length } : { depth: length } }];
  });
}

export const partSchema = z.object({
  intent: z.literal("part"),
  ...numbered,
  sha256: sha,
  letter: partChoiceSchema.shape.letter,
  name: z.string().trim().max(60, "At most 60 characters.").optional(),
  grain: partChoiceSchema.shape.grain,
});

export const choicesSchema = z.object({
  intent: z.literal("choices"),
  ...numbered,
  sanding: sandingSchema,
  leaveTabs: z.stringbool().default(false),
  sets: z
    .array(
      z.object({
        sha256: sha,
        sets: z.coerce
          .number({ error: "1 to 999 sets." })
          .int("Whole sets.")
          .min(1, "1 to 999 sets.")
          .max(999, "1 to 999 sets."),
      }),
    )
    .default([]),
});

export const undoSchema = z.object({ intent: z.literal("undo"), ...numbered });

/** The value of the first choice; any other is the id of an address in the book. */
export const PICK_UP = "pick-up";

export const deliverySchema = z.object({
  intent: z.literal("delivery"),
  ...versioned,
  to: z.string({ error: "Say where it goes." }).min(1),
});

export const newAddressSchema = z.object({
  intent: z.literal("new-address"),
  ...versioned,
  shipTo: shipToSchema.extend({ residential: z.stringbool().default(false) }),
  keep: z.stringbool().default(false),
});

export const takeOutSchema = z.object({ intent: z.literal("take-out"), ...versioned, drawingId: z.string() });

export const quoteSchema = z.object({ intent: z.literal("quote"), ...moving });

export const paySchema = z.object({
  intent: z.literal("pay"),
  ...versioned,
  quoteId: z.string(),
  listHash: z.string(),
  approved: z.literal("yes", {
    error: "Look the part list over and tick this first: it is cut as listed.",
  }),
});

export const requoteSchema = z.object({ intent: z.literal("requote"), ...moving });
export const reviseSchema = z.object({ intent: z.literal("revise"), ...moving });
export const askReviewSchema = z.object({
  intent: z.literal("ask-review"),
  ...moving,
  reason: z.string().trim().max(500).optional(),
});

export const answerSchema = z.object({
  intent: z.literal("answer"),
  findingId: z.string(),
  answer: z.enum(["accept", "message"]),
  note: z.string().trim().max(1000, "At most 1,000 characters.").optional(),
});

export const cancelSchema = z.object({
  intent: z.literal("cancel"),
  ...moving,
  reason: z.string({ error: "Say why it is cancelled." }).trim().min(1).max(500),
});

export const ORDER_ACTS = {
  rename: renameSchema,
  start: startSchema,
  file: fileSchema,
  layers: layersSchema,
  part: partSchema,
  choices: choicesSchema,
  undo: undoSchema,
  delivery: deliverySchema,
  "new-address": newAddressSchema,
  "take-out": takeOutSchema,
  quote: quoteSchema,
  pay: paySchema,
  requote: requoteSchema,
  revise: reviseSchema,
  "ask-review": askReviewSchema,
  answer: answerSchema,
  cancel: cancelSchema,
} as const;
export type OrderAct = keyof typeof ORDER_ACTS;
