import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { collections, newId, orders, outbox } from "~/db/schema";
import { buyLabel } from "~/flows/buy-label.server";
import { collectOrder } from "~/flows/collect-order.server";
import { countPieces } from "~/flows/count-pieces.server";
import { findRates } from "~/flows/find-rates.server";
import { findTracking } from "~/flows/find-tracking.server";
import { handOver } from "~/flows/hand-over.server";
import { noteFreight } from "~/flows/note-freight.server";
import { packOrder } from "~/flows/pack-order.server";
import { remakePiece } from "~/flows/remake-piece.server";
import { tellReady } from "~/flows/tell-ready.server";
import { voidLabel } from "~/flows/void-label.server";
import { enterLedger } from "~/models/ledger.server";
import { listParcels } from "~/models/parcels.server";
import { listPieces } from "~/models/pieces.server";
import {
  asked,
  cutNest,
  done,
  makeReceived,
  nest,
  pack,
  packAndLabel,
  refused,
  takeTabsOff,
} from "../support/chain";
import { resetDatabase } from "../support/database";
import {
  freshScene,
  makePerson,
  makeShop,
  orderAsIs,
  type TestPerson,
  type TestShop,
} from "../support/scene";
import { receiveWebhooks } from "../support/webhook-receiver";

const running = freshScene();
const receiver = receiveWebhooks();
const MONDAY = "2026-12-07";
let builder: TestPerson;
let operator: TestPerson;
let clerk: TestPerson;
let shop: TestShop;

beforeEach(async () => {
  await running.fakes.payments.webhooksSettled();
  running.fakes.payments.pointWebhooksAt(receiver.url);
  await resetDatabase();
  builder = await makePerson();
  operator = await makePerson({ roles: ["operator"] });
  clerk = await makePerson({ roles: ["clerk"] });
  shop = await makeShop();
});

async function cut(): Promise<string> {
  const order = await makeReceived({ builder, operator }, shop, running.fakes.payments);
  const { nest: made } = await done(nest(operator, shop, [order.id]));
  await cutNest(operator, shop, made.id, MONDAY);
  return order.id;
}
async function tabsOff(): Promise<string> {
  const orderId = await cut();
  await done(takeTabsOff(operator, orderId));
  return orderId;
}
const asPickUp = (orderId: string) =>
  db.update(orders).set({ delivery: "pick-up", shipTo: null }).where(eq(orders.id, orderId));
const mailsOf = async (template: string) =>
  (await db.select().from(outbox)).filter((mail) => mail.template === template);
/** Labels that were bought before this test belong to other orders. */
const carrierLabels = (orderReference: string) =>
  running.fakes.carrier.labels().filter(({ reference }) => reference?.startsWith(orderReference));
const SIGNED: [number, number][][] = [Array.from({ length: 12 }, (_, i) => [i * 10, 100 + (i % 3) * 9])];

