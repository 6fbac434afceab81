import type { Stage } from "./stage";

export const WAITING_CODES = [
  "choices",
  "approval-and-payment",
  "new-quote",
  "answers",
  "review",
  "receiving",
  "nesting",
  "cutting",
  "tabs",
  "packing",
  "hold",
] as const;
export type WaitingCode = (typeof WAITING_CODES)[number];

/** What an order waits for, told to neither side in particular. */
export interface ApiWaiting {
  readonly who: "builder" | "shop";
  readonly code: WaitingCode;
  readonly words: string;
}

interface WaitingOrder {
  readonly stage: Stage;
  /** Its quote ran out before it was paid. */
  readonly expired: boolean;
  readonly holdReason: string | null;
  /** Questions about the drawing that the builder has not answered. */
  readonly questions: number;
}

const builder = (code: WaitingCode, words: string): ApiWaiting => ({ who: "builder", code, words });
const shop = (code: WaitingCode, words: string): ApiWaiting => ({ who: "shop", code, words });

/** Null when nothing more is to be done: shipped or cancelled. */
export function apiWaiting({ stage, expired, holdReason, questions }: WaitingOrder): ApiWaiting | null {
  switch (stage) {
    case "draft":
      return builder("choices", "the builder's choices, then a quote");
    case "quoted":
      return expired
        ? builder("new-quote", "a new quote: the last one ran out")
        : builder("approval-and-payment", "the builder's approval and payment");
    case "needs-review":
      return questions > 0
        ? builder("answers", `the builder's answer to ${questions} question${questions === 1 ? "" : "s"}`)
        : shop("review", "a look by the shop");
    case "paid":
      return shop("receiving", "the shop to take it in");
    case "received":
      return shop("nesting", "its sheets to be laid out");
    case "nested":
      return shop("cutting", "the router");
    case "cut":
      return shop("tabs", "tabs and edges");
    case "tabs-removed":
      return shop("packing", "packing");
    case "on-hold":
      return shop("hold", holdReason ?? "on hold");
    case "shipped":
    case "cancelled":
      return null;
  }
}
