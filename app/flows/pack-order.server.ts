import { transact } from "~/db/client.server";
import { checkMove, mayDo } from "~/domain/orders";
import { stackPieces } from "~/domain/shipping";
import { recordAct } from "~/models/audit.server";
import { recordEvent } from "~/models/events.server";
import { findOrder } from "~/models/orders.server";
import { listParcels, type Parcel, replaceParcels, standingLabel } from "~/models/parcels.server";
import { clearParcels, listPieces, setParcel } from "~/models/pieces.server";
import { type Actor, scopeOfActor } from "./actor";
import { refusalOfMove } from "./move.server";
import { factsOfOrder } from "./order-facts.server";
import { packingOf } from "./suggest-bundles.server";
import { answering, CHANGED, NO_ORDER, Refused, refuse, type Verdict } from "./verdict";

export interface PackOrderOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** The pieces of each parcel, by number from 1; every good piece in exactly one. */
  readonly bundles: readonly (readonly string[])[];
  readonly now?: Date;
}

/**
 * Writes down an order's parcels as the clerk bundled them, their sizes and weights computed from the pieces. The
 * pile must be complete and counted; a parcel whose label is bought stays as it is until the label is void.
 */
export async function packOrder(
  options: PackOrderOptions,
): Promise<Verdict<{ readonly parcels: readonly Parcel[] }>> {
  const { actor, orderId, now = new Date() } = options;
  if (!mayDo(actor.roles, "shipping.edit")) return refuse("not-allowed", "Packing is the clerk's.");
  return answering(() =>
    transact(async (tx) => {
      const order = await findOrder(tx, orderId, scopeOfActor(actor));
      if (!order) return NO_ORDER;
      const verdict = checkMove("ship", await factsOfOrder(tx, order, now), actor.roles);
      if (!verdict.ok) throw new Refused(refusalOfMove(verdict));
      const good = (await listPieces(tx, order.id)).filter(({ state }) => state === "good");
      const uncounted = good.filter(({ countedAt }) => countedAt === null).length;
      if (uncounted > 0)
        throw new Refused(
          refuse("incomplete", `Count the pile first: ${uncounted} of ${good.length} are not counted.`),
        );
      if ((await listParcels(tx, order.id)).some((parcel) => standingLabel(parcel) !== undefined))
        throw new Refused(
          refuse("wrong-stage", "Void the labels first: they carry the sizes and weights of these parcels."),
        );
      const bundles = options.bundles.filter((bundle) => bundle.length > 0);
      const named = bundles.flat();
      if (named.length !== good.length || !good.every(({ id }) => named.includes(id)))
        throw new Refused(CHANGED);
      const { pieces, limits } = await packingOf(tx, order, now);
      const closed = bundles.map((bundle) =>
        stackPieces(
          pieces.filter(({ id }) => bundle.includes(id)),
          limits,
        ),
      );
      await clearParcels(tx, order.id);
      const parcels = await replaceParcels(tx, {
        orderId: order.id,
        packedBy: actor.id,
        packed: closed.map(({ length, width, height, kilograms }) => ({
          length,
          width,
          height,
          weight: kilograms,
        })),
      });
      for (const [index, parcel] of parcels.entries()) await setParcel(tx, bundles[index] ?? [], parcel.id);
      await recordAct(tx, {
        actorId: actor.id,
        act: "pack",
        subject: { kind: "order", id: order.id },
        detail: { parcels: parcels.length },
      });
      await recordEvent(tx, {
        orderId: order.id,
        kind: "shipping",
        audience: "staff",
        data: { packed: parcels.length },
      });
      return { ok: true as const, parcels };
    }),
  );
}
