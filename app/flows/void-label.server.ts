import { db, transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { recordEvent } from "~/models/events.server";
import { findOrder } from "~/models/orders.server";
import { listParcels, markLabelVoid } from "~/models/parcels.server";
import { carrier } from "~/services/clients.server";
import { type Actor, scopeOfActor } from "./actor";
import { carrierRefusal } from "./carrier-refusal";
import { FREIGHT } from "./note-freight.server";
import { NO_ORDER, refuse, type Verdict } from "./verdict";

export interface VoidLabelOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly labelId: string;
}

/** Makes a label void, at the carrier first: a label that the carrier has scanned stands. Twice is void once. */
export async function voidLabel({ actor, orderId, labelId }: VoidLabelOptions): Promise<Verdict> {
  if (!mayDo(actor.roles, "shipping.edit")) return refuse("not-allowed", "Labels are the clerk's.");
  const order = await findOrder(db, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  const label = (await listParcels(db, order.id))
    .flatMap(({ labels }) => labels)
    .find(({ id }) => id === labelId);
  if (!label) return refuse("not-found", "There is no such label.");
  if (label.status === "void") return { ok: true };
  if (order.stage === "shipped") return refuse("wrong-stage", "The parcels are with the carrier.");
  if (label.service !== FREIGHT) {
    const answer = await carrier.voidLabel(label.carrierLabelId);
    if (!answer.ok) return carrierRefusal(answer);
  }
  return transact(async (tx) => {
    if (!(await markLabelVoid(tx, label.id, new Date()))) return { ok: true };
    await recordAct(tx, {
      actorId: actor.id,
      act: "void-label",
      subject: { kind: "order", id: order.id },
      detail: { tracking: label.trackingNumber },
    });
    await recordEvent(tx, { orderId: order.id, kind: "shipping", audience: "staff", data: { voided: true } });
    return { ok: true };
  });
}
