import type { Executor } from "~/db/client.server";
import type { ShopSettings } from "~/domain/orders";
import type { PricedQuote, QuoteFacts } from "~/domain/pricing";
import { recordEvent } from "~/models/events.server";
import { enterLedger } from "~/models/ledger.server";
import type { PriceBookVersion } from "~/models/price-books.server";
import { insertQuote, type Quote, supersedeQuotes } from "~/models/quotes.server";

const DAY = 86_400_000;

export interface QuoteContent {
  readonly facts: QuoteFacts;
  readonly priced: PricedQuote;
  readonly book: PriceBookVersion;
  readonly promisedFor: Date;
}

/** Writes an order's next quote; those before it stop counting. The caller points the order at it. */
export async function writeQuote(
  tx: Executor,
  {
    orderId,
    revisionId,
    content,
    settings,
    now,
  }: { orderId: string; revisionId: string; content: QuoteContent; settings: ShopSettings; now: Date },
): Promise<Quote> {
  await dropQuotes(tx, orderId);
  const quote = await insertQuote(tx, {
    orderId,
    revisionId,
    priceBookVersionId: content.book.id,
    facts: content.facts,
    currency: content.book.content.currency,
    priced: content.priced,
    promisedFor: content.promisedFor,
    expiresAt: new Date(now.getTime() + settings.quote.validDays * DAY),
  });
  await recordEvent(tx, { orderId, kind: "quote", data: { number: quote.number, total: quote.total } });
  return quote;
}

/** Supersedes an order's quotes; what was owed on an approved one is owed no longer. */
export async function dropQuotes(tx: Executor, orderId: string): Promise<void> {
  for (const quote of await supersedeQuotes(tx, orderId)) {
    if (quote.acceptedAt === null) continue;
    await enterLedger(tx, {
      orderId,
      kind: "debt-released",
      amount: -quote.total,
      currency: quote.currency,
      quoteId: quote.id,
      externalId: `quote:${quote.id}`,
      note: `Quote ${quote.number} no longer counts`,
    });
  }
}

/** Why a person must look before this quote can be paid; empty when none must. */
export const personReasons = ({
  total,
  settings,
  reviewAsked,
}: {
  total: number;
  settings: ShopSettings;
  reviewAsked: boolean;
}): string[] => [
  ...(total > settings.review.cap ? ["the total is above what is priced without a person"] : []),
  ...(reviewAsked ? ["the builder asked for it"] : []),
];

/** The same for questions about the drawing that the builder has not answered. */
export const questionReasons = (openAsks: number): string[] => {
  if (openAsks === 0) return [];
  return [
    openAsks === 1
      ? "a question about the drawing waits for its answer"
      : `${openAsks} questions about the drawing wait for their answers`,
  ];
};
