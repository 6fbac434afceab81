import { and, desc, eq, inArray, max } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { quoteLines, quotes } from "~/db/schema";
import type { PricedQuote, QuoteFacts, QuoteLine } from "~/domain/pricing";

export type Quote = typeof quotes.$inferSelect;
export type StoredQuoteLine = typeof quoteLines.$inferSelect;

export interface NewQuote {
  readonly orderId: string;
  readonly revisionId: string;
  readonly priceBookVersionId: string;
  readonly facts: QuoteFacts;
  readonly currency: string;
  readonly priced: Pick<PricedQuote, "net" | "tax" | "total" | "machineMinutes"> & {
    readonly lines: readonly QuoteLine[];
  };
  readonly promisedFor: Date;
  readonly expiresAt: Date;
}

/** Stores the snapshot with its lines under the order's next quote number. */
export async function insertQuote(tx: Executor, quote: NewQuote): Promise<Quote> {
  const [last] = await tx
    .select({ number: max(quotes.number) })
    .from(quotes)
    .where(eq(quotes.orderId, quote.orderId));
  const [row] = await tx
    .insert(quotes)
    .values({
      orderId: quote.orderId,
      number: (last?.number ?? 0) + 1,
      revisionId: quote.revisionId,
      priceBookVersionId: quote.priceBookVersionId,
      facts: quote.facts,
      currency: quote.currency,
      net: quote.priced.net,
      tax: quote.priced.tax,
      total: quote.priced.total,
      machineMinutes: quote.priced.machineMinutes,
      promisedFor: quote.promisedFor,
      status: "open",
      expiresAt: quote.expiresAt,
    })
    .returning();
  if (!row) throw new Error("The quote was not stored.");
  const lines = quote.priced.lines.map((line, position) => ({ ...line, quoteId: row.id, position }));
  if (lines.length > 0) await tx.insert(quoteLines).values(lines);
  return row;
}

export async function findQuote(
  executor: Executor,
  orderId: string,
  quoteId: string,
): Promise<Quote | undefined> {
  const [row] = await executor
    .select()
    .from(quotes)
    .where(and(eq(quotes.id, quoteId), eq(quotes.orderId, orderId)));
  return row;
}

/** Newest first. */
export async function listQuotes(executor: Executor, orderId: string): Promise<Quote[]> {
  return executor.select().from(quotes).where(eq(quotes.orderId, orderId)).orderBy(desc(quotes.number));
}

export async function listQuoteLines(executor: Executor, quoteId: string): Promise<StoredQuoteLine[]> {
  return executor
    .select()
    .from(quoteLines)
    .where(eq(quoteLines.quoteId, quoteId))
    .orderBy(quoteLines.position);
}

/** Every open, accepted or expired quote of the order stops counting; gives those that did. */
export async function supersedeQuotes(tx: Executor, orderId: string): Promise<Quote[]> {
  return tx
    .update(quotes)
    .set({ status: "superseded" })
    .where(and(eq(quotes.orderId, orderId), inArray(quotes.status, ["open", "accepted", "expired"])))
    .returning();
}

/** False when the quote was no longer open. */
export async function acceptQuote(
  tx: Executor,
  { quoteId, by, at }: { quoteId: string; by: string; at: Date },
): Promise<boolean> {
  const changed = await tx
    .update(quotes)
    .set({ status: "accepted", acceptedAt: at, acceptedBy: by })
    .where(and(eq(quotes.id, quoteId), eq(quotes.status, "open")))
    .returning({ id: quotes.id });
  return changed.length === 1;
}

export async function expireQuote(tx: Executor, quoteId: string): Promise<void> {
  await tx
    .update(quotes)
    .set({ status: "expired" })
    .where(and(eq(quotes.id, quoteId), eq(quotes.status, "open")));
}
