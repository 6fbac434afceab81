import type { Executor } from "~/db/client.server";
import type { OrderFacts } from "~/domain/orders";
import { type AnsweredFinding, listFindings } from "~/models/findings.server";
import { findNewestInterpretation } from "~/models/interpretations.server";
import { owedOnQuote } from "~/models/ledger.server";
import { listNestsOfOrder } from "~/models/nests.server";
import type { Order } from "~/models/orders.server";
import { listPieces } from "~/models/pieces.server";
import { findQuote } from "~/models/quotes.server";
import { currentSettings } from "~/models/settings.server";

/** What the order's moves are decided on, as it stands in the executor's view. */
export async function factsOfOrder(executor: Executor, order: Order, now: Date): Promise<OrderFacts> {
  const files = (await findNewestInterpretation(executor, order.id))?.content.files ?? [];
  const found = order.revisionId === null ? [] : await listFindings(executor, order.revisionId);
  const quote = order.quoteId === null ? undefined : await findQuote(executor, order.id, order.quoteId);
  const { review } = await currentSettings(executor);
  const nests = (await listNestsOfOrder(executor, order.id)).filter((nest) => nest.status !== "dropped");
  const pieces = await listPieces(executor, order.id);
  return {
    stage: order.stage,
    heldFrom: order.heldFrom,
    unitsConfirmed: files.length > 0 && files.every((file) => file.unit !== null),
    stockChosen: files.length > 0 && files.every((file) => file.materialId !== null),
    deliveryChosen: order.delivery === "pick-up" || (order.delivery === "ship" && order.shipTo !== null),
    openStops: found.filter((finding) => finding.severity === "stop").length,
    unansweredAsks: openAsks(found).length,
    quote: quote
      ? {
          open: quote.status === "open",
          expired: quote.status === "expired" || (quote.status === "open" && quote.expiresAt <= now),
          approved: quote.status === "accepted",
        }
      : null,
    reviewOpen:
      order.reviewedAt === null && (order.reviewAsked || (quote !== undefined && quote.total > review.cap)),
    owed: quote ? await owedOnQuote(executor, order.id, quote.id) : 0,
    pieces,
    nestLocked: nests.length > 0,
    cuttingBegun:
      nests.some((nest) => nest.status !== "locked") ||
      pieces.some((piece) => piece.stage !== "received" && piece.stage !== "nested"),
  };
}

/** Asks that the builder has not answered: a message to the shop is a question back, not an answer. */
export const openAsks = (findings: readonly AnsweredFinding[]): AnsweredFinding[] =>
  findings.filter(
    ({ severity, answer }) => severity === "ask" && (answer === null || answer.answer === "message"),
  );
