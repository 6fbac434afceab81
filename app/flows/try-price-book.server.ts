import { db } from "~/db/client.server";
import { type PriceBook, type Repriced, reprice } from "~/domain/pricing";
import { listRecentQuotes, type RecentQuote } from "~/models/recent-quotes.server";

/** How many orders a draft is tried on. */
export const TRIED_ORDERS = 10;

export interface TriedQuote {
  readonly quote: RecentQuote;
  readonly repriced: Repriced;
}

/** What other prices would do to the newest quotes of the last ten orders. Saves nothing. */
export async function tryPriceBook(book: PriceBook): Promise<readonly TriedQuote[]> {
  const recent = await listRecentQuotes(db, TRIED_ORDERS);
  return recent.map((quote) => ({ quote, repriced: reprice(quote, book) }));
}
