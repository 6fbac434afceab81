import { db, type Executor, transact } from "~/db/client.server";
import { checkMove } from "~/domain/orders";
import { formatMoney } from "~/domain/units";
import {
  type Checkout,
  closeCheckout,
  findCheckoutById,
  findCheckoutBySession,
  markCheckoutPaid,
  noteCheckoutFailure,
} from "~/models/checkouts.server";
import { recordEvent } from "~/models/events.server";
import { enterLedger } from "~/models/ledger.server";
import { findOrder, type Order } from "~/models/orders.server";
import { findQuote, type Quote } from "~/models/quotes.server";
import { currentSettings } from "~/models/settings.server";
import { listStockGroups, reserveGroup } from "~/models/stock-groups.server";
import { payments } from "~/services/clients.server";
import type { Payment, Checkout as ServiceCheckout } from "~/services/payments.server";
import { askOwner } from "./ask-owner.server";
import { changeStage } from "./change-stage.server";
import { factsOfOrder } from "./order-facts.server";
import { mailReceipt } from "./order-mails.server";
import { promiseOrder } from "./promise-order.server";
import { orRollBack, refuse, type Verdict } from "./verdict";

export type CheckoutOutcome =
  | "paid"
  | "paid-before"
  | "paid-late"
  | "expired"
  | "failed"
  | "still-open"
  | "not-ours";

/**
 * Brings a checkout to what the payment service says of it now, once, however often and in whatever order it is
 * told. Money that came is always entered; what does not fit the order goes to the owner.
 */
export async function settleCheckout(sessionId: string): Promise<Verdict<{ outcome: CheckoutOutcome }>> {
  const answer = await payments.getCheckout(sessionId);
  if (!answer.ok) {
    if (answer.reason === "not-found") return { ok: true, outcome: "not-ours" };
    return refuse("unavailable", answer.message);
  }
  const told = answer.value;
  const checkout = await findOurs(told);
  if (!checkout) return { ok: true, outcome: "not-ours" };
  const { payment } = told;
  if (told.paid && payment)
    return transact(async (tx) => ({ ok: true, outcome: await enterPayment(tx, checkout, payment) }));
  if (told.status === "expired") {
    await transact(async (tx) => {
      if (await closeCheckout(tx, checkout.id, "expired"))
        await recordEvent(tx, { orderId: checkout.orderId, kind: "payment", data: { checkout: "expired" } });
    });
    return { ok: true, outcome: "expired" };
  }
  if (payment?.failure !== undefined && payment.failure !== checkout.lastFailure) {
    const message = payment.failure;
    await transact(async (tx) => {
      await noteCheckoutFailure(tx, checkout.id, { paymentIntent: payment.id, message });
      await recordEvent(tx, { orderId: checkout.orderId, kind: "payment", data: { checkout: "failed" } });
    });
    return { ok: true, outcome: "failed" };
  }
  return { ok: true, outcome: "still-open" };
}

/** By the session, or by the id we gave it when its news outran our own note of the session. */
async function findOurs(told: ServiceCheckout): Promise<Checkout | undefined> {
  const known = await findCheckoutBySession(db, told.id);
  if (known) return known;
  const { checkoutId } = told.metadata;
  return checkoutId === undefined ? undefined : findCheckoutById(db, checkoutId);
}

async function enterPayment(tx: Executor, checkout: Checkout, payment: Payment): Promise<CheckoutOutcome> {
  const entered = await enterLedger(tx, {
    orderId: checkout.orderId,
    kind: "payment",
    amount: -payment.amountReceived,
    currency: payment.currency,
    quoteId: checkout.quoteId,
    checkoutId: checkout.id,
    externalId: payment.id,
  });
  if (!entered) return "paid-before";
  await markCheckoutPaid(tx, checkout.id, payment.id);
  const order = await findOrder(tx, checkout.orderId, { kind: "staff" });
  const quote = await findQuote(tx, checkout.orderId, checkout.quoteId);
  if (!order || !quote) throw new Error(`Checkout ${checkout.id} names an order or quote that is gone.`);
  await recordEvent(tx, { orderId: order.id, kind: "payment", data: { checkout: "paid" } });

  const misfit = await misfitOf(tx, order, quote);
  const paidAt = new Date();
  const after = misfit === null ? await markOrderPaid(tx, { order, quote, paidAt }) : order;
  await mailReceipt(tx, { order: after, quote, payment, paidAt, inTime: misfit === null });
  if (misfit !== null) {
    await askOwner(tx, {
      order,
      act: "payment.misfit",
      detail: { checkoutId: checkout.id, quoteId: quote.id, amount: payment.amountReceived, misfit },
      subject: `A payment needs a decision: ${order.reference}`,
      words: `${formatMoney(payment.amountReceived, payment.currency)} came in for quote ${quote.number} of ${order.reference}, but ${misfit} The money is in the ledger. Give it back, or settle it with the builder.`,
    });
    return "paid-late";
  }
  return "paid";
}

/** Why the payment does not make this order paid; null when it does. */
async function misfitOf(tx: Executor, order: Order, quote: Quote): Promise<string | null> {
  if (order.stage === "cancelled") return "the order is cancelled.";
  if (order.quoteId !== quote.id || quote.status !== "accepted") return "another quote has taken its place.";
  if (order.paidAt) return "the order was paid already.";
  const facts = await factsOfOrder(tx, order, new Date());
  if (facts.owed < 0) return `it is ${formatMoney(-facts.owed, quote.currency)} more than was owed.`;
  const held = order.stage === "on-hold" && order.heldFrom === "quoted";
  const verdict = checkMove("pay", held ? { ...facts, stage: "quoted" } : facts, "system");
  return verdict.ok ? null : `the order cannot be paid as it stands. ${verdict.words}`;
}

async function markOrderPaid(
  tx: Executor,
  { order, quote, paidAt }: { order: Order; quote: Quote; paidAt: Date },
): Promise<Order> {
  const promisedFor = await promiseOf(tx, quote, paidAt);
  /* A hold that began while the builder was paying keeps the order held, and paid underneath. */
  const held = order.stage === "on-hold";
  const { order: paid } = orRollBack(
    await changeStage(tx, {
      order,
      to: held ? "on-hold" : "paid",
      act: "pay",
      by: { id: null, role: "system" },
      ...(held ? { underHold: { from: "quoted", to: "paid" } } : {}),
      change: { paidAt, promisedFor, ...(held ? { heldFrom: "paid" } : {}) },
    }),
  );
  if (order.revisionId === null) throw new Error(`Order ${order.reference} was paid without a revision.`);
  for (const group of await listStockGroups(tx, order.id, order.revisionId)) {
    if (await reserveGroup(tx, group, paidAt)) continue;
    await askOwner(tx, {
      order,
      act: "stock.short",
      detail: { stockGroupId: group.id, lotId: group.lotId, sheets: group.sheets },
      subject: `Not enough sheets: ${group.material.code} for ${order.reference}`,
      words: `${order.reference} is paid and needs ${Math.ceil(group.sheets)} sheets of ${group.material.name}${group.lot ? `, lot ${group.lot.code}` : ""}, more than are free on the rack.`,
    });
  }
  return paid;
}

/** The quote's day, or a later one when the payment came so late that the machines have filled up meanwhile. */
async function promiseOf(tx: Executor, quote: Quote, paidAt: Date): Promise<Date> {
  const promised = await promiseOrder(tx, {
    settings: await currentSettings(tx),
    machineMinutes: quote.machineMinutes,
    paidAt,
  });
  return promised.ok && promised.promisedFor > quote.promisedFor ? promised.promisedFor : quote.promisedFor;
}
