/** The way of an order through the real flows, up to where a test begins. */
import { db } from "~/db/client.server";
import { newId } from "~/db/schema";
import type { ShipTo } from "~/domain/orders";
import { approveQuote } from "~/flows/approve-quote.server";
import { buyLabel } from "~/flows/buy-label.server";
import { countPieces } from "~/flows/count-pieces.server";
import { finishRun } from "~/flows/finish-run.server";
import { movePieces } from "~/flows/move-pieces.server";
import { nestOrders } from "~/flows/nest-orders.server";
import { packOrder } from "~/flows/pack-order.server";
import { partListHash } from "~/flows/part-list-hash.server";
import { quoteOrder } from "~/flows/quote-order.server";
import { receiveOrder } from "~/flows/receive-order.server";
import { scheduleSheet } from "~/flows/schedule-sheet.server";
import { setDelivery } from "~/flows/set-delivery.server";
import { startCheckout } from "~/flows/start-checkout.server";
import { startRun } from "~/flows/start-run.server";
import { suggestOrderParcels } from "~/flows/suggest-bundles.server";
import type { Refusal, Verdict } from "~/flows/verdict";
import { findCheckout } from "~/models/checkouts.server";
import { listSheets } from "~/models/nests.server";
import type { Order } from "~/models/orders.server";
import { listParts } from "~/models/parts.server";
import type { PaymentsFake } from "~fakes/payments";
import { shelvesDxf } from "./drawings";
import { chooseStock, makeDraftOrder, orderAsIs, type TestPerson, type TestShop } from "./scene";

/** What a flow did; a refusal fails the test with its words. */
export async function done<Value extends object>(
  verdict: Verdict<Value> | Promise<Verdict<Value>>,
): Promise<{ readonly ok: true } & Value> {
  const answer = await verdict;
  if (!answer.ok) throw new Error(`Refused (${answer.reason}): ${answer.words}`);
  return answer;
}

/** Why a flow refused; one that did not fails the test. */
export async function refused(verdict: Verdict | Promise<Verdict>): Promise<Refusal> {
  const answer = await verdict;
  if (answer.ok) throw new Error("It was not refused.");
  return answer;
}

export const SHIP_TO: ShipTo = {
  recipient: "Wren Halloran",
  line1: "12 Towpath Row",
  city: "Marrow Point",
  region: "WA",
  postcode: "98999",
  country: "US",
  residential: true,
};

let marks = 0;

/** A draft of its own bytes, with stock and delivery chosen. */
export async function makeReadyDraft(
  builder: TestPerson,
  shop: TestShop,
  bytes: Uint8Array = shelvesDxf({ mark: ++marks }),
): Promise<Order> {
  const order = await makeDraftOrder(builder, bytes);
  await chooseStock(builder, order, shop.material.id);
  await done(
    setDelivery({
      actor: builder,
      orderId: order.id,
      version: (await orderAsIs(order.id)).version,
      delivery: { kind: "ship", shipTo: SHIP_TO },
    }),
  );
  return orderAsIs(order.id);
}

export async function makeQuoted(builder: TestPerson, shop: TestShop, now?: Date): Promise<Order> {
  const draft = await makeReadyDraft(builder, shop);
  await done(
    quoteOrder({
      actor: builder,
      orderId: draft.id,
      version: draft.version,
      requestId: newId(),
      ...(now ? { now } : {}),
    }),
  );
  return orderAsIs(draft.id);
}

/** The builder approves what the order's quote shows. */
export async function approve(builder: TestPerson, orderId: string, now?: Date) {
  const order = await orderAsIs(orderId);
  if (!order.quoteId || !order.revisionId) throw new Error("There is no quote to approve.");
  return approveQuote({
    actor: builder,
    orderId,
    version: order.version,
    quoteId: order.quoteId,
    listHash: partListHash(order.quoteId, await listParts(db, order.revisionId)),
    ...(now ? { now } : {}),
  });
}

export async function makeApproved(builder: TestPerson, shop: TestShop, now?: Date): Promise<Order> {
  const order = await makeQuoted(builder, shop, now);
  await done(approve(builder, order.id, now));
  return orderAsIs(order.id);
}

/** Opens the pay page; answers the checkout and its session at the payment service. */
export async function openPayPage(builder: TestPerson, orderId: string) {
  const { checkoutId, url } = await done(startCheckout({ actor: builder, orderId }));
  const checkout = await findCheckout(db, orderId, checkoutId);
  if (!checkout?.sessionId) throw new Error("The checkout has no session.");
  return { checkoutId, url, sessionId: checkout.sessionId };
}

export async function makePaid(builder: TestPerson, shop: TestShop, payments: PaymentsFake): Promise<Order> {
  const order = await makeApproved(builder, shop);
  const { sessionId } = await openPayPage(builder, order.id);
  await payments.pay(sessionId);
  await payments.webhooksSettled();
  return orderAsIs(order.id);
}

/** What a move is asked with, on the order as it is now. */
export async function asked(actor: TestPerson, orderId: string) {
  return { actor, orderId, version: (await orderAsIs(orderId)).version, requestId: newId() };
}

export async function makeReceived(
  { builder, operator }: { builder: TestPerson; operator: TestPerson },
  shop: TestShop,
  payments: PaymentsFake,
): Promise<Order> {
  const order = await makePaid(builder, shop, payments);
  return (await done(receiveOrder(await asked(operator, order.id)))).order;
}

/** Nests orders on the shop's material. */
export async function nest(operator: TestPerson, shop: TestShop, orderIds: readonly string[]) {
  const versions = Object.fromEntries(
    await Promise.all(orderIds.map(async (id) => [id, (await orderAsIs(id)).version])),
  );
  return nestOrders({
    actor: operator,
    materialId: shop.material.id,
    orderIds,
    versions,
    requestId: newId(),
  });
}

/** Every sheet of a nest scheduled on the machine, started and finished. */
export async function cutNest(operator: TestPerson, shop: TestShop, nestId: string, day: string) {
  for (const sheet of await listSheets(db, nestId)) {
    const { run } = await done(
      scheduleSheet({ actor: operator, sheetId: sheet.id, machineId: shop.machine.id, day, runVersion: 0 }),
    );
    await done(startRun({ actor: operator, runId: run.id, version: run.version }));
    await done(finishRun({ actor: operator, runId: run.id, version: run.version + 1, actualMinutes: 21 }));
  }
}

export const takeTabsOff = async (operator: TestPerson, orderId: string) =>
  movePieces({ ...(await asked(operator, orderId)), act: "remove-tabs", pieceIds: "all" });

/** The pile counted and packed as suggested; answers the parcels. */
export async function pack(clerk: TestPerson, orderId: string) {
  await done(countPieces({ actor: clerk, orderId, pieceIds: "all", counted: true }));
  const suggested = await suggestOrderParcels(db, await orderAsIs(orderId), new Date());
  const bundles = suggested.map(({ pieces }) => pieces);
  return (await done(packOrder({ actor: clerk, orderId, bundles }))).parcels;
}

/** All that comes before a hand-over to the carrier. */
export async function packAndLabel(clerk: TestPerson, orderId: string) {
  const parcels = await pack(clerk, orderId);
  for (const { id } of parcels)
    await done(buyLabel({ actor: clerk, orderId, parcelId: id, service: "towpath-ground" }));
  return parcels;
}
