import { type Mail, type OrderMailFacts, orderMail } from "./order-mail";

export interface CancelledFacts extends OrderMailFacts {
  readonly reason: string;
  readonly wasPaid: boolean;
}

export const cancelledMail = (facts: CancelledFacts): Mail =>
  orderMail(facts, {
    subject: `${facts.reference} is cancelled`,
    paragraphs: [
      `${facts.reference} (${facts.orderName}) is cancelled. Why: ${facts.reason}`,
      facts.wasPaid
        ? "The owner decides what of your payment comes back to you and you are told by mail: all of it while nothing was nested, less the set-up and unusable material after that."
        : "Nothing is owed on it.",
    ],
    action: "Look at the order",
  });
