import { asc, desc, eq, inArray } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { orders, priceBookVersions, quoteLines, quotes } from "~/db/schema";
import type { PricedBefore } from "~/domain/pricing";

export interface RecentQuote extends PricedBefore {
  readonly id: string;
  readonly number: number;
  readonly createdAt: Date;
  readonly bookNumber: number;
  readonly orderId: string;
  readonly reference: string;
  readonly orderName: string;
}

/** The newest quote of each of the orders quoted last, with facts and lines, the newest first. */
export async function listRecentQuotes(executor: Executor, orderCount: number): Promise<RecentQuote[]> {
  const rows = await executor
    .select({
      quote: quotes,
      bookNumber: priceBookVersions.number,
      reference: orders.reference,
      orderName: orders.name,
    })
    .from(orders)
    .innerJoin(quotes, eq(quotes.id, orders.quoteId))
    .innerJoin(priceBookVersions, eq(priceBookVersions.id, quotes.priceBookVersionId))
    .orderBy(desc(quotes.createdAt), desc(orders.reference))
    .limit(orderCount);
  const ids = rows.map(({ quote }) => quote.id);
  const lines =
    ids.length === 0
      ? []
      : await executor
          .select()
          .from(quoteLines)
          .where(inArray(quoteLines.quoteId, ids))
          .orderBy(asc(quoteLines.position));
  return rows.map(({ quote, ...order }) => ({
    ...order,
    id: quote.id,
    number: quote.number,
    createdAt: quote.createdAt,
    orderId: quote.orderId,
    facts: quote.facts,
    total: quote.total,
    lines: lines.filter(({ quoteId }) => quoteId === quote.id),
  }));
}
