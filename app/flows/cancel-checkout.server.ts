import { db } from "~/db/client.server";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { closeOpenCheckout } from "./close-checkout.server";
import { NO_ORDER, type Verdict } from "./verdict";

/** The builder does not want to pay now: the pay page is closed, the order stays payable. */
export async function cancelCheckout({
  actor,
  orderId,
}: {
  actor: Actor;
  orderId: string;
}): Promise<Verdict> {
  const order = await findOrder(db, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  return closeOpenCheckout({ orderId: order.id, as: "cancelled" });
}
