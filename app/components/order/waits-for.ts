import type { Stage } from "~/domain/orders";

interface WaitingOrder {
  readonly stage: Stage;
  readonly expired: boolean;
  readonly holdReason: string | null;
  /** Questions about the drawing that the builder has not answered. */
  readonly questions: number;
}

/** What an order waits for, in a few words, and whether that is its builder's to do. */
export function waitsFor({ stage, expired, holdReason, questions }: WaitingOrder): {
  words: string;
  yours: boolean;
} {
  switch (stage) {
    case "draft":
      return { words: "your choices, then a quote", yours: true };
    case "quoted":
      return expired
        ? { words: "the quote ran out: price it again", yours: true }
        : { words: "your approval and payment", yours: true };
    case "needs-review":
      return questions > 0
        ? { words: `your answer to ${questions} ${questions === 1 ? "question" : "questions"}`, yours: true }
        : { words: "a look by the shop", yours: false };
    case "paid":
      return { words: "the shop to take it in", yours: false };
    case "received":
      return { words: "its sheets to be laid out", yours: false };
    case "nested":
      return { words: "the router", yours: false };
    case "cut":
      return { words: "tabs and edges", yours: false };
    case "tabs-removed":
      return { words: "packing", yours: false };
    case "shipped":
      return { words: "", yours: false };
    case "on-hold":
      return { words: holdReason ?? "on hold", yours: true };
    case "cancelled":
      return { words: "cancelled", yours: false };
  }
}
