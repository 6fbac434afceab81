import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { formatMoney } from "~/domain/units";
import { recordAct } from "~/models/audit.server";
import { findCheckout } from "~/models/checkouts.server";
import { listLedger } from "~/models/ledger.server";
import { findOrder } from "~/models/orders.server";
import {
  findRefund,
  insertRefund,
  type Refund,
  refundedThrough,
  settleRefund,
} from "~/models/refunds.server";
import { payments } from "~/services/clients.server";
import { type Actor, scopeOfActor } from "./actor";
import { enterRefund } from "./settle-refund.server";
import { CHANGED, NO_ORDER, refuse, type Verdict } from "./verdict";

export interface RefundOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly checkoutId: string;
  /** Made with the form: the same form sent twice refunds once. It is the idempotency key at the service. */
  readonly refundId: string;
  /** Integer cents. */
  readonly amount: number;
  readonly reason: string;
}

/** Gives money back through the payment it came by, whole or in part, never more than is left of it. */
export async function refundOrder(options: RefundOptions): Promise<Verdict<{ status: Refund["status"] }>> {
  if (!mayDo(options.actor.roles, "refund.make")) return refuse("not-allowed", "Only the owner refunds.");
  const asked = await transact((tx) => ask(tx, options));
  if (!asked.ok) return asked;
  if (asked.refund.status !== "asked") return { ok: true, status: asked.refund.status };
  return sendRefund(asked.refund, asked.paymentIntent);
}

type Tx = Parameters<Parameters<typeof transact>[0]>[0];

async function ask(
  tx: Tx,
  { actor, orderId, checkoutId, refundId, amount, reason }: RefundOptions,
): Promise<Verdict<{ refund: Refund; paymentIntent: string }>> {
  const order = await findOrder(tx, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  if (!Number.isInteger(amount) || amount < 1) return refuse("invalid", "Say how much to give back.");
  if (reason.trim() === "") return refuse("incomplete", "Say why; the builder is told.");
  const checkout = await findCheckout(tx, order.id, checkoutId);
  if (checkout?.status !== "paid" || checkout.paymentIntent === null)
    return refuse("invalid", "No payment came by this checkout.");
  const before = await findRefund(tx, order.id, refundId);
  if (before)
    return before.amount === amount && before.checkoutId === checkout.id
      ? { ok: true, refund: before, paymentIntent: checkout.paymentIntent }
      : CHANGED;
  const paid = -(await listLedger(tx, order.id))
    .filter((entry) => entry.kind === "payment" && entry.checkoutId === checkout.id)
    .reduce((total, entry) => total + entry.amount, 0);
  const left = paid - (await refundedThrough(tx, checkout.id));
  if (amount > left)
    return refuse(
      "too-much",
      left > 0
        ? `At most ${formatMoney(left, checkout.currency)} of this payment is left to give back.`
        : "All of this payment has been given back.",
    );
  if (
    !(await insertRefund(tx, {
      id: refundId,
      orderId: order.id,
      checkoutId,
      amount,
      reason,
      askedBy: actor.id,
    }))
  )
    return CHANGED;
  await recordAct(tx, {
    actorId: actor.id,
    act: "refund.make",
    subject: { kind: "order", id: order.id },
    detail: { refundId, checkoutId, amount, reason },
  });
  const refund = await findRefund(tx, order.id, refundId);
  if (!refund) throw new Error("The refund was not stored.");
  return { ok: true, refund, paymentIntent: checkout.paymentIntent };
}

/** Tells the payment service, again if need be: under the refund's id it gives back once. */
export async function sendRefund(
  refund: Refund,
  paymentIntent: string,
): Promise<Verdict<{ status: Refund["status"] }>> {
  const answer = await payments.refund({
    idempotencyKey: refund.id,
    paymentId: paymentIntent,
    amount: refund.amount,
    reason: "requested_by_customer",
    metadata: { refundId: refund.id, orderId: refund.orderId },
  });
  if (answer.ok) {
    const status = await transact((tx) => enterRefund(tx, answer.value));
    return { ok: true, status: status === "failed" ? "failed" : "done" };
  }
  if (answer.reason === "refused" || answer.reason === "conflict" || answer.reason === "not-found") {
    await transact((tx) => settleRefund(tx, refund.id, { status: "failed" }));
    return refuse("invalid", `The payment service refused the refund: ${answer.message}`);
  }
  return { ok: true, status: "asked" };
}
