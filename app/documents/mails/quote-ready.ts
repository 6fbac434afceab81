import { formatMoney } from "~/domain/units";
import { type Mail, mailDay, type OrderMailFacts, orderMail } from "./order-mail";

export interface QuoteMailFacts extends OrderMailFacts {
  readonly quoteNumber: number;
  /** Cents. */
  readonly total: number;
  readonly currency: string;
  readonly expiresAt: Date;
  readonly promisedFor: Date;
  /** Why a person looks first; empty when it can be paid at once. */
  readonly review: readonly string[];
  /** About the drawing, for the builder to answer before paying. */
  readonly questions: number;
}

export function quoteMail(facts: QuoteMailFacts): Mail {
  const total = formatMoney(facts.total, facts.currency);
  const waits = facts.review.length > 0;
  return orderMail(facts, {
    subject: waits
      ? `Quote ${facts.quoteNumber} for ${facts.reference}: the shop looks at it first`
      : `Quote ${facts.quoteNumber} for ${facts.reference}: ${total}`,
    paragraphs: [
      `${facts.reference} (${facts.orderName}) comes to ${total}. The price holds until ${mailDay(facts.expiresAt, facts.timeZone)}.`,
      ...(facts.questions > 0
        ? [
            `${facts.questions === 1 ? "A question" : `${facts.questions} questions`} about the drawing ${facts.questions === 1 ? "waits" : "wait"} for your answer before it can be paid.`,
          ]
        : []),
      waits
        ? `Before it can be paid a person in the shop looks at it, because ${facts.review.join("; ")}. You are told as soon as that is done.`
        : `Paid today, it leaves the shop by ${mailDay(facts.promisedFor, facts.timeZone)}; paid later, perhaps later. Look through the part list and its sizes before you approve them: the design stays your responsibility.`,
    ],
    action: "Look at the quote",
  });
}
