import type { Stage } from "~/domain/orders";
import { type Mail, mailDay, type OrderMailFacts, orderMail } from "./order-mail";

export interface StageMailFacts extends OrderMailFacts {
  readonly stage: Stage;
  readonly promisedFor: Date | null;
  readonly delivery: "ship" | "pick-up" | null;
  /** What the carrier took. */
  readonly parcels: readonly ShippedParcel[];
}

export interface ShippedParcel {
  readonly number: number;
  readonly tracking: string | null;
  readonly service: string | null;
}

/** What a builder wants to know at a stage; stages that say nothing new have no mail. */
export function stageMail(facts: StageMailFacts): Mail | null {
  const said = WORDS[facts.stage];
  if (!said) return null;
  const { subject, paragraphs } = said(facts);
  return orderMail(facts, {
    subject: `${facts.reference} ${subject}`,
    paragraphs,
    rows: facts.stage === "shipped" ? facts.parcels.map(parcelRow) : [],
    action: "Follow the order",
  });
}

const parcelRow = ({ number, tracking, service }: ShippedParcel) => ({
  label: `Parcel ${number}${service ? `, ${service.replaceAll("-", " ")}` : ""}`,
  value: tracking ?? "",
});

type Words = (facts: StageMailFacts) => { readonly subject: string; readonly paragraphs: readonly string[] };

const by = ({ promisedFor, timeZone }: StageMailFacts): string =>
  promisedFor ? ` It leaves the shop by ${mailDay(promisedFor, timeZone)}.` : "";

const WORDS: Partial<Record<Stage, Words>> = {
  quoted: (facts) => ({
    subject: "can be paid",
    paragraphs: [
      `The shop has looked at ${facts.reference} (${facts.orderName}). Approve the part list and its sizes, and pay when you are ready.`,
    ],
  }),
  received: (facts) => ({
    subject: "is in the shop",
    paragraphs: [`The shop has taken in ${facts.reference} (${facts.orderName}).${by(facts)}`],
  }),
  nested: (facts) => ({
    subject: "is nested",
    paragraphs: [
      `Every part of ${facts.reference} (${facts.orderName}) has its place on a sheet and waits for the router.${by(facts)}`,
    ],
  }),
  cut: (facts) => ({
    subject: "is cut",
    paragraphs: [
      `${facts.reference} (${facts.orderName}) has left the router. Tabs and edges come next.${by(facts)}`,
    ],
  }),
  "tabs-removed": (facts) => ({
    subject: "has its tabs off",
    paragraphs: [
      `The tabs of ${facts.reference} (${facts.orderName}) are off and its edges are done.`,
      facts.delivery === "pick-up"
        ? "It is counted next; you are told as soon as you can pick it up."
        : "It is counted and packed next.",
    ],
  }),
  shipped: (facts) => ({
    subject: facts.delivery === "pick-up" ? "was picked up" : "has shipped",
    paragraphs: [
      facts.delivery === "pick-up"
        ? `${facts.reference} (${facts.orderName}) was handed over to you.`
        : `${facts.reference} (${facts.orderName}) is on its way.`,
      ...(facts.delivery === "pick-up"
        ? []
        : [
            "Look at each parcel before you sign: write visible damage on the carrier's receipt. Damage found inside must be told to the carrier within 5 business days, with the packaging kept.",
          ]),
      "Count the parts against the packing list. Panels are heavy, their edges sharp, and wood dust is bad to breathe.",
    ],
  }),
};
