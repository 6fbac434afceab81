import { db } from "~/db/client.server";
import type { Stage } from "~/domain/orders";
import { dayOf } from "~/domain/scheduling";
import { owedOnQuote } from "~/models/ledger.server";
import { listParcels, standingLabel } from "~/models/parcels.server";
import { listPieces, type PieceWithPart } from "~/models/pieces.server";
import { pageOfQueue } from "~/models/queue.server";
import { currentSettings } from "~/models/settings.server";

export const PAGE_SIZE = 25;

/** Where an order is when the clerk has to do with it: complete, or already handed over. */
export const SHIPPING_VIEWS = {
  waiting: ["tabs-removed"],
  coming: ["cut"],
  shipped: ["shipped"],
} as const satisfies Record<string, readonly Stage[]>;
export type ShippingViewName = keyof typeof SHIPPING_VIEWS;

/** The counted pieces of an order against those it has to have. */
function counted(pieces: readonly Pick<PieceWithPart, "state" | "stage" | "countedAt">[]) {
  const good = pieces.filter(({ state }) => state === "good");
  return {
    ready: good.filter(({ stage }) => stage === "tabs-removed" || stage === "shipped").length,
    counted: good.filter(({ stage, countedAt }) => stage === "shipped" || countedAt !== null).length,
    expected: good.length,
  };
}

/** What keeps an order from leaving, in words; empty when nothing does. */
function blocksOf(facts: {
  readonly ready: number;
  readonly expected: number;
  readonly owed: number;
}): string[] {
  const missing = facts.expected - facts.ready;
  return [
    ...(missing > 0
      ? [`${missing} of ${facts.expected} ${missing === 1 ? "piece is" : "pieces are"} missing`]
      : []),
    ...(facts.owed > 0 ? ["not paid in full"] : []),
  ];
}

/** How far the clerk is with it, in words. */
function standsAt(
  delivery: "ship" | "pick-up" | null,
  { counted, expected }: { readonly counted: number; readonly expected: number },
  parcels: Awaited<ReturnType<typeof listParcels>>,
): string {
  if (counted < expected) return "to count";
  if (delivery === "pick-up") return "waits for its builder";
  if (parcels.length === 0) return "to pack";
  const labelled = parcels.filter((parcel) => standingLabel(parcel)).length;
  const count = `${parcels.length} ${parcels.length === 1 ? "parcel" : "parcels"}`;
  return labelled < parcels.length ? `${count}, ${labelled} labelled` : `${count}, to hand over`;
}

/** The clerk's queue, the earliest promise first. */
export async function shippingList(query: {
  readonly view: ShippingViewName;
  readonly words?: string | undefined;
  readonly page: number;
}) {
  const now = new Date();
  const { shop } = await currentSettings(db);
  const today = dayOf(now, shop.timeZone);
  const { rows, found } = await pageOfQueue(db, {
    stages: SHIPPING_VIEWS[query.view],
    words: query.words,
    page: query.page,
    size: PAGE_SIZE,
  });
  return {
    found,
    pages: Math.max(1, Math.ceil(found / PAGE_SIZE)),
    rows: await Promise.all(
      rows.map(async ({ order, builder, kinds }) => {
        const facts = {
          ...counted(await listPieces(db, order.id)),
          owed: order.quoteId === null ? 0 : await owedOnQuote(db, order.id, order.quoteId),
        };
        return {
          id: order.id,
          reference: order.reference,
          name: order.name,
          builder,
          kinds,
          stage: order.stage,
          delivery: order.delivery,
          to:
            order.delivery === "ship" && order.shipTo ? `${order.shipTo.city} ${order.shipTo.region}` : null,
          due: order.promisedFor?.toISOString() ?? null,
          late:
            order.shippedAt === null &&
            order.promisedFor !== null &&
            dayOf(order.promisedFor, shop.timeZone) < today,
          shippedAt: order.shippedAt?.toISOString() ?? null,
          ...facts,
          stands: standsAt(order.delivery, facts, await listParcels(db, order.id)),
          blocks: order.stage === "shipped" ? [] : blocksOf(facts),
        };
      }),
    ),
  };
}
