import { db, transact } from "~/db/client.server";
import { findOrder } from "~/models/orders.server";
import { scopeOfActor } from "./actor";
import { changeStage } from "./change-stage.server";
import { closeOpenCheckout } from "./close-checkout.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { answering, NO_ORDER, orRollBack, refuse, type Verdict } from "./verdict";
import { dropQuotes } from "./write-quote.server";

/**
 * Takes a quoted order back to draft with the interpretation it has, to make the next revision. The quote no
 * longer counts and its pay page is closed first.
 */
export async function reviseOrder(options: MoveOptions): Promise<Verdict<Moved>> {
  const order = await findOrder(db, options.orderId, scopeOfActor(options.actor));
  if (!order) return NO_ORDER;
  if (order.stage !== "quoted" && order.stage !== "needs-review")
    return refuse("wrong-stage", `An order that is ${order.stage} cannot be changed.`);
  const closed = await closeOpenCheckout({ orderId: order.id, as: "cancelled" });
  if (!closed.ok) return closed;
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "revise", options));
      if (taken.repeated) return answerMove(taken.order);
      await dropQuotes(tx, taken.order.id);
      const { order: draft } = orRollBack(
        await changeStage(tx, {
          order: taken.order,
          to: taken.to,
          act: "revise",
          by: { id: options.actor.id, role: taken.role },
          reason: options.reason,
          requestId: options.requestId,
          change: { quoteId: null, revisionId: null, promisedFor: null },
        }),
      );
      return answerMove(draft);
    }),
  );
}
