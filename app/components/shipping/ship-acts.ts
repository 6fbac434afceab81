import { z } from "zod";
import { moveSchema } from "../shop/order-acts";

/** What the forms of the clerk's order page send. */

const flagSchema = z.enum(["yes", "no"]).transform((word) => word === "yes");

export const countSchema = z.object({ piece: z.array(z.string()).min(1), counted: flagSchema });
export const countAllSchema = z.object({ counted: flagSchema });

/** Piece ids of each parcel, as the page holds them. */
export const packSchema = z.object({
  bundles: z
    .string()
    .transform((text, context) => {
      try {
        return JSON.parse(text) as unknown;
      } catch {
        context.addIssue({ code: "custom", message: "The parcels could not be read." });
        return z.NEVER;
      }
    })
    .pipe(z.array(z.array(z.string()).max(2000)).max(200)),
});

export const buySchema = z.object({ service: z.string({ error: "Choose a service." }).min(1) });
export const voidSchema = z.object({ labelId: z.string() });
export const freightSchema = z.object({
  parcelId: z.string(),
  number: z.string({ error: "Type the number." }).trim().min(3, "Type the number.").max(40),
});
export const readySchema = z.object({ requestId: z.uuid() });
export const handOverSchema = moveSchema;

const point = z.tuple([z.number(), z.number()]);
export const collectSchema = moveSchema.extend({
  name: z.string({ error: "Who takes it? Type the name." }).trim().min(2, "Type the name.").max(80),
  strokes: z
    .string()
    .max(200_000)
    .transform((text, context) => {
      try {
        return JSON.parse(text) as unknown;
      } catch {
        context.addIssue({ code: "custom", message: "A signature is missing." });
        return z.NEVER;
      }
    })
    .pipe(z.array(z.array(point).max(5000)).max(500)),
});
