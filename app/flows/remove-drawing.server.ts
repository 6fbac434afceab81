import { transact } from "~/db/client.server";
import { removeDrawing } from "~/models/drawing-files.server";
import { recordEvent } from "~/models/events.server";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { NO_ORDER, refuse, type Verdict } from "./verdict";

export interface RemoveDrawingOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly drawingId: string;
}

/** Takes a drawing out of a draft. Its bytes stay: a quote of before may name them. */
export async function removeOrderDrawing({
  actor,
  orderId,
  drawingId,
}: RemoveDrawingOptions): Promise<Verdict> {
  return transact(async (tx) => {
    const order = await findOrder(tx, orderId, scopeOfActor(actor));
    if (!order) return NO_ORDER;
    if (order.stage !== "draft")
      return refuse(
        "wrong-stage",
        "This order is quoted already. Take it back to draft before you change its drawings.",
      );
    if (!(await removeDrawing(tx, orderId, drawingId, new Date())))
      return refuse("not-found", "There is no such drawing in this order.");
    await recordEvent(tx, { orderId, kind: "reading", data: { drawingId, status: "removed" } });
    return { ok: true };
  });
}
