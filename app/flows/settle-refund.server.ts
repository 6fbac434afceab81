import { type Executor, transact } from "~/db/client.server";
import { findCheckoutById, findCheckoutByIntent } from "~/models/checkouts.server";
import { recordEvent } from "~/models/events.server";
import { enterLedger, owedOnQuote } from "~/models/ledger.server";
import { findOrder } from "~/models/orders.server";
import { findRefundTold, insertRefund, type Refund, settleRefund } from "~/models/refunds.server";
import { payments } from "~/services/clients.server";
import type { Refund as ServiceRefund } from "~/services/payments.server";
import { askOwner } from "./ask-owner.server";
import { mailRefund } from "./order-mails.server";
import { refuse, type Verdict } from "./verdict";

/** The payment service tells of a refund, by its own id. */
export async function settleToldRefund(externalId: string): Promise<Verdict<{ outcome: string }>> {
  const answer = await payments.getRefund(externalId);
  if (!answer.ok) {
    if (answer.reason === "not-found") return { ok: true, outcome: "not-ours" };
    return refuse("unavailable", answer.message);
  }
  return transact(async (tx) => ({ ok: true, outcome: await enterRefund(tx, answer.value) }));
}

/**
 * Enters a refund in the ledger once, whether its answer or its webhook comes first, and takes it out again when
 * the bank sends it back. A refund made in the payment service's own pages is entered too.
 */
export async function enterRefund(
  tx: Executor,
  told: ServiceRefund,
): Promise<"done" | "failed" | "not-ours"> {
  const refund = await oursOf(tx, told);
  if (!refund) return "not-ours";
  const order = await findOrder(tx, refund.orderId, { kind: "staff" });
  const checkout = await findCheckoutById(tx, refund.checkoutId);
  if (!order || !checkout) throw new Error(`Refund ${refund.id} names an order or checkout that is gone.`);
  const entry = {
    orderId: order.id,
    currency: told.currency,
    quoteId: checkout.quoteId,
    checkoutId: checkout.id,
    note: refund.reason,
    actorId: refund.askedBy,
  };
  if (told.status === "failed" || told.status === "canceled") {
    if (refund.status === "failed") return "failed";
    await settleRefund(tx, refund.id, { status: "failed", externalId: told.id });
    if (refund.status === "done") {
      await enterLedger(tx, {
        ...entry,
        kind: "refund",
        amount: -told.amount,
        externalId: `${told.id}:returned`,
      });
      await askOwner(tx, {
        order,
        act: "refund.returned",
        detail: { refundId: refund.id, amount: told.amount },
        subject: `A refund came back: ${order.reference}`,
        words: `The bank sent the refund on ${order.reference} back. The money is the shop's again and still due to the builder.`,
      });
    }
    return "failed";
  }
  /* What the builder is given back is no longer owed, except where more had been paid than owed. */
  const owed = await owedOnQuote(tx, order.id, checkout.quoteId);
  const entered = await enterLedger(tx, {
    ...entry,
    kind: "refund",
    amount: told.amount,
    externalId: told.id,
  });
  if (!entered) return "done";
  const released = told.amount - Math.min(told.amount, Math.max(0, -owed));
  if (released > 0)
    await enterLedger(tx, { ...entry, kind: "debt-released", amount: -released, externalId: told.id });
  await settleRefund(tx, refund.id, { status: "done", externalId: told.id });
  await recordEvent(tx, { orderId: order.id, kind: "payment", data: { refunded: told.amount } });
  await mailRefund(tx, {
    order,
    refundId: refund.id,
    amount: told.amount,
    currency: told.currency,
    reason: refund.reason,
  });
  return "done";
}

async function oursOf(tx: Executor, told: ServiceRefund): Promise<Refund | undefined> {
  const asked = { refundId: told.metadata.refundId ?? null, externalId: told.id };
  const known = await findRefundTold(tx, asked);
  if (known) return known;
  const checkout = await findCheckoutByIntent(tx, told.paymentId);
  if (!checkout) return undefined;
  await insertRefund(tx, {
    orderId: checkout.orderId,
    checkoutId: checkout.id,
    amount: told.amount,
    reason: "Made in the payment service's own pages",
    askedBy: "payment-service",
    externalId: told.id,
  });
  return findRefundTold(tx, asked);
}
