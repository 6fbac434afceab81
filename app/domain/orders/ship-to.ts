import { z } from "zod";

/** Lines of at least 64 characters each, as USPS Publication 28 asks; the secondary unit stands at the end of a delivery line. */
const line = (most: number) => z.string().trim().max(most);

export const shipToSchema = z.object({
  recipient: line(64).min(1, "Who receives it?"),
  company: line(64).optional(),
  line1: line(64).min(1, "Street and number"),
  line2: line(64).optional(),
  city: line(64).min(1, "City"),
  region: z
    .string()
    .trim()
    .toUpperCase()
    .regex(/^[A-Z]{2}$/, "Two letters, like OR"),
  postcode: z
    .string()
    .trim()
    .regex(/^\d{5}(-\d{4})?$/, "Five digits, or nine with a hyphen"),
  country: z.literal("US").default("US"),
  phone: line(32).optional(),
  residential: z.boolean().default(true),
});
export type ShipTo = z.infer<typeof shipToSchema>;