describe("the pile", () => {
  test("is counted piece by piece, twice is once, and only what is off the bench", async () => {
    const orderId = await cut();
    const [a, b, c] = (await listPieces(db, orderId)).map(({ id }) => id);
    const count = (ids: readonly (string | undefined)[], counted = true) =>
      countPieces({ actor: clerk, orderId, pieceIds: ids.map(String), counted });
    expect(await refused(count([a]))).toMatchObject({ reason: "wrong-stage" });
    await done(takeTabsOff(operator, orderId));
    expect(await done(count([a, b]))).toMatchObject({ counted: 2, expected: 3 });
    expect(await done(count([b]))).toMatchObject({ counted: 2 });
    expect(await done(count([b], false))).toMatchObject({ counted: 1 });
    expect(await done(count([b, c]))).toMatchObject({ counted: 3 });
    expect(
      await refused(countPieces({ actor: operator, orderId, pieceIds: "all", counted: true })),
    ).toMatchObject({ reason: "not-allowed" });
  });

  test("is packed only when counted, every piece in one parcel, sizes and weights from the pieces", async () => {
    const orderId = await tabsOff();
    const ids = (await listPieces(db, orderId)).map(({ id }) => id);
    const packed = (bundles: readonly (readonly string[])[]) => packOrder({ actor: clerk, orderId, bundles });
    expect(await refused(packed([ids]))).toMatchObject({
      reason: "incomplete",
      words: "Count the pile first: 3 of 3 are not counted.",
    });
    await done(countPieces({ actor: clerk, orderId, pieceIds: "all", counted: true }));
    expect(await refused(packed([ids.slice(1)]))).toMatchObject({ reason: "changed" });
    expect(await refused(packed([ids, ids.slice(1)]))).toMatchObject({ reason: "changed" });
    const { parcels } = await done(packed([ids.slice(0, 1), ids.slice(1)]));
    // A is 800 x 400 less 100 x 50, the two B 600 x 300 less two holes of 5 mm; 17.8 mm of 680 kg/m3, the stack by
    // the lot's thickest 18 mm. Packing: 15 mm around and 2 kg to a square metre of face (the shop's own allowance).
    const hole = (Math.PI * 5 ** 2) / 4;
    const kilograms = (area: number, long: number, short: number) =>
      (area * 17.8 * 680) / 1e9 + ((long + 30) * (short + 30) * 2) / 1e6;
    expect(parcels).toMatchObject([
      { number: 1, length: 830, width: 430, height: 48 },
      { number: 2, length: 630, width: 330, height: 66 },
    ]);
    expect(parcels[0]?.weight).toBeCloseTo(kilograms(800 * 400 - 100 * 50, 800, 400), 6);
    expect(parcels[1]?.weight).toBeCloseTo(kilograms(2 * (600 * 300 - 2 * hole), 600, 300), 6);
    await done(packed([ids]));
    expect(await listParcels(db, orderId)).toHaveLength(1);
  });
});

