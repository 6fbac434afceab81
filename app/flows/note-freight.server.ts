import { transact } from "~/db/client.server";
import { newId } from "~/db/new-id";
import { parcelNotes } from "~/domain/shipping";
import { recordAct } from "~/models/audit.server";
import { recordEvent } from "~/models/events.server";
import { insertLabel, standingLabel } from "~/models/parcels.server";
import type { Actor } from "./actor";
import { readyToLabel } from "./ready-to-label.server";
import { limitsToday } from "./suggest-bundles.server";
import { answering, orRollBack, Refused, refuse, type Verdict } from "./verdict";

/** The service of a parcel that no parcel carrier takes: it goes by freight, its papers made elsewhere. */
export const FREIGHT = "freight";

/** Writes down the number that a freight carrier gave for a bundle beyond the parcel limits. */
export async function noteFreight(options: {
  readonly actor: Actor;
  readonly orderId: string;
  readonly parcelId: string;
  /** As it stands on the bill of lading. */
  readonly number: string;
  readonly now?: Date;
}): Promise<Verdict> {
  const { actor, orderId, parcelId, number, now = new Date() } = options;
  return answering(() =>
    transact(async (tx) => {
      const ready = orRollBack(await readyToLabel(tx, options));
      const parcel = ready.parcels.find(({ id }) => id === parcelId);
      if (!parcel) throw new Refused(refuse("not-found", "There is no such parcel."));
      if (standingLabel(parcel)) return { ok: true as const };
      if (parcelNotes(parcel, parcel.weight, await limitsToday(tx, now)).beyond.length === 0)
        throw new Refused(refuse("invalid", "This one goes as a parcel: buy its label."));
      await insertLabel(tx, {
        parcelId,
        carrierLabelId: `${FREIGHT}:${newId()}`,
        service: FREIGHT,
        trackingNumber: number.trim(),
        price: 0,
        boughtBy: actor.id,
      });
      await recordAct(tx, {
        actorId: actor.id,
        act: "note-freight",
        subject: { kind: "order", id: orderId },
        detail: { parcel: parcel.number, number },
      });
      await recordEvent(tx, {
        orderId,
        kind: "shipping",
        audience: "staff",
        data: { labelled: parcel.number },
      });
      return { ok: true as const };
    }),
  );
}
