import type { Executor } from "~/db/client.server";
import { cancelledMail } from "~/documents/mails/cancelled";
import { holdMail } from "~/documents/mails/hold";
import type { Mail, OrderMailFacts } from "~/documents/mails/order-mail";
import { quoteMail } from "~/documents/mails/quote-ready";
import { receiptMail } from "~/documents/mails/receipt";
import { refundMail } from "~/documents/mails/refund";
import { stageMail } from "~/documents/mails/stage";
import type { Stage } from "~/domain/orders";
import type { Order } from "~/models/orders.server";
import { queueMail } from "~/models/outbox.server";
import { findAddressee } from "~/models/people.server";
import type { Quote } from "~/models/quotes.server";
import { currentSettings } from "~/models/settings.server";
import { environment } from "~/server/environment.server";
import type { Payment } from "~/services/payments.server";

/** Mails a builder may turn off; receipts, refunds, holds and cancellations are always sent. */
const MUTABLE = new Set(["stage", "quote"]);

/**
 * Writes one mail to the order's builder into the outbox, in the transaction of its cause. `make` may answer null:
 * then there is nothing to say.
 */
async function mailBuilder(
  tx: Executor,
  order: Order,
  template: string,
  make: (facts: OrderMailFacts) => Mail | null,
  dedupeKey?: string,
): Promise<void> {
  const builder = await findAddressee(tx, order.builderId);
  if (!builder || (MUTABLE.has(template) && builder.mutedMails.includes(template))) return;
  const { shop } = await currentSettings(tx);
  const mail = make({
    shopName: shop.name,
    recipientName: builder.name,
    reference: order.reference,
    orderName: order.name,
    url: `${environment.APP_URL}/orders/${order.id}`,
    timeZone: shop.timeZone,
  });
  if (!mail) return;
  await queueMail(tx, {
    ...mail,
    recipient: builder.email,
    template,
    orderId: order.id,
    ...(dedupeKey ? { dedupeKey } : {}),
  });
}

export const mailQuote = (
  tx: Executor,
  {
    order,
    quote,
    review,
    questions,
  }: { order: Order; quote: Quote; review: readonly string[]; questions: number },
): Promise<void> =>
  mailBuilder(
    tx,
    order,
    "quote",
    (facts) =>
      quoteMail({
        ...facts,
        quoteNumber: quote.number,
        total: quote.total,
        currency: quote.currency,
        expiresAt: quote.expiresAt,
        promisedFor: quote.promisedFor,
        review,
        questions,
      }),
    `quote:${quote.id}`,
  );

export const mailReceipt = (
  tx: Executor,
  receipt: { order: Order; quote: Quote; payment: Payment; paidAt: Date; inTime: boolean },
): Promise<void> =>
  mailBuilder(
    tx,
    receipt.order,
    "receipt",
    (facts) =>
      receiptMail({
        ...facts,
        amount: receipt.payment.amountReceived,
        currency: receipt.payment.currency,
        quoteNumber: receipt.quote.number,
        paidAt: receipt.paidAt,
        receiptUrl: receipt.payment.receiptUrl ?? null,
        promisedFor: receipt.order.promisedFor,
        inTime: receipt.inTime,
      }),
    `receipt:${receipt.payment.id}`,
  );

export const mailRefund = (
  tx: Executor,
  refund: { order: Order; refundId: string; amount: number; currency: string; reason: string },
): Promise<void> =>
  mailBuilder(
    tx,
    refund.order,
    "refund",
    (facts) =>
      refundMail({ ...facts, amount: refund.amount, currency: refund.currency, reason: refund.reason }),
    `refund:${refund.refundId}`,
  );

export const mailHold = (tx: Executor, { order, reason }: { order: Order; reason: string }): Promise<void> =>
  mailBuilder(tx, order, "hold", (facts) => holdMail({ ...facts, reason }));

export const mailCancelled = (
  tx: Executor,
  { order, reason, wasPaid }: { order: Order; reason: string; wasPaid: boolean },
): Promise<void> =>
  mailBuilder(tx, order, "cancelled", (facts) => cancelledMail({ ...facts, reason, wasPaid }));

/** Tells of the stage the order has reached, when it came from another. */
export async function mailStage(tx: Executor, { order, from }: { order: Order; from: Stage }): Promise<void> {
  if (order.stage === from) return;
  await mailBuilder(tx, order, "stage", (facts) =>
    stageMail({
      ...facts,
      stage: order.stage,
      promisedFor: order.promisedFor,
      delivery: order.delivery,
    }),
  );
}
