import { type Mail, type OrderMailFacts, orderMail } from "./order-mail";

export const sentBackMail = (facts: OrderMailFacts & { readonly reason: string }): Mail =>
  orderMail(facts, {
    subject: `${facts.reference} needs a change`,
    paragraphs: [
      `A person in the shop has looked at ${facts.reference} (${facts.orderName}). Before it can be made something has to change: ${facts.reason}`,
      "It is a draft again with all you chose. Change it and ask for a new quote; nothing is owed.",
    ],
    action: "Change the order",
  });
