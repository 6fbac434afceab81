import { z } from "zod";

/** Lines of at least 64 characters each, as USPS Publication 28 asks; the secondary unit stands at the end of a delivery line. */
const line = (most: number) => z.string().trim().max(most);
/** A line that must be there: an empty one and a missing one are told the same. */
const needed = (words: string) => z.string({ error: words }).trim().min(1, words).max(64);

export const shipToSchema = z.object({
  recipient: needed("Who receives it?"),
  company: line(64).optional(),
  line1: needed("Street and number"),
  line2: line(64).optional(),
  city: needed("City"),
  region: z
    .string({ error: "Two letters, like OR" })
    .trim()
    .toUpperCase()
    .regex(/^[A-Z]{2}$/, "Two letters, like OR"),
  postcode: z
    .string({ error: "Five digits, or nine with a hyphen" })
    .trim()
    .regex(/^\d{5}(-\d{4})?$/, "Five digits, or nine with a hyphen"),
  country: z.literal("US").default("US"),
  phone: line(32).optional(),
  residential: z.boolean().default(true),
});
export type ShipTo = z.infer<typeof shipToSchema>;
