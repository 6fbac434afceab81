import { type Mail, type OrderMailFacts, orderMail } from "./order-mail";

export interface ReadyFacts extends OrderMailFacts {
  readonly pieces: number;
  readonly kilograms: number;
  readonly heaviest: number;
  readonly address: readonly string[];
  readonly phone: string;
}

/** The pile is counted and waits at the shop. */
export const readyToCollectMail = (facts: ReadyFacts): Mail =>
  orderMail(facts, {
    subject: `${facts.reference} is ready to pick up`,
    paragraphs: [
      `${facts.reference} (${facts.orderName}) is counted and waits for you at the shop.`,
      "Whoever fetches it signs for it. Panels are heavy and their edges sharp: bring gloves, a second pair of hands and something to tie them down with.",
    ],
    rows: [
      { label: "Pieces", value: String(facts.pieces) },
      { label: "Weight together", value: `${facts.kilograms.toFixed(0)} kg` },
      { label: "Heaviest piece", value: `${facts.heaviest.toFixed(1)} kg` },
      { label: "Where", value: facts.address.join(", ") },
      ...(facts.phone ? [{ label: "Telephone", value: facts.phone }] : []),
    ],
    action: "Look at the order",
  });