describe("a label", () => {
  test("is refused for an order that is owed for, incomplete or not packed", async () => {
    const orderId = await tabsOff();
    const buy = (parcelId: string, actor = clerk) =>
      buyLabel({ actor, orderId, parcelId, service: "towpath-ground" });
    expect(await refused(buy("none"))).toMatchObject({ reason: "incomplete" });
    const [parcel] = await pack(clerk, orderId);
    const id = parcel?.id ?? "";
    expect(await refused(buy(id, operator))).toMatchObject({ reason: "not-allowed" });

    const order = await orderAsIs(orderId);
    const owe = (amount: number) =>
      transact((tx) =>
        enterLedger(tx, { orderId, kind: "debt", amount, currency: "usd", quoteId: order.quoteId }),
      );
    await owe(500);
    expect(await refused(buy(id))).toMatchObject({
      reason: "unpaid",
      words: "The order is not paid in full.",
    });
    await owe(-500);

    const [piece] = await listPieces(db, orderId);
    await done(
      remakePiece({
        ...(await asked(clerk, orderId)),
        pieceId: piece?.id ?? "",
        state: "spoiled",
        reason: "Dropped at the bench.",
        payer: "shop",
      }),
    );
    expect(await refused(buy(id))).toMatchObject({
      reason: "wrong-stage",
      words: "Not every piece has its tabs off; remakes count too.",
    });
    expect(carrierLabels(order.reference)).toEqual([]);
  });

  test("is bought once, however often it is asked for; void, the next is another", async () => {
    const orderId = await tabsOff();
    const { reference } = await orderAsIs(orderId);
    const [parcel] = await pack(clerk, orderId);
    const buy = () =>
      done(buyLabel({ actor: clerk, orderId, parcelId: parcel?.id ?? "", service: "towpath-swift" }));
    const [one, two] = await Promise.all([buy(), buy()]);
    expect(two).toEqual(one);
    expect(await buy()).toEqual(one);
    expect(carrierLabels(reference)).toHaveLength(1);

    const standing = async () =>
      (await listParcels(db, orderId))
        .flatMap(({ labels }) => labels)
        .filter(({ status }) => status === "bought");
    const [label] = await standing();
    expect(await standing()).toHaveLength(1);
    const makeVoid = (labelId: string) => voidLabel({ actor: clerk, orderId, labelId });
    expect(await refused(packOrder({ actor: clerk, orderId, bundles: [[]] }))).toMatchObject({
      words: "Void the labels first: they carry the sizes and weights of these parcels.",
    });
    await done(makeVoid(label?.id ?? ""));
    await done(makeVoid(label?.id ?? ""));
    expect(await standing()).toEqual([]);
    const again = await buy();
    expect(again.trackingNumber).not.toBe(one.trackingNumber);
    expect(carrierLabels(reference).map(({ status }) => status)).toEqual(["void", "label-made"]);

    running.fakes.carrier.advance(again.trackingNumber);
    const [second] = await standing();
    expect(await refused(makeVoid(second?.id ?? ""))).toMatchObject({ reason: "wrong-stage" });
    expect(await standing()).toHaveLength(1);
  });

  test("is priced by the carrier before, and an answer that does not come buys nothing", async () => {
    const orderId = await tabsOff();
    const [parcel] = await pack(clerk, orderId);
    const { rates, refused: over } = await done(findRates({ actor: clerk, orderId }));
    expect(over).toEqual([]);
    expect(rates.map(({ service }) => service)).toEqual(["towpath-ground", "towpath-swift"]);
    running.fakes.carrier.failNext(1);
    const buy = () =>
      buyLabel({ actor: clerk, orderId, parcelId: parcel?.id ?? "", service: "towpath-ground" });
    expect(await refused(buy())).toMatchObject({ reason: "unavailable" });
    const { price } = await done(buy());
    expect(price).toBe(rates[0]?.amount);
  });

  test("is not for a post-office box, nor freight for what a parcel carrier takes", async () => {
    const orderId = await tabsOff();
    const [parcel] = await pack(clerk, orderId);
    const freight = { actor: clerk, orderId, parcelId: parcel?.id ?? "", number: "BOL-77" };
    expect(await refused(noteFreight(freight))).toMatchObject({ reason: "invalid" });
    const { shipTo } = await orderAsIs(orderId);
    if (!shipTo) throw new Error("No address.");
    await db
      .update(orders)
      .set({ shipTo: { ...shipTo, line1: "PO Box 12" } })
      .where(eq(orders.id, orderId));
    expect(await refused(findRates({ actor: clerk, orderId }))).toMatchObject({ reason: "invalid" });
  });
});

