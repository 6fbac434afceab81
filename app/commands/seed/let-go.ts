/** The end of an order's way: counted, packed and labelled, or fetched and signed for. */
import { db } from "~/db/client.server";
import { buyLabel } from "~/flows/buy-label.server";
import { collectOrder } from "~/flows/collect-order.server";
import { countPieces } from "~/flows/count-pieces.server";
import { handOver } from "~/flows/hand-over.server";
import { noteFreight } from "~/flows/note-freight.server";
import { packOrder } from "~/flows/pack-order.server";
import { suggestOrderParcels } from "~/flows/suggest-bundles.server";
import type { Verdict } from "~/flows/verdict";
import type { Order } from "~/models/orders.server";
import type { SeededPerson } from "./people";

/** A flourish, as somebody draws it with a finger. */
const FLOURISH = [
  Array.from({ length: 40 }, (_, i): [number, number] => [60 + i * 11, 110 + Math.sin(i / 2.2) * (50 - i)]),
];

function must<Value extends object>(verdict: Verdict<Value>): { readonly ok: true } & Value {
  if (!verdict.ok) throw new Error(`${verdict.reason}: ${verdict.words}`);
  return verdict;
}

/** Packs a complete order as suggested and hands it to the carrier, or to who fetches it. */
export async function letGo(order: Order, clerk: SeededPerson): Promise<void> {
  const on = { actor: clerk, orderId: order.id };
  must(await countPieces({ ...on, pieceIds: "all", counted: true }));
  if (order.delivery === "pick-up") {
    must(await collectOrder({ ...on, version: order.version, name: "Who fetched it", strokes: FLOURISH }));
    return;
  }
  const suggested = await suggestOrderParcels(db, order, new Date());
  const { parcels } = must(await packOrder({ ...on, bundles: suggested.map(({ pieces }) => pieces) }));
  for (const [index, parcel] of parcels.entries())
    if (suggested[index]?.oversize)
      must(
        await noteFreight({ ...on, parcelId: parcel.id, number: `BOL-${order.reference}-${parcel.number}` }),
      );
    else must(await buyLabel({ ...on, parcelId: parcel.id, service: "towpath-ground" }));
  must(await handOver({ ...on, version: order.version }));
}
