/** The parameters each request may carry; anything else is refused as the real service refuses it. */
import { z } from "zod";
import { invalidRequest, type PaymentsFailure } from "./errors";
import type { FormFields } from "./form";
import { type LineItem, newId } from "./objects";

const integer = z
  .string()
  .regex(/^-?\d+$/)
  .transform(Number);
const expand = z.array(z.string()).optional();
const metadata = z
  .record(z.string().max(40), z.string().max(500))
  .refine((pairs) => Object.keys(pairs).length <= 50)
  .optional();
const currency = z.string().regex(/^[a-z]{3}$/);

export const newSession = z.strictObject({
  mode: z.literal("payment"),
  success_url: z.url(),
  cancel_url: z.url().optional(),
  client_reference_id: z.string().max(200).optional(),
  customer_email: z.email().optional(),
  expires_at: integer.optional(),
  line_items: z
    .array(
      z.strictObject({
        quantity: integer,
        price_data: z.strictObject({
          currency,
          unit_amount: integer,
          product_data: z.strictObject({
            name: z.string().min(1),
            description: z.string().min(1).optional(),
          }),
        }),
      }),
    )
    .min(1)
    .max(100),
  locale: z.string().optional(),
  metadata,
  payment_intent_data: z
    .strictObject({
      description: z.string().optional(),
      metadata,
      receipt_email: z.email().optional(),
    })
    .optional(),
  payment_method_types: z.array(z.literal("card")).optional(),
  submit_type: z.enum(["auto", "book", "donate", "pay"]).optional(),
  expand,
});

export const listSessions = z.strictObject({
  payment_intent: z.string().optional(),
  status: z.enum(["open", "complete", "expired"]).optional(),
  limit: integer.optional(),
  expand,
});

export const newRefund = z.strictObject({
  payment_intent: z.string().optional(),
  charge: z.string().optional(),
  amount: integer.optional(),
  reason: z.enum(["duplicate", "fraudulent", "requested_by_customer"]).optional(),
  metadata,
  expand,
});

/** An empty value removes a key of metadata. */
export const changedIntent = z.strictObject({
  description: z.string().optional(),
  metadata,
  receipt_email: z.email().optional(),
  expand,
});

export const onlyExpand = z.strictObject({ expand });

/** Parses parameters; throws the service's own error for the first one that is wrong. */
export function parseParameters<Output>(schema: z.ZodType<Output>, fields: FormFields): Output {
  const parsed = schema.safeParse(fields);
  if (parsed.success) return parsed.data;
  const issue = parsed.error.issues[0];
  if (!issue) throw parsed.error;
  throw parameterFailure(issue, fields);
}

function parameterFailure(issue: z.core.$ZodIssue, fields: FormFields): PaymentsFailure {
  const path = issue.path.map(String);
  if (issue.code === "unrecognized_keys") {
    const param = nameOf([...path, issue.keys[0] ?? ""]);
    return invalidRequest(`Received unknown parameter: ${param}`, { code: "parameter_unknown", param });
  }
  const param = nameOf(path);
  if (valueAt(fields, path) === undefined)
    return invalidRequest(`Missing required param: ${param}.`, { code: "parameter_missing", param });
  return invalidRequest(`Invalid ${param}: ${issue.message}`, { param });
}

function nameOf(path: string[]): string {
  return path.map((step, index) => (index === 0 ? step : `[${step}]`)).join("");
}

function valueAt(fields: FormFields, path: string[]): unknown {
  let at: unknown = fields;
  for (const step of path) {
    if (typeof at !== "object" || at === null) return undefined;
    at = (at as Record<string, unknown>)[step];
  }
  return at;
}

/** Line items as the service keeps them; all must share one currency. */
export function lineItemsOf(items: z.output<typeof newSession>["line_items"]): LineItem[] {
  const first = items[0]?.price_data.currency;
  return items.map(({ quantity, price_data }) => {
    if (price_data.currency !== first)
      throw invalidRequest("All prices on a Checkout Session must be in the same currency.", {
        param: "line_items",
      });
    return {
      id: newId("li"),
      object: "item",
      description: price_data.product_data.name,
      quantity,
      currency: price_data.currency,
      amount_subtotal: price_data.unit_amount * quantity,
      amount_total: price_data.unit_amount * quantity,
    };
  });
}
