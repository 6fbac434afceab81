import { transact } from "~/db/client.server";
import { enterLedger } from "~/models/ledger.server";
import { listNestsOfOrder, releasePlacements } from "~/models/nests.server";
import { cancelPieces, listPieces } from "~/models/pieces.server";
import { findQuote } from "~/models/quotes.server";
import { listStockGroups, releaseGroup } from "~/models/stock-groups.server";
import { changeStage } from "./change-stage.server";
import { closeOpenCheckout } from "./close-checkout.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailCancelled } from "./order-mails.server";
import { settleNest } from "./settle-nest.server";
import { answering, orRollBack, refuse, type Verdict } from "./verdict";
import { dropQuotes } from "./write-quote.server";

/** Free while nothing of it is nested; after that by the shop, with its reason. */
const CANCELS = ["cancel", "cancel-late"] as const;

/**
 * Ends an order: what was owed is owed no longer, its sheets go back to their lots, its pieces leave their nests.
 * What was paid stays in the ledger until the owner gives it back.
 */
export async function cancelOrder(
  options: MoveOptions & { readonly reason: string },
): Promise<Verdict<Moved>> {
  if (options.reason.trim() === "") return refuse("incomplete", "Say why it is cancelled.");
  /* Looked at before the pay page is closed, so that a refusal closes nothing. */
  const allowed = await transact((tx) => takeMove(tx, CANCELS, options));
  if (!allowed.ok) return allowed;
  if (allowed.repeated) return answerMove(allowed.order);
  const closed = await closeOpenCheckout({ orderId: allowed.order.id, as: "cancelled" });
  if (!closed.ok) return closed;
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, CANCELS, options));
      if (taken.repeated) return answerMove(taken.order);
      const { order, to, role } = taken;
      await clearShop(tx, order);
      if (order.paidAt === null) await dropQuotes(tx, order.id);
      else await releaseDebt(tx, order);
      const { order: cancelled } = orRollBack(
        await changeStage(tx, {
          order,
          to,
          act: taken.name,
          by: { id: options.actor.id, role },
          reason: options.reason,
          requestId: options.requestId,
          change: { cancelledAt: new Date(), heldFrom: null, holdReason: null },
        }),
      );
      await mailCancelled(tx, { order: cancelled, reason: options.reason, wasPaid: order.paidAt !== null });
      return answerMove(cancelled);
    }),
  );
}

type Tx = Parameters<Parameters<typeof transact>[0]>[0];
type Order = Moved["order"];

async function clearShop(tx: Tx, order: Order): Promise<void> {
  const nests = await listNestsOfOrder(tx, order.id);
  const pieces = await listPieces(tx, order.id);
  await releasePlacements(
    tx,
    pieces.filter((piece) => piece.stage === "nested").map((piece) => piece.id),
  );
  await cancelPieces(tx, order.id);
  for (const nest of nests) await settleNest(tx, nest.id);
  if (order.revisionId === null) return;
  for (const group of await listStockGroups(tx, order.id, order.revisionId)) await releaseGroup(tx, group);
}

async function releaseDebt(tx: Tx, order: Order): Promise<void> {
  const quote = order.quoteId === null ? undefined : await findQuote(tx, order.id, order.quoteId);
  if (!quote?.acceptedAt) return;
  await enterLedger(tx, {
    orderId: order.id,
    kind: "debt-released",
    amount: -quote.total,
    currency: quote.currency,
    quoteId: quote.id,
    externalId: `quote:${quote.id}`,
    note: "The order is cancelled",
  });
}
