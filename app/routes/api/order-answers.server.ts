import { db } from "~/db/client.server";
import type { OrderAnswer, OrderSummary, StatusAnswer } from "~/documents/api/answers";
import { apiWaiting, progressOf } from "~/domain/orders";
import { dayOf } from "~/domain/scheduling";
import { openAsks } from "~/flows/order-facts.server";
import { listDrawings } from "~/models/drawing-files.server";
import { listFindings } from "~/models/findings.server";
import type { ListedOrder } from "~/models/order-list.server";
import type { Order } from "~/models/orders.server";
import { listParcels } from "~/models/parcels.server";
import { listParts } from "~/models/parts.server";
import { findNames } from "~/models/people.server";
import { listPieces } from "~/models/pieces.server";
import { findQuote, listQuoteLines, type Quote } from "~/models/quotes.server";
import { currentSettings } from "~/models/settings.server";
import { listStockGroups } from "~/models/stock-groups.server";
import { environment } from "~/server/environment.server";

type QuoteFacts = NonNullable<ListedOrder["quote"]>;

/** Absolute, so that an answer can be followed from wherever it is kept. */
export const addressOf = (path: string): string => new URL(path, environment.APP_URL).href;

/** Orders as the list gives them. */
export async function orderSummaries(orders: readonly ListedOrder[], now: Date): Promise<OrderSummary[]> {
  const names = await findNames(
    db,
    orders.map(({ builderId }) => builderId),
  );
  return Promise.all(
    orders.map((order) => summaryOf(order, order.quote, names.get(order.builderId) ?? "", now)),
  );
}

/** One order with its parts, quote and parcels. */
export async function orderAnswer(order: Order, now: Date): Promise<OrderAnswer> {
  const { id, revisionId } = order;
  const quote = await quoteOf(order);
  const names = await findNames(db, [order.builderId]);
  const groups = revisionId === null ? [] : await listStockGroups(db, id, revisionId);
  const parts = revisionId === null ? [] : await listParts(db, revisionId);
  return {
    ...(await summaryOf(order, quote ?? null, names.get(order.builderId) ?? "", now)),
    trial: order.trial,
    holdReason: order.holdReason,
    shipTo: shownAddress(order),
    drawings: (await listDrawings(db, id)).map((drawing) => ({
      id: drawing.id,
      fileName: drawing.fileName,
      sha256: drawing.fileSha,
      url: addressOf(`/api/orders/${id}/drawings/${drawing.id}`),
    })),
    parts: parts.map(({ label, name, width, height, quantity, stockGroupId }) => ({
      label,
      name,
      width,
      height,
      quantity,
      material: groups.find((group) => group.id === stockGroupId)?.material.name ?? null,
    })),
    quote: quote ? await shownQuote(order, quote, now) : null,
    parcels: (await listParcels(db, id)).map(({ number, length, width, height, weight, ...parcel }) => ({
      number,
      length,
      width,
      height,
      weight,
      handedOverAt: iso(parcel.handedOverAt),
      trackingNumbers: parcel.labels
        .filter(({ status }) => status === "bought")
        .map(({ trackingNumber }) => trackingNumber),
    })),
  };
}

/** Where an order and its pieces stand. */
export async function statusAnswer(order: Order, now: Date): Promise<StatusAnswer> {
  const pieces = await listPieces(db, order.id);
  const { timeZone } = (await currentSettings(db)).shop;
  const { promisedFor, shippedAt, paidAt, cancelledAt } = order;
  return {
    id: order.id,
    reference: order.reference,
    stage: order.stage,
    heldFrom: order.heldFrom,
    waitingFor: await waitingOf(order, (await quoteOf(order)) ?? null, now),
    promisedFor: iso(promisedFor),
    shippedAt: iso(shippedAt),
    late:
      promisedFor !== null &&
      paidAt !== null &&
      shippedAt === null &&
      cancelledAt === null &&
      dayOf(promisedFor, timeZone) < dayOf(now, timeZone),
    progress: progressOf(pieces).map((step) => ({ ...step })),
    pieces: pieces.map(({ part, number, of, stage, state, remakeOf }) => ({
      part: part.label,
      name: part.name,
      number,
      of,
      stage,
      state,
      remake: remakeOf !== null,
    })),
    updatedAt: order.updatedAt.toISOString(),
    eventsUrl: addressOf(`/api/orders/${order.id}/events`),
  };
}

async function summaryOf(
  order: Order,
  quote: QuoteFacts | null,
  builder: string,
  now: Date,
): Promise<OrderSummary> {
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    builder: { name: builder },
    stage: order.stage,
    heldFrom: order.heldFrom,
    waitingFor: await waitingOf(order, quote, now),
    delivery: order.delivery,
    total: quote && { cents: quote.total, currency: quote.currency },
    promisedFor: iso(order.promisedFor),
    paidAt: iso(order.paidAt),
    shippedAt: iso(order.shippedAt),
    createdAt: order.createdAt.toISOString(),
    updatedAt: order.updatedAt.toISOString(),
    url: addressOf(`/api/orders/${order.id}`),
    statusUrl: addressOf(`/api/orders/${order.id}/status`),
  };
}

async function waitingOf(order: Order, quote: QuoteFacts | null, now: Date) {
  const { stage, holdReason, revisionId } = order;
  const questions =
    stage === "needs-review" && revisionId !== null ? openAsks(await listFindings(db, revisionId)).length : 0;
  return apiWaiting({
    stage,
    holdReason,
    questions,
    expired: quote !== null && isExpired(order, quote, now),
  });
}

const isExpired = (order: Order, quote: QuoteFacts, now: Date): boolean =>
  quote.status === "expired" || (order.paidAt === null && quote.expiresAt <= now);

const quoteOf = async ({ id, quoteId }: Order): Promise<Quote | undefined> =>
  quoteId === null ? undefined : findQuote(db, id, quoteId);

async function shownQuote(order: Order, quote: Quote, now: Date): Promise<OrderAnswer["quote"]> {
  const { number, net, tax, total, currency, machineMinutes } = quote;
  const lines = await listQuoteLines(db, quote.id);
  return {
    number,
    lines: lines.map(({ kind, label, how, amount }) => ({ kind, label, how, amount })),
    net,
    tax,
    total,
    currency,
    machineMinutes,
    expiresAt: quote.expiresAt.toISOString(),
    expired: isExpired(order, quote, now),
    approvedAt: iso(quote.acceptedAt),
  };
}

function shownAddress({ shipTo }: Order): OrderAnswer["shipTo"] {
  if (shipTo === null) return null;
  const { recipient, company = null, line1, line2 = null, city, region, postcode, country } = shipTo;
  return { recipient, company, line1, line2, city, region, postcode, country };
}

const iso = (at: Date | null): string | null => at?.toISOString() ?? null;
