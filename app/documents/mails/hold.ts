import { type Mail, type OrderMailFacts, orderMail } from "./order-mail";

export const holdMail = (facts: OrderMailFacts & { readonly reason: string }): Mail =>
  orderMail(facts, {
    subject: `${facts.reference} is on hold`,
    paragraphs: [
      `The shop has stopped ${facts.reference} (${facts.orderName}) where it stands. Why: ${facts.reason}`,
      "It goes on from there as soon as that is settled. You can answer on the order's page.",
    ],
    action: "Look at the order",
  });
