import { z } from "zod";
import { requireOrder } from "~/auth/guards.server";
import { requireSameOrigin } from "~/auth/same-origin.server";
import { interpretationSchema } from "~/domain/orders";
import type { PricedQuote } from "~/domain/pricing";
import { priceOrder } from "~/flows/price-order.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import type { Route } from "./+types/price";
import { only } from "./methods.server";

export const middleware: Route.MiddlewareFunction[] = [only("POST")];

/** What may differ from what is saved; left out, the saved choice counts. */
const askedSchema = z.object({
  content: interpretationSchema.optional(),
  delivery: z
    .discriminatedUnion("delivery", [
      z.object({ delivery: z.literal("pick-up"), region: z.null().default(null) }),
      z.object({ delivery: z.literal("ship"), region: z.string().regex(/^[A-Z]{2}$/) }),
    ])
    .optional(),
});
export type AskedPrice = z.infer<typeof askedSchema>;

/** Prices an order under the choices sent, without saving anything. */
export async function action(args: Route.ActionArgs) {
  const { person } = await requireOrder(args, "order.read", args.params.orderId);
  const { request } = args;
  requireSameOrigin(request);
  const asked = askedSchema.safeParse(await request.json().catch(() => undefined));
  if (!asked.success)
    return Response.json(
      { ok: false, reason: "invalid", words: z.prettifyError(asked.error) },
      { status: 400 },
    );
  const priced = await priceOrder({ actor: person, orderId: args.params.orderId, ...asked.data });
  if (!priced.ok) return Response.json(priced, { status: REFUSAL_STATUS[priced.reason] });
  const { quote, currency, promisedFor, promiseHow, wouldExpireAt } = priced;
  return Response.json({
    ok: true,
    quote,
    currency,
    promisedFor: promisedFor.toISOString(),
    promiseHow,
    wouldExpireAt: wouldExpireAt.toISOString(),
  } satisfies PriceAnswer);
}

/** What the page gets: integer cents, instants as ISO strings. A refusal is `{ ok: false, reason, words }`. */
export interface PriceAnswer {
  readonly ok: true;
  readonly quote: PricedQuote;
  readonly currency: string;
  readonly promisedFor: string;
  readonly promiseHow: string;
  readonly wouldExpireAt: string;
}
