import { formatMoney } from "~/domain/units";
import { type Mail, mailDay, type OrderMailFacts, orderMail } from "./order-mail";

export interface ReceiptFacts extends OrderMailFacts {
  /** Cents. */
  readonly amount: number;
  readonly currency: string;
  readonly quoteNumber: number;
  readonly paidAt: Date;
  readonly receiptUrl: string | null;
  readonly promisedFor: Date | null;
  /** False when the payment came for an order that could no longer take it. */
  readonly inTime: boolean;
}

export function receiptMail(facts: ReceiptFacts): Mail {
  const amount = formatMoney(facts.amount, facts.currency);
  return orderMail(facts, {
    subject: `Receipt for ${facts.reference}: ${amount}`,
    paragraphs: [
      `${amount} for ${facts.reference} (${facts.orderName}), quote ${facts.quoteNumber}, came in on ${mailDay(facts.paidAt, facts.timeZone)}.`,
      facts.inTime
        ? `The order is locked to this quote and its sheets are set aside.${facts.promisedFor ? ` It leaves the shop by ${mailDay(facts.promisedFor, facts.timeZone)}.` : ""}`
        : "The order could no longer take this payment. It is safe with the shop, which will give it back or settle it with you; you need do nothing.",
      ...(facts.receiptUrl ? [`The payment service's own receipt: ${facts.receiptUrl}`] : []),
    ],
    action: "Look at the order",
  });
}
