import { db, transact } from "~/db/client.server";
import { recordAct } from "~/models/audit.server";
import { recordEvent } from "~/models/events.server";
import { insertLabel, type LabelledParcel, standingLabel } from "~/models/parcels.server";
import { carrier } from "~/services/clients.server";
import type { Actor } from "./actor";
import { carrierRefusal } from "./carrier-refusal";
import { carrierParcel, readyToLabel } from "./ready-to-label.server";
import { answering, CHANGED, orRollBack, Refused, refuse, type Verdict } from "./verdict";

export interface BuyLabelOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly parcelId: string;
  /** The carrier's code of the service. */
  readonly service: string;
}

/** One label to a parcel: after a void the next has a key of its own. */
const idempotencyKey = ({ id, labels }: LabelledParcel): string =>
  labels.length === 0 ? id : `${id}:${labels.length}`;

/**
 * Buys a parcel's label from the carrier and writes it down. Asked twice, or after an answer that got lost, it is the
 * same label: the parcel's own id is the key. A label whose parcel is gone meanwhile is made void again.
 */
export async function buyLabel(
  options: BuyLabelOptions,
): Promise<Verdict<{ readonly trackingNumber: string; readonly price: number }>> {
  const { actor, orderId, parcelId, service } = options;
  const ready = await readyToLabel(db, options);
  if (!ready.ok) return ready;
  const parcel = ready.parcels.find(({ id }) => id === parcelId);
  if (!parcel) return refuse("not-found", "There is no such parcel.");
  const standing = standingLabel(parcel);
  if (standing) return { ok: true, trackingNumber: standing.trackingNumber, price: standing.price };
  const answer = await carrier.buyLabel({
    idempotencyKey: idempotencyKey(parcel),
    from: ready.from,
    to: ready.to,
    parcel: carrierParcel(parcel),
    service,
    reference: `${ready.order.reference} ${parcel.number}/${ready.parcels.length}`,
  });
  if (!answer.ok) return carrierRefusal(answer);
  const label = answer.value;
  const written = await answering(() =>
    transact(async (tx) => {
      const still = orRollBack(await readyToLabel(tx, options));
      if (!still.parcels.some(({ id }) => id === parcelId)) throw new Refused(CHANGED);
      await insertLabel(tx, {
        parcelId,
        carrierLabelId: label.id,
        service: label.service,
        trackingNumber: label.trackingNumber,
        price: label.amount,
        boughtBy: actor.id,
      });
      await recordAct(tx, {
        actorId: actor.id,
        act: "buy-label",
        subject: { kind: "order", id: orderId },
        detail: { parcel: parcel.number, tracking: label.trackingNumber, price: label.amount },
      });
      await recordEvent(tx, {
        orderId,
        kind: "shipping",
        audience: "staff",
        data: { labelled: parcel.number },
      });
      return { ok: true as const, trackingNumber: label.trackingNumber, price: label.amount };
    }),
  );
  if (!written.ok) await carrier.voidLabel(label.id);
  return written;
}
