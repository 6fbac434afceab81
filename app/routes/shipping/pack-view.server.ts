import type { Person } from "~/auth/guards.server";
import { db } from "~/db/client.server";
import { checkMove, mayDo } from "~/domain/orders";
import { formaldehydeLine, parcelNotes, suggestParcels } from "~/domain/shipping";
import { findRates } from "~/flows/find-rates.server";
import { findTracking } from "~/flows/find-tracking.server";
import { factsOfOrder } from "~/flows/order-facts.server";
import { shippingLabel } from "~/flows/print-shipping-label.server";
import { packingOf } from "~/flows/suggest-bundles.server";
import { READY_ACT } from "~/flows/tell-ready.server";
import { listActs } from "~/models/audit.server";
import { listPiecesWithSheet, type PieceOnSheet } from "~/models/bench.server";
import { findCollection } from "~/models/collections.server";
import type { Order } from "~/models/orders.server";
import { type LabelledParcel, listParcels, standingLabel } from "~/models/parcels.server";
import { findAddressee } from "~/models/people.server";
import { currentSettings } from "~/models/settings.server";
import { listStockGroups } from "~/models/stock-groups.server";

export const STEPS = ["count", "bundles", "label", "leave"] as const;
export type Step = (typeof STEPS)[number];

/** One order at the packing bench. Sizes in millimetres, weights in kilograms, packing included. */
export async function packView(order: Order, person: Person, asked: Step | null, now = new Date()) {
  const facts = await factsOfOrder(db, order, now);
  const roles = person.roles.filter((role) => role !== "builder");
  const verdict = checkMove("ship", facts, roles);
  const { pieces: flat, limits } = await packingOf(db, order, now);
  const pieces = (await listPiecesWithSheet(db, { orderId: order.id })).filter(
    ({ state }) => state !== "cancelled",
  );
  const good = pieces.filter(({ state }) => state === "good");
  const parcels = await listParcels(db, order.id);
  const isPacked =
    parcels.length > 0 && good.every(({ parcelId }) => parcels.some(({ id }) => id === parcelId));
  const isPickUp = order.delivery === "pick-up";
  const isCounted = good.length > 0 && good.every(({ countedAt }) => countedAt !== null);
  const reached: Step = !isCounted
    ? "count"
    : isPickUp || (isPacked && parcels.every((parcel) => standingLabel(parcel)))
      ? "leave"
      : isPacked
        ? "label"
        : "bundles";
  const step = asked ?? reached;
  const builder = await findAddressee(db, order.builderId);
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    stage: order.stage,
    version: order.version,
    requestId: crypto.randomUUID(),
    isPickUp,
    shipTo: order.shipTo,
    builder: builder?.name ?? "",
    promisedFor: order.promisedFor?.toISOString() ?? null,
    shippedAt: order.shippedAt?.toISOString() ?? null,
    mayEdit: mayDo(roles, "shipping.edit"),
    ready: verdict.ok ? { may: true, why: null } : { may: false, why: verdict.words },
    owed: facts.owed,
    step,
    reached,
    isCounted,
    isPacked,
    pieces: pieces.map(shownPiece),
    flat,
    limits,
    bundles: isPacked
      ? parcels.map(({ id }) => good.filter(({ parcelId }) => parcelId === id).map((piece) => piece.id))
      : suggestParcels(flat, limits).map((parcel) => [...parcel.pieces]),
    parcels: await Promise.all(
      parcels.map(async (parcel) => shownParcel(order, parcel, parcels.length, limits)),
    ),
    rates:
      step === "label" && isPacked && order.stage !== "shipped"
        ? await shownRates(order, person, parcels)
        : null,
    tracking: order.stage === "shipped" ? await findTracking(parcels) : [],
    missingPapers: await missingPapers(order),
    toldReadyAt:
      (await listActs(db, { kind: "order", id: order.id }))
        .find(({ act }) => act === READY_ACT)
        ?.createdAt.toISOString() ?? null,
    collection: isPickUp && order.stage === "shipped" ? await shownCollection(order) : null,
  };
}
export type PackView = Awaited<ReturnType<typeof packView>>;

const shownPiece = (piece: PieceOnSheet) => ({
  id: piece.id,
  code: piece.code,
  reference: piece.reference,
  label: piece.part.label,
  name:
    piece.part.name === piece.part.letter || piece.part.name === piece.part.label ? null : piece.part.name,
  number: piece.number,
  of: piece.of,
  stage: piece.stage,
  state: piece.state,
  remake: piece.remakeOf !== null,
  cause: piece.cause,
  counted: piece.countedAt !== null,
  width: piece.part.width,
  height: piece.part.height,
  sheet: piece.sheet && `sheet ${piece.sheet.nestNumber}/${piece.sheet.number}`,
});
export type ShownPiece = ReturnType<typeof shownPiece>;

async function shownParcel(
  order: Order,
  parcel: LabelledParcel,
  of: number,
  limits: Parameters<typeof parcelNotes>[2],
) {
  const label = standingLabel(parcel);
  const printed = label ? await shippingLabel(order, parcel, of) : null;
  return {
    id: parcel.id,
    number: parcel.number,
    length: parcel.length,
    width: parcel.width,
    height: parcel.height,
    kilograms: parcel.weight,
    notes: parcelNotes(parcel, parcel.weight, limits),
    label: label
      ? {
          id: label.id,
          service: label.service,
          trackingNumber: label.trackingNumber,
          price: label.price,
          boughtAt: label.createdAt.toISOString(),
          page: printed?.page ?? null,
        }
      : null,
    voided: parcel.labels
      .filter(({ status }) => status === "void")
      .map(({ trackingNumber, voidedAt }) => ({
        trackingNumber,
        at: voidedAt?.toISOString() ?? null,
      })),
  };
}
export type ShownParcel = Awaited<ReturnType<typeof shownParcel>>;

/** Asked of the carrier only for parcels that it may take and that have no label yet. */
async function shownRates(order: Order, person: Person, parcels: readonly LabelledParcel[]) {
  if (parcels.every((parcel) => standingLabel(parcel))) return null;
  const answer = await findRates({ actor: person, orderId: order.id });
  return answer.ok
    ? { rates: answer.rates, refused: answer.refused, words: null }
    : { rates: [], refused: [], words: answer.words };
}

async function missingPapers(order: Order): Promise<readonly string[]> {
  if (order.revisionId === null) return [];
  const { shop } = await currentSettings(db);
  const groups = await listStockGroups(db, order.id, order.revisionId);
  return formaldehydeLine(
    groups.map(({ material, lot }) => ({
      kind: material.kind,
      lot: lot?.code ?? null,
      document: lot?.supplierDocument ?? null,
    })),
    shop.name,
    "",
  ).missing;
}

async function shownCollection(order: Order) {
  const collection = await findCollection(db, order.id);
  return collection ? { name: collection.name, at: collection.createdAt.toISOString() } : null;
}
