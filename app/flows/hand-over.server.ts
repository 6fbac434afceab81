import { transact } from "~/db/client.server";
import { listParcels, standingLabel } from "~/models/parcels.server";
import { leaveShop } from "./leave-shop.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { unpackedOf } from "./ready-to-label.server";
import { answering, orRollBack, Refused, refuse, type Verdict } from "./verdict";

/** The carrier takes a paid and complete order: every piece in a parcel, every parcel with its label. */
export async function handOver(options: MoveOptions): Promise<Verdict<Moved & { readonly parcels: number }>> {
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "ship", options));
      const parcels = await listParcels(tx, taken.order.id);
      if (taken.repeated) return { ...answerMove(taken.order), parcels: parcels.length };
      const { order } = taken;
      if (order.delivery !== "ship")
        throw new Refused(refuse("wrong-stage", "The builder picks this order up and signs for it."));
      const unpacked = await unpackedOf(tx, order.id, parcels);
      if (unpacked > 0)
        throw new Refused(
          refuse("incomplete", `Close the parcels first: ${unpacked} of the pieces are in none.`),
        );
      const bare = parcels.filter((parcel) => !standingLabel(parcel));
      if (bare.length > 0)
        throw new Refused(
          refuse(
            "incomplete",
            `${bare.length === 1 ? "Parcel" : "Parcels"} ${bare.map(({ number }) => number).join(", ")} ${bare.length === 1 ? "has" : "have"} no label yet.`,
          ),
        );
      const at = options.now ?? new Date();
      const shipped = await leaveShop(tx, { taken, options, parcels, at });
      return { ...answerMove(shipped), parcels: parcels.length };
    }),
  );
}
