import { db, transact } from "~/db/client.server";
import { closeCheckout, findCheckoutById, listOpenCheckouts } from "~/models/checkouts.server";
import { recordEvent } from "~/models/events.server";
import { listUnappliedEvents } from "~/models/payment-events.server";
import { listAskedRefunds } from "~/models/refunds.server";
import { applyPaymentEvent } from "./apply-payment-event.server";
import { sendRefund } from "./refund-order.server";
import { settleCheckout } from "./settle-checkout.server";

/** An event that failed this often waits for a person; the checkouts are asked about all the same. */
const MAX_ATTEMPTS = 20;
const AT_ONCE = 50;
/** A checkout younger than this is left to its webhook. */
const PATIENCE_MS = 2 * 60_000;

export interface Reconciled {
  readonly events: number;
  readonly checkouts: number;
  readonly refunds: number;
}

/**
 * Makes up for what was missed: applies stored events that were not applied, asks the payment service about open
 * checkouts, and sends refunds again that got no answer. A lost webhook so loses no payment. Says how many of each
 * it brought to an end.
 */
export async function reconcilePayments(now: Date = new Date()): Promise<Reconciled> {
  let events = 0;
  for (const event of await listUnappliedEvents(db, { maxAttempts: MAX_ATTEMPTS, limit: AT_ONCE })) {
    const applied = await applyPaymentEvent(event.id).catch((error: unknown) => {
      console.error(`Payment event ${event.id} was not applied:`, error);
      return undefined;
    });
    if (applied?.ok) events += 1;
  }
  let checkouts = 0;
  const before = new Date(now.getTime() - PATIENCE_MS);
  for (const checkout of await listOpenCheckouts(db, { before, limit: AT_ONCE })) {
    if (checkout.sessionId === null) {
      if (checkout.expiresAt === null || checkout.expiresAt > now) continue;
      await transact(async (tx) => {
        if (await closeCheckout(tx, checkout.id, "expired"))
          await recordEvent(tx, {
            orderId: checkout.orderId,
            kind: "payment",
            data: { checkout: "expired" },
          });
      });
      checkouts += 1;
      continue;
    }
    const settled = await settleCheckout(checkout.sessionId);
    if (settled.ok && settled.outcome !== "still-open") checkouts += 1;
  }
  let refunds = 0;
  for (const refund of await listAskedRefunds(db, AT_ONCE)) {
    const checkout = await findCheckoutById(db, refund.checkoutId);
    if (!checkout?.paymentIntent) continue;
    const sent = await sendRefund(refund, checkout.paymentIntent);
    if (sent.ok && sent.status === "done") refunds += 1;
  }
  return { events, checkouts, refunds };
}
