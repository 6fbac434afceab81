import { db, transact } from "~/db/client.server";
import { checkMove } from "~/domain/orders";
import {
  attachSession,
  type Checkout,
  closeCheckout,
  findOpenCheckout,
  insertCheckout,
} from "~/models/checkouts.server";
import { recordEvent } from "~/models/events.server";
import { owedOnQuote } from "~/models/ledger.server";
import { findOrder, type Order } from "~/models/orders.server";
import { findQuote, type Quote } from "~/models/quotes.server";
import { environment } from "~/server/environment.server";
import { payments } from "~/services/clients.server";
import { type Actor, scopeOfActor } from "./actor";
import { closeOpenCheckout } from "./close-checkout.server";
import { refusalOfMove } from "./move.server";
import { factsOfOrder } from "./order-facts.server";
import { CHANGED, NO_ORDER, refuse, type Verdict } from "./verdict";

/** How long a pay page stays open. The payment service takes 30 minutes to 24 hours. */
const CHECKOUT_MINUTES = 60;
/** An open pay page is used again while it has at least this long, one not yet made while the service takes it. */
const WORTH_REUSING_MINUTES = 5;
const SHORTEST_AT_SERVICE_MINUTES = 31;
const MINUTE = 60_000;

export interface StartCheckoutOptions {
  readonly actor: Actor & { readonly email: string; readonly emailVerified: boolean };
  readonly orderId: string;
  readonly now?: Date;
}

/**
 * Opens the hosted pay page for what is still owed on the order's approved quote, or gives the open one again.
 * Whatever goes wrong in between, the order stays payable: the checkout's id is the idempotency key, so a second
 * try continues the first.
 */
export async function startCheckout({
  actor,
  orderId,
  now = new Date(),
}: StartCheckoutOptions): Promise<Verdict<{ url: string; checkoutId: string }>> {
  if (!actor.emailVerified)
    return refuse("unverified", "Confirm your e-mail address first; the receipt is sent there.");
  const open = await findOpenCheckout(db, orderId);
  if (open && !isWorthReusing(open, await currentQuoteId(actor, orderId), now)) {
    const closed = await closeOpenCheckout({ orderId, as: "expired" });
    if (!closed.ok) return closed;
  }
  const begun = await transact((tx) => begin(tx, { actor, orderId, now }));
  if (!begun.ok) return begun;
  const { order, quote, checkout } = begun;
  if (checkout.url !== null) return { ok: true, url: checkout.url, checkoutId: checkout.id };
  return openAtService({ order, quote, checkout, email: actor.email });
}

async function currentQuoteId(actor: Actor, orderId: string): Promise<string | null> {
  return (await findOrder(db, orderId, scopeOfActor(actor)))?.quoteId ?? null;
}

const isWorthReusing = (checkout: Checkout, quoteId: string | null, now: Date): boolean =>
  checkout.quoteId === quoteId &&
  checkout.expiresAt !== null &&
  checkout.expiresAt.getTime() - now.getTime() >
    (checkout.url === null ? SHORTEST_AT_SERVICE_MINUTES : WORTH_REUSING_MINUTES) * MINUTE;

type Begun = Verdict<{ order: Order; quote: Quote; checkout: Checkout }>;

async function begin(
  tx: Parameters<Parameters<typeof transact>[0]>[0],
  { actor, orderId, now }: { actor: Actor; orderId: string; now: Date },
): Promise<Begun> {
  const order = await findOrder(tx, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  if (order.paidAt) return refuse("already-paid", "This order is paid.");
  if (order.builderId !== actor.id) return refuse("not-allowed", "The builder pays.");
  if (order.stage !== "quoted" || order.quoteId === null)
    return refuse("wrong-stage", "This order has no quote to pay at the moment.");
  const quote = await findQuote(tx, order.id, order.quoteId);
  if (quote?.status !== "accepted") return refuse("incomplete", "Approve the part list and its sizes first.");
  const payable = checkMove("pay", { ...(await factsOfOrder(tx, order, now)), owed: 0 }, "system");
  if (!payable.ok) return refusalOfMove(payable);
  if (quote.expiresAt <= now)
    return refuse("expired", "The quote's time is over. Have it priced again; it takes a moment.");
  const open = await findOpenCheckout(tx, order.id);
  if (open) return open.quoteId === quote.id ? { ok: true, order, quote, checkout: open } : CHANGED;
  const amount = await owedOnQuote(tx, order.id, quote.id);
  if (amount <= 0) return refuse("already-paid", "Nothing is owed on this quote.");
  const expiresAt = new Date(now.getTime() + CHECKOUT_MINUTES * MINUTE);
  await insertCheckout(tx, {
    orderId: order.id,
    quoteId: quote.id,
    purpose: "full",
    amount,
    currency: quote.currency,
    expiresAt,
  });
  const checkout = await findOpenCheckout(tx, order.id);
  if (!checkout) throw new Error("The checkout was not stored.");
  return { ok: true, order, quote, checkout };
}

interface Opening {
  readonly order: Order;
  readonly quote: Quote;
  readonly checkout: Checkout;
  readonly email: string;
}

async function openAtService({
  order,
  quote,
  checkout,
  email,
}: Opening): Promise<Verdict<{ url: string; checkoutId: string }>> {
  const page = `${environment.APP_URL}/orders/${order.id}`;
  const answer = await payments.createCheckout({
    idempotencyKey: checkout.id,
    currency: checkout.currency,
    lines: [
      { name: `Order ${order.reference}, quote ${quote.number}`, amount: checkout.amount, quantity: 1 },
    ],
    description: `Order ${order.reference}`,
    customerEmail: email,
    successUrl: `${page}/checkout?checkout=${checkout.id}`,
    cancelUrl: `${page}?checkout=${checkout.id}`,
    metadata: { checkoutId: checkout.id, orderId: order.id, quoteId: quote.id },
    ...(checkout.expiresAt ? { expiresAt: checkout.expiresAt } : {}),
  });
  if (!answer.ok) {
    if (answer.reason !== "unavailable")
      await transact(async (tx) => {
        await closeCheckout(tx, checkout.id, "cancelled");
        await recordEvent(tx, { orderId: order.id, kind: "payment", data: { checkout: "cancelled" } });
      });
    return refuse(
      "unavailable",
      "The payment service did not open its pay page. Nothing was charged; try again in a minute.",
    );
  }
  const { id: sessionId, url, expiresAt } = answer.value;
  await transact((tx) => attachSession(tx, checkout.id, { sessionId, url: url ?? null, expiresAt }));
  if (url === undefined)
    return refuse("already-paid", "This pay page is closed; the order's page shows what came of it.");
  return { ok: true, url, checkoutId: checkout.id };
}
