import type { Person } from "~/auth/guards.server";
import {
  buySchema,
  collectSchema,
  countAllSchema,
  countSchema,
  freightSchema,
  handOverSchema,
  packSchema,
  readySchema,
  voidSchema,
} from "~/components/shipping/ship-acts";
import { db } from "~/db/client.server";
import { formatMoney } from "~/domain/units";
import { buyLabel } from "~/flows/buy-label.server";
import { collectOrder } from "~/flows/collect-order.server";
import { countPieces } from "~/flows/count-pieces.server";
import { handOver } from "~/flows/hand-over.server";
import { noteFreight } from "~/flows/note-freight.server";
import { packOrder } from "~/flows/pack-order.server";
import { tellReady } from "~/flows/tell-ready.server";
import { voidLabel } from "~/flows/void-label.server";
import { listParcels, standingLabel } from "~/models/parcels.server";
import { type Done, dispatchAct, formAct } from "../dispatch-act.server";

/** What a form of the clerk's order page asks for, done by the flow that serves it. */
export function actOnPacking(
  formData: FormData,
  { person, orderId }: { readonly person: Person; readonly orderId: string },
) {
  const who = { actor: person, orderId };
  const counted = async (pieceIds: readonly string[] | "all", isCounted: boolean): Promise<Done> => {
    const verdict = await countPieces({ ...who, pieceIds, counted: isCounted });
    return verdict.ok ? { ok: true, words: `${verdict.counted} of ${verdict.expected} counted.` } : verdict;
  };
  return dispatchAct(formData, {
    count: formAct(countSchema, ({ piece, counted: isCounted }) => counted(piece, isCounted)),
    "count-all": formAct(countAllSchema, ({ counted: isCounted }) => counted("all", isCounted)),
    pack: formAct(packSchema, async ({ bundles }) => {
      const verdict = await packOrder({ ...who, bundles });
      if (!verdict.ok) return verdict;
      const { length } = verdict.parcels;
      return { ok: true, words: `${length} ${length === 1 ? "parcel" : "parcels"} closed.` };
    }),
    buy: formAct(buySchema, async ({ service }) => buyLabels(who, service)),
    void: formAct(voidSchema, async ({ labelId }) => {
      const verdict = await voidLabel({ ...who, labelId });
      return verdict.ok ? { ok: true, words: "The label is void." } : verdict;
    }),
    freight: formAct(freightSchema, async ({ parcelId, number }) => {
      const verdict = await noteFreight({ ...who, parcelId, number });
      return verdict.ok ? { ok: true, words: "Its freight number is written down." } : verdict;
    }),
    "hand-over": formAct(handOverSchema, async (move) => {
      const verdict = await handOver({ ...who, ...move });
      return verdict.ok ? { ok: true, words: "Handed over: the builder is told, with tracking." } : verdict;
    }),
    ready: formAct(readySchema, async ({ requestId }) => {
      const verdict = await tellReady({ ...who, requestId });
      return verdict.ok ? { ok: true, words: "The builder is told that it is ready." } : verdict;
    }),
    collect: formAct(collectSchema, async (collection) => {
      const verdict = await collectOrder({ ...who, ...collection });
      return verdict.ok ? { ok: true, words: "Picked up and signed for." } : verdict;
    }),
  });
}

/** A label for each parcel that has none; what was bought before one fails stays bought. */
async function buyLabels(
  who: { readonly actor: Person; readonly orderId: string },
  service: string,
): Promise<Done> {
  let price = 0;
  for (const parcel of await listParcels(db, who.orderId)) {
    if (standingLabel(parcel)) continue;
    const bought = await buyLabel({ ...who, parcelId: parcel.id, service });
    if (!bought.ok) return { ...bought, words: `Parcel ${parcel.number}: ${bought.words}` };
    price += bought.price;
  }
  return { ok: true, words: `Labels bought for ${formatMoney(price)}.` };
}
