import type { Executor } from "~/db/client.server";
import { cancelledMail } from "~/documents/mails/cancelled";
import { holdMail } from "~/documents/mails/hold";
import type { Mail, OrderMailFacts } from "~/documents/mails/order-mail";
import { quoteMail } from "~/documents/mails/quote-ready";
import { readyToCollectMail } from "~/documents/mails/ready-to-collect";
import { receiptMail } from "~/documents/mails/receipt";
import { refundMail } from "~/documents/mails/refund";
import { sentBackMail } from "~/documents/mails/sent-back";
import { type ShortageFacts, shortageMail } from "~/documents/mails/shortage";
import { type ShippedParcel, stageMail } from "~/documents/mails/stage";
import type { Stage } from "~/domain/orders";
import type { Order } from "~/models/orders.server";
import { findAddressee } from "~/models/people.server";
import type { Quote } from "~/models/quotes.server";
import { currentSettings } from "~/models/settings.server";
import { environment } from "~/server/environment.server";
import type { Payment } from "~/services/payments.server";
import { mailPerson } from "./mail-person.server";

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
  if (!builder) return;
  const { shop } = await currentSettings(tx);
  await mailPerson(tx, {
    person: builder,
    template,
    orderId: order.id,
    dedupeKey,
    make: (unsubscribe) =>
      make({
        shopName: shop.name,
        recipientName: builder.name,
        reference: order.reference,
        orderName: order.name,
        url: `${environment.APP_URL}/orders/${order.id}`,
        timeZone: shop.timeZone,
        unsubscribe,
      }),
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

export const mailSentBack = (
  tx: Executor,
  { order, reason }: { order: Order; reason: string },
): Promise<void> => mailBuilder(tx, order, "sent-back", (facts) => sentBackMail({ ...facts, reason }));

export const mailCancelled = (
  tx: Executor,
  { order, reason, wasPaid }: { order: Order; reason: string; wasPaid: boolean },
): Promise<void> =>
  mailBuilder(tx, order, "cancelled", (facts) => cancelledMail({ ...facts, reason, wasPaid }));

/** Tells of the stage the order has reached, when it came from another. */
export async function mailStage(
  tx: Executor,
  { order, from, parcels }: { order: Order; from: Stage; parcels?: readonly ShippedParcel[] },
): Promise<void> {
  if (order.stage === from) return;
  await mailBuilder(tx, order, "stage", (facts) =>
    stageMail({
      ...facts,
      stage: order.stage,
      promisedFor: order.promisedFor,
      delivery: order.delivery,
      parcels: parcels ?? [],
    }),
  );
}

/** Tells that the counted pile waits at the shop. */
export async function mailReadyToCollect(
  tx: Executor,
  {
    order,
    requestId,
    ...pile
  }: { order: Order; requestId: string; pieces: number; kilograms: number; heaviest: number },
): Promise<void> {
  const { shop } = await currentSettings(tx);
  await mailBuilder(
    tx,
    order,
    "ready",
    (facts) => readyToCollectMail({ ...facts, ...pile, address: shop.address, phone: shop.phone }),
    `ready:${order.id}:${requestId}`,
  );
}

/** Tells of a piece that is made again. */
export const mailShortage = (
  tx: Executor,
  {
    order,
    pieceId,
    ...shortage
  }: { order: Order; pieceId: string } & Pick<
    ShortageFacts,
    "partLabel" | "partName" | "number" | "of" | "state" | "cause" | "payer"
  >,
): Promise<void> =>
  mailBuilder(
    tx,
    order,
    "shortage",
    (facts) => shortageMail({ ...facts, ...shortage, promisedFor: order.promisedFor }),
    `shortage:${pieceId}`,
  );
