/** Bodies of the carrier's requests. Postal codes are US ZIP codes; lengths in mm, weights in kg. */
import { z } from "zod";

const address = z.strictObject({
  name: z.string().min(1).max(64),
  company: z.string().max(64).optional(),
  line1: z.string().min(1).max(64),
  line2: z.string().max(64).optional(),
  city: z.string().min(1).max(64),
  region: z.string().min(2).max(32),
  postalCode: z.string().regex(/^\d{5}(-\d{4})?$/),
  country: z.literal("US"),
  phone: z.string().max(32).optional(),
});

const parcel = z.strictObject({
  weightKg: z.number().positive(),
  lengthMm: z.number().positive(),
  widthMm: z.number().positive(),
  heightMm: z.number().positive(),
});

export const ratesBody = z.strictObject({
  from: address,
  to: address,
  parcels: z.array(parcel).min(1).max(50),
});

export const labelBody = z.strictObject({
  from: address,
  to: address,
  parcel,
  service: z.enum(["towpath-ground", "towpath-swift"]),
  reference: z.string().max(64).optional(),
});