describe("handing over", () => {
  test("needs a label on every parcel, happens once, and mails the tracking", async () => {
    const orderId = await tabsOff();
    expect(await refused(handOver(await asked(clerk, orderId)))).toMatchObject({ reason: "incomplete" });
    await pack(clerk, orderId);
    expect(await refused(handOver(await asked(clerk, orderId)))).toMatchObject({
      words: "Parcel 1 has no label yet.",
    });
    await packAndLabel(clerk, orderId);
    const once = await asked(clerk, orderId);
    await done(handOver(once));
    await done(handOver(once));
    expect(await refused(handOver(await asked(clerk, orderId)))).toMatchObject({ reason: "wrong-stage" });
    expect(await orderAsIs(orderId)).toMatchObject({ stage: "shipped", shippedAt: expect.any(Date) });
    expect((await listPieces(db, orderId)).every(({ stage }) => stage === "shipped")).toBe(true);

    const parcels = await listParcels(db, orderId);
    const tracking = parcels[0]?.labels[0]?.trackingNumber ?? "none";
    const shipped = (await mailsOf("stage")).filter(({ payload }) => payload.subject.includes("has shipped"));
    expect(shipped).toHaveLength(1);
    expect(shipped[0]?.payload.text).toContain(tracking);
    expect(shipped[0]?.payload.html).toContain(tracking);
    expect(shipped[0]?.payload.text).toContain("within 5 business days");

    running.fakes.carrier.advance(tracking);
    expect(await findTracking(parcels)).toMatchObject([
      { number: 1, trackingNumber: tracking, tracking: { status: "collected" } },
    ]);
  });

  test("waits for a remake until it joins the others", async () => {
    const orderId = await cut();
    const [piece] = await listPieces(db, orderId);
    await done(
      remakePiece({
        ...(await asked(operator, orderId)),
        pieceId: piece?.id ?? "",
        state: "missing",
        reason: "Not on the table.",
        payer: "shop",
      }),
    );
    await done(takeTabsOff(operator, orderId));
    await done(countPieces({ actor: clerk, orderId, pieceIds: "all", counted: true }));
    expect(await refused(handOver(await asked(clerk, orderId)))).toMatchObject({ reason: "wrong-stage" });
    const { nest: second } = await done(nest(operator, shop, [orderId]));
    await cutNest(operator, shop, second.id, MONDAY);
    await done(takeTabsOff(operator, orderId));
    await packAndLabel(clerk, orderId);
    await done(handOver(await asked(clerk, orderId)));
    expect(await orderAsIs(orderId)).toMatchObject({ stage: "shipped" });
  });
});

describe("a pick-up", () => {
  const collect = async (orderId: string, change: { name?: string; strokes?: [number, number][][] } = {}) =>
    collectOrder({ ...(await asked(clerk, orderId)), name: "Wren Halloran", strokes: SIGNED, ...change });

  test("is told ready when counted, then signed for; the signature is kept", async () => {
    const orderId = await tabsOff();
    await asPickUp(orderId);
    const requestId = newId();
    const tell = () => tellReady({ actor: clerk, orderId, requestId });
    expect(await refused(tell())).toMatchObject({ reason: "incomplete" });
    expect(await refused(collect(orderId))).toMatchObject({ reason: "incomplete" });
    await done(countPieces({ actor: clerk, orderId, pieceIds: "all", counted: true }));
    await done(tell());
    await done(tell());
    const ready = await mailsOf("ready");
    expect(ready).toHaveLength(1);
    expect(ready[0]).toMatchObject({ recipient: builder.email });
    expect(ready[0]?.payload.text).toMatch(/Pieces +3/);

    expect(await refused(collect(orderId, { name: " " }))).toMatchObject({ reason: "incomplete" });
    expect(await refused(collect(orderId, { strokes: [[[1, 1]]] }))).toMatchObject({
      words: "A signature is missing.",
    });
    expect(await refused(handOver(await asked(clerk, orderId)))).toMatchObject({ reason: "wrong-stage" });
    await done(collect(orderId));
    expect(await orderAsIs(orderId)).toMatchObject({ stage: "shipped" });
    const kept = await db.select().from(collections);
    expect(kept).toMatchObject([{ orderId, name: "Wren Halloran", handedBy: clerk.id }]);
    const svg = await running.services.storage.get(kept[0]?.signatureKey ?? "");
    expect(new TextDecoder().decode(svg)).toMatch(/^<svg [^>]+><path d="M0 100L10 109L20 118L30 100/);
    expect(await refused(collect(orderId))).toMatchObject({ reason: "wrong-stage" });
    expect(await db.select().from(collections)).toHaveLength(1);
  });

  test("needs no label, and cannot have one", async () => {
    const orderId = await tabsOff();
    await asPickUp(orderId);
    expect(await refused(findRates({ actor: clerk, orderId }))).toMatchObject({ reason: "wrong-stage" });
    expect(await refused(tellReady({ actor: operator, orderId, requestId: newId() }))).toMatchObject({
      reason: "not-allowed",
    });
  });
});
