import { transact } from "~/db/client.server";
import { mayDo, type ShipTo } from "~/domain/orders";
import { changeOrder } from "~/models/order-writes.server";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { answerMove, type Moved } from "./move.server";
import { CHANGED, NO_ORDER, refuse, type Verdict } from "./verdict";

export interface SetDeliveryOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly version: number;
  /** As checked by `shipToSchema`; it is copied, so a later change in the address book changes no order. */
  readonly delivery: { readonly kind: "pick-up" } | { readonly kind: "ship"; readonly shipTo: ShipTo };
}

/** Where a draft goes: freight and tax depend on it, so it is settled before the quote. */
export async function setDelivery({
  actor,
  orderId,
  version,
  delivery,
}: SetDeliveryOptions): Promise<Verdict<Moved>> {
  if (!mayDo(actor.roles, "order.edit")) return refuse("not-allowed", "This order is not yours to change.");
  return transact(async (tx): Promise<Verdict<Moved>> => {
    const order = await findOrder(tx, orderId, scopeOfActor(actor));
    if (!order) return NO_ORDER;
    if (order.stage !== "draft")
      return refuse(
        "wrong-stage",
        "This order is quoted already. Take it back to draft before you change it.",
      );
    const changed = await changeOrder(tx, {
      orderId: order.id,
      version,
      change:
        delivery.kind === "ship"
          ? { delivery: "ship", shipTo: delivery.shipTo }
          : { delivery: "pick-up", shipTo: null },
    });
    return changed ? answerMove(changed) : CHANGED;
  });
}
