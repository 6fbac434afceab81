import { db, type Executor, transact } from "~/db/client.server";
import { compareQuotes, type LineDifference, priceOrder as priceFacts } from "~/domain/pricing";
import { changeOrder } from "~/models/order-writes.server";
import { findOrder, type Order } from "~/models/orders.server";
import { listParts } from "~/models/parts.server";
import { findAddressee } from "~/models/people.server";
import { findPublishedPriceBook } from "~/models/price-books.server";
import { findQuote, listQuoteLines, type Quote } from "~/models/quotes.server";
import { currentSettings } from "~/models/settings.server";
import { listStockGroups } from "~/models/stock-groups.server";
import { scopeOfActor } from "./actor";
import { closeOpenCheckout } from "./close-checkout.server";
import type { ListedPart } from "./listed-parts";
import type { Moved, MoveOptions } from "./move.server";
import { factsOfOrder } from "./order-facts.server";
import { mailQuote } from "./order-mails.server";
import { deliveryOf } from "./price-order.server";
import { promiseOrder } from "./promise-order.server";
import { collectFacts } from "./quote-facts.server";
import { sendToReview } from "./send-to-review.server";
import { answering, CHANGED, NO_ORDER, Refused, refuse, type Verdict } from "./verdict";
import { personReasons, type QuoteContent, writeQuote } from "./write-quote.server";

export type Requoted = Moved & {
  readonly quote: Quote;
  /** What the lines came to before and come to now; empty when nothing changed but the date. */
  readonly differences: readonly LineDifference[];
};

/**
 * Prices a frozen revision again, on today's price book and the same lots, when its quote's time is over. The
 * builder sees what differs and approves anew.
 */
export async function requoteOrder(options: MoveOptions): Promise<Verdict<Requoted>> {
  const { actor, orderId, now = new Date() } = options;
  const order = await findOrder(db, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  if (order.builderId !== actor.id) return refuse("not-allowed", "The builder asks for the price.");
  if (order.stage !== "quoted" || order.revisionId === null || order.quoteId === null)
    return refuse("wrong-stage", "This order has no quote to price again.");
  const closed = await closeOpenCheckout({ orderId: order.id, as: "expired" });
  if (!closed.ok) return closed;
  return answering(() => transact((tx) => requote(tx, { options, now })));
}

async function requote(
  tx: Executor,
  { options, now }: { options: MoveOptions; now: Date },
): Promise<Verdict<Requoted>> {
  const order = await findOrder(tx, options.orderId, scopeOfActor(options.actor));
  if (!order || order.version !== options.version || order.stage !== "quoted") throw new Refused(CHANGED);
  const { revisionId, quoteId } = order;
  if (revisionId === null || quoteId === null) throw new Refused(CHANGED);
  const old = await findQuote(tx, order.id, quoteId);
  if (!old) throw new Error(`Order ${order.reference} names a quote that is gone.`);
  if ((old.status === "open" || old.status === "accepted") && old.expiresAt > now)
    throw new Refused(refuse("wrong-stage", "The quote still holds."));
  const settings = await currentSettings(tx);
  const content = await priceAnew(tx, { order, revisionId, old, now });
  if (!content.ok) throw new Refused(content);
  const oldLines = await listQuoteLines(tx, old.id);
  const quote = await writeQuote(tx, { orderId: order.id, revisionId, content, settings, now });
  const changed = await changeOrder(tx, {
    orderId: order.id,
    version: order.version,
    change: { quoteId: quote.id, promisedFor: quote.promisedFor },
  });
  if (!changed) throw new Refused(CHANGED);
  const review =
    order.reviewedAt === null || quote.total > old.total
      ? personReasons({ total: quote.total, settings, reviewAsked: false })
      : [];
  const last = review.length > 0 ? await sendToReview(tx, changed, review) : changed;
  const { unansweredAsks } = await factsOfOrder(tx, last, now);
  await mailQuote(tx, { order: last, quote, review, questions: unansweredAsks });
  return {
    ok: true,
    order: last,
    quote,
    differences: compareQuotes({ lines: oldLines }, { lines: content.priced.lines }),
  };
}

async function priceAnew(
  tx: Executor,
  { order, revisionId, old, now }: { order: Order; revisionId: string; old: Quote; now: Date },
): Promise<Verdict<QuoteContent>> {
  const settings = await currentSettings(tx);
  const book = await findPublishedPriceBook(tx);
  const builder = await findAddressee(tx, order.builderId);
  const delivery = deliveryOf(order);
  if (!book || !builder || !delivery) return refuse("unavailable", "This order cannot be priced now.");
  const collected = await collectFacts(tx, {
    parts: await frozenParts(tx, order.id, revisionId),
    choices: old.facts,
    delivery,
    taxExempt: builder.taxExempt,
    settings,
    book: book.content,
    now,
  });
  if (!collected.ok) return collected;
  const gone = collected.stocks.find((stock) => stock.lot === null);
  if (gone)
    return refuse(
      "out-of-stock",
      `The lot of ${gone.material.name} that was quoted is used up. Take the order back to draft: the fit is checked against another lot.`,
    );
  const priced = priceFacts(collected.facts, book.content);
  if (!priced.ok) return refuse("incomplete", priced.reason);
  const promised = await promiseOrder(tx, {
    settings,
    machineMinutes: priced.quote.machineMinutes,
    paidAt: now,
  });
  if (!promised.ok) return promised;
  return { ok: true, facts: collected.facts, priced: priced.quote, book, promisedFor: promised.promisedFor };
}

/** A revision's part list with the lots it was quoted on. */
async function frozenParts(tx: Executor, orderId: string, revisionId: string): Promise<ListedPart[]> {
  const groups = await listStockGroups(tx, orderId, revisionId);
  return (await listParts(tx, revisionId)).map((part) => {
    const group = groups.find(({ id }) => id === part.stockGroupId);
    if (!group) throw new Error(`Part ${part.label} names no stock group of its revision.`);
    return { ...part, materialId: group.materialId, wantedLotId: group.lotId };
  });
}
