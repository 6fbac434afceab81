import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { removeDrawing } from "~/models/drawing-files.server";
import { recordEvent } from "~/models/events.server";
import { changeOrder } from "~/models/order-writes.server";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { answerMove, type Moved } from "./move.server";
import { answering, CHANGED, NO_ORDER, Refused, refuse, type Verdict } from "./verdict";

export interface TakeOutDrawingOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly version: number;
  readonly drawingId: string;
}

/** Takes a drawing out of a draft. Its bytes are kept, for an earlier revision may name them. */
export async function takeOutDrawing({
  actor,
  orderId,
  version,
  drawingId,
}: TakeOutDrawingOptions): Promise<Verdict<Moved>> {
  if (!mayDo(actor.roles, "order.edit")) return refuse("not-allowed", "This order is not yours to change.");
  return answering(() =>
    transact(async (tx): Promise<Verdict<Moved>> => {
      const order = await findOrder(tx, orderId, scopeOfActor(actor));
      if (!order) return NO_ORDER;
      if (order.stage !== "draft")
        return refuse(
          "wrong-stage",
          "This order is quoted already. Take it back to draft before you change its drawings.",
        );
      const changed = await changeOrder(tx, { orderId: order.id, version, change: {} });
      if (!changed) return CHANGED;
      if (!(await removeDrawing(tx, order.id, drawingId, new Date())))
        throw new Refused(refuse("not-found", "That drawing is no longer in this order."));
      await recordEvent(tx, { orderId: order.id, kind: "reading", data: { removed: drawingId } });
      return answerMove(changed);
    }),
  );
}
