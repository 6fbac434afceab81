import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordEvent } from "~/models/events.server";
import { enterLedger } from "~/models/ledger.server";
import { changeOrder } from "~/models/order-writes.server";
import { findOrder } from "~/models/orders.server";
import { listParts } from "~/models/parts.server";
import { acceptQuote, expireQuote, findQuote } from "~/models/quotes.server";
import { type Actor, scopeOfActor } from "./actor";
import { answerMove, type Moved } from "./move.server";
import { partListHash } from "./part-list-hash.server";
import { CHANGED, NO_ORDER, refuse, type Verdict } from "./verdict";

export interface ApproveQuoteOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly version: number;
  readonly quoteId: string;
  /** Of the part list that the builder was shown, by `partListHash`. */
  readonly listHash: string;
  readonly now?: Date;
}

/**
 * The builder approves the part list and its sizes: the release. The quote is accepted as it stands and what it
 * comes to is owed.
 */
export async function approveQuote(options: ApproveQuoteOptions): Promise<Verdict<Moved>> {
  const { actor, orderId, version, quoteId, listHash, now = new Date() } = options;
  if (!mayDo(actor.roles, "order.approve"))
    return refuse("not-allowed", "The builder approves the part list.");
  return transact(async (tx): Promise<Verdict<Moved>> => {
    const order = await findOrder(tx, orderId, scopeOfActor(actor));
    if (!order) return NO_ORDER;
    if (order.builderId !== actor.id) return refuse("not-allowed", "The builder approves the part list.");
    if (order.quoteId !== quoteId) return CHANGED;
    const quote = await findQuote(tx, order.id, quoteId);
    if (!quote) return CHANGED;
    if (quote.status === "accepted") return answerMove(order);
    if (order.version !== version) return CHANGED;
    if (order.stage === "needs-review")
      return refuse("wrong-stage", "The shop looks at this order first; you are told when it has.");
    if (order.stage !== "quoted" || order.revisionId === null)
      return refuse("wrong-stage", "This order has no quote to approve at the moment.");
    if (quote.status !== "open") return CHANGED;
    if (quote.expiresAt <= now) {
      await expireQuote(tx, quote.id);
      return refuse("expired", "The quote's time is over. Have it priced again; it takes a moment.");
    }
    if (partListHash(quote.id, await listParts(tx, order.revisionId)) !== listHash)
      return refuse("changed", "The part list you looked at is not the one of this quote. Look at it again.");
    if (!(await acceptQuote(tx, { quoteId, by: actor.id, at: now }))) return CHANGED;
    await enterLedger(tx, {
      orderId: order.id,
      kind: "debt",
      amount: quote.total,
      currency: quote.currency,
      quoteId,
      externalId: `quote:${quoteId}`,
      note: `Quote ${quote.number}`,
      actorId: actor.id,
    });
    await recordEvent(tx, {
      orderId: order.id,
      kind: "quote",
      data: { number: quote.number, approved: true },
    });
    const approved = await changeOrder(tx, { orderId: order.id, version: order.version, change: {} });
    return approved ? answerMove(approved) : CHANGED;
  });
}
