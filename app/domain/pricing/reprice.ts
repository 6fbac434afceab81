import { compareQuotes, type LineDifference } from "./compare-quotes";
import type { PriceBook } from "./price-book";
import { priceOrder } from "./price-order";
import type { QuoteFacts, QuoteLine } from "./quote";

export interface PricedBefore {
  readonly facts: QuoteFacts;
  readonly lines: readonly QuoteLine[];
  /** Cents. */
  readonly total: number;
}

export type Repriced =
  | {
      readonly ok: true;
      readonly was: number;
      readonly now: number;
      readonly differences: readonly LineDifference[];
    }
  | { readonly ok: false; readonly was: number; readonly reason: string };

/** What an earlier quote would come to under another price book, on the facts it was made from. Cents. */
export function reprice({ facts, lines, total }: PricedBefore, book: PriceBook): Repriced {
  const priced = priceOrder(facts, book);
  if (!priced.ok) return { ok: false, was: total, reason: priced.reason };
  return {
    ok: true,
    was: total,
    now: priced.quote.total,
    differences: compareQuotes({ lines }, { lines: priced.quote.lines }),
  };
}
