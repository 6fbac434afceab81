import { type Mail, mailDay, type OrderMailFacts, orderMail } from "./order-mail";

export interface ShortageFacts extends OrderMailFacts {
  readonly partLabel: string;
  readonly partName: string | null;
  /** Copy `number` of `of`. */
  readonly number: number;
  readonly of: number;
  readonly state: "spoiled" | "missing";
  readonly cause: string;
  readonly payer: "shop" | "builder" | "carrier" | "supplier";
  readonly promisedFor: Date | null;
}

const PAYERS: Readonly<Record<ShortageFacts["payer"], string>> = {
  shop: "The shop makes it again at its own cost.",
  builder: "It is made again at your cost; the shop writes to you about the amount first.",
  carrier: "It is made again and the carrier is asked for the cost; you pay nothing.",
  supplier: "It is made again and the supplier of the sheet is asked for the cost; you pay nothing.",
};

/** A piece is spoiled or missing and is made again. */
export const shortageMail = (facts: ShortageFacts): Mail =>
  orderMail(facts, {
    subject: `${facts.reference}: part ${facts.partLabel} is made again`,
    paragraphs: [
      `A piece of ${facts.reference} (${facts.orderName}) is ${facts.state} and goes on the next nest again. ${PAYERS[facts.payer]}`,
      facts.promisedFor
        ? `The other pieces go on. The order waits in shipping for this one; it was promised to leave the shop by ${mailDay(facts.promisedFor, facts.timeZone)}, and you are told in its thread if that cannot be kept.`
        : "The other pieces go on. The order waits in shipping for this one.",
    ],
    rows: [
      { label: "Part", value: facts.partName ? `${facts.partLabel} ${facts.partName}` : facts.partLabel },
      { label: "Piece", value: `${facts.number} of ${facts.of}` },
      { label: "What happened", value: facts.cause },
    ],
    action: "Follow the order",
  });
