import { formatMoney } from "~/domain/units";
import { type Mail, type OrderMailFacts, orderMail } from "./order-mail";

export interface RefundFacts extends OrderMailFacts {
  /** Cents. */
  readonly amount: number;
  readonly currency: string;
  readonly reason: string;
}

export const refundMail = (facts: RefundFacts): Mail =>
  orderMail(facts, {
    subject: `Refund on ${facts.reference}: ${formatMoney(facts.amount, facts.currency)}`,
    paragraphs: [
      `${formatMoney(facts.amount, facts.currency)} of what you paid for ${facts.reference} (${facts.orderName}) goes back the way it came. Banks take five to ten days to show it.`,
      `Why: ${facts.reason}`,
    ],
    action: "Look at the order",
  });
