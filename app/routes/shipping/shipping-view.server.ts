import type { Person } from "~/auth/guards.server";
import { db } from "~/db/client.server";
import { checkMove, type Stage } from "~/domain/orders";
import { dayOf } from "~/domain/scheduling";
import { factsOfOrder } from "~/flows/order-facts.server";
import { suggestOrderParcels } from "~/flows/suggest-bundles.server";
import { owedOnQuote } from "~/models/ledger.server";
import type { Order } from "~/models/orders.server";
import { listParcels } from "~/models/parcels.server";
import { findAddressee } from "~/models/people.server";
import { listPieces, type PieceWithPart } from "~/models/pieces.server";
import { pageOfQueue } from "~/models/queue.server";
import { currentSettings } from "~/models/settings.server";
import { listStageMoves } from "~/models/stage-moves.server";

export const PAGE_SIZE = 25;

/** Where an order is when the clerk has to do with it: complete, or already handed over. */
export const SHIPPING_VIEWS = {
  waiting: ["tabs-removed"],
  coming: ["cut"],
  shipped: ["shipped"],
} as const satisfies Record<string, readonly Stage[]>;
export type ShippingViewName = keyof typeof SHIPPING_VIEWS;

/** The counted pieces of an order against those it has to have. */
function counted(pieces: readonly Pick<PieceWithPart, "state" | "stage">[]) {
  const good = pieces.filter(({ state }) => state === "good");
  return {
    ready: good.filter(({ stage }) => stage === "tabs-removed" || stage === "shipped").length,
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
          blocks: order.stage === "shipped" ? [] : blocksOf(facts),
        };
      }),
    ),
  };
}

/** One order at the packing bench. Sizes in millimetres, weights in kilograms, packing included. */
export async function shippingView(order: Order, person: Person, now = new Date()) {
  const facts = await factsOfOrder(db, order, now);
  const verdict = checkMove(
    "ship",
    facts,
    person.roles.filter((role) => role !== "builder"),
  );
  const pieces = await listPieces(db, order.id);
  const builder = await findAddressee(db, order.builderId);
  const packed = await listParcels(db, order.id);
  const moves = await listStageMoves(db, order.id);
  const labels = [...new Set(pieces.map(({ part }) => part.label))];
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    stage: order.stage,
    version: order.version,
    delivery: order.delivery,
    shipTo: order.shipTo,
    builder: builder?.name ?? "",
    promisedFor: order.promisedFor?.toISOString() ?? null,
    shippedAt: order.shippedAt?.toISOString() ?? null,
    requestId: crypto.randomUUID(),
    ship: verdict.ok
      ? { may: true as const, why: null }
      : { may: false as const, why: verdict.words, notMine: verdict.why === "not-allowed" },
    owed: facts.owed,
    blocks: order.stage === "shipped" ? [] : blocksOf({ ...counted(pieces), owed: facts.owed }),
    parts: labels.map((label) => {
      const mine = pieces.filter(({ part }) => part.label === label);
      const part = mine[0]?.part;
      return {
        label,
        name: part && part.name !== part.letter ? part.name : null,
        width: part?.width ?? 0,
        height: part?.height ?? 0,
        ...counted(mine),
      };
    }),
    suggested:
      packed.length > 0 || pieces.length === 0
        ? []
        : (await suggestOrderParcels(db, order, now)).map((parcel, index) => ({
            number: index + 1,
            length: parcel.length,
            width: parcel.width,
            height: parcel.height,
            kilograms: parcel.kilograms,
            oversize: parcel.oversize,
            content: contentOf(parcel.pieces, pieces),
          })),
    packed: packed.map((parcel) => ({
      number: parcel.number,
      length: parcel.length,
      width: parcel.width,
      height: parcel.height,
      kilograms: parcel.weight,
      handedOverAt: parcel.handedOverAt?.toISOString() ?? null,
      content: contentOf(
        pieces.filter(({ parcelId }) => parcelId === parcel.id).map(({ id }) => id),
        pieces,
      ),
    })),
    last: moves.at(-1)?.createdAt.toISOString() ?? null,
  };
}
export type ShippingView = Awaited<ReturnType<typeof shippingView>>;

/** `A ×2, B ×4`: what lies in a parcel. */
function contentOf(ids: readonly string[], pieces: readonly PieceWithPart[]): string {
  const inside = new Map<string, number>();
  for (const piece of pieces)
    if (ids.includes(piece.id)) inside.set(piece.part.label, (inside.get(piece.part.label) ?? 0) + 1);
  return [...inside].map(([label, count]) => `${label} ×${count}`).join(", ");
}
