import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import { db } from "~/db/client.server";
import { labels as labelRows, lots, pieces as pieceRows } from "~/db/schema";
import { code128, gs1Sscc, qr } from "~/documents/barcodes.server";
import { wrapped } from "~/documents/page";
import { partLabelPages } from "~/documents/part-labels.server";
import { printPages } from "~/documents/print-pages.server";
import { shippingLabelPage } from "~/documents/shipping-label.server";
import { printPackingList } from "~/flows/print-packing-list.server";
import { printPartLabels } from "~/flows/print-part-labels.server";
import { printShippingLabel } from "~/flows/print-shipping-label.server";
import { listParcels } from "~/models/parcels.server";
import { listPieces } from "~/models/pieces.server";
import { listStageMoves } from "~/models/stage-moves.server";
import { readBarcodes, readWords } from "../support/barcode-reader";
import { cutNest, done, makeReceived, nest, packAndLabel, takeTabsOff } from "../support/chain";
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
let operator: TestPerson;
let clerk: TestPerson;
let shop: TestShop;

beforeEach(async () => {
  await running.fakes.payments.webhooksSettled();
  running.fakes.payments.pointWebhooksAt(receiver.url);
  await resetDatabase();
  operator = await makePerson({ roles: ["operator"] });
  clerk = await makePerson({ roles: ["clerk"] });
  shop = await makeShop();
});

async function tabsOff() {
  const builder = await makePerson({ name: "Isolde Brambleton" });
  const order = await makeReceived({ builder, operator }, shop, running.fakes.payments);
  const { nest: made } = await done(nest(operator, shop, [order.id]));
  await cutNest(operator, shop, made.id, MONDAY);
  await done(takeTabsOff(operator, order.id));
  return order.id;
}

const modules = (runs: readonly number[]) => runs.reduce((sum, run) => sum + run, 0);

describe("symbols", () => {
  test("of GS1-128 are as wide as GS1's example says, and its check symbol is the standard's", () => {
    // GS1 General Specifications, (00)106141411234567897: 156 modules, check value 34. Each symbol is 11 modules, the
    // stop 13; value 34 is the pattern 131123 (ISO/IEC 15417, table of values).
    const runs = gs1Sscc("106141411234567897");
    expect(modules(runs)).toBe(156);
    expect(runs.slice(-13, -7)).toEqual([1, 3, 1, 1, 2, 3]);
  });

  test("of Code 128 carry the check symbol of the published example", () => {
    // PJJ123C in code set A: check value 54 (worked example in public descriptions of ISO/IEC 15417); the encoder may
    // choose set B for the same letters, whose start value is one more: 55. Value 55 is the pattern 311321.
    expect(code128("PJJ123C").slice(-13, -7)).toEqual([3, 1, 1, 3, 2, 1]);
  });

  test("of a QR code are 17 + 4 v modules wide (ISO/IEC 18004)", () => {
    const rows = qr("0b9f6c1e-6f3d-4b0d-9c39-0d1a2b3c4d5e");
    expect(rows).toHaveLength(29);
    expect(rows.every((row) => row.length === 29)).toBe(true);
  });

  test("of a container code are read back off the label, bars 32 mm high, lowest of all", async () => {
    const page = shippingLabelPage({
      shopName: "The Shop",
      shopAddress: ["14 Ferry Slip Road", "Marrow Point, WA 98399"],
      shipTo: ["WREN HALLORAN", "12 TOWPATH ROW", "MARROW POINT WA 98999"],
      reference: "KP-2047",
      number: 1,
      of: 1,
      kilograms: 12,
      length: 800,
      width: 400,
      height: 100,
      service: "towpath-ground",
      trackingNumber: "TP00012345678",
      teamLift: false,
      sscc: "106141411234567897",
      code: "box",
      formaldehyde: null,
    });
    const bars = page.marks.flatMap((mark) => (mark.kind === "bars" ? [mark] : []));
    // GS1 logistic label: bars at least 32 mm, X between 0.495 and 1.016 mm, the SSCC lowest.
    expect(bars.every(({ height, module }) => height >= 32 && module >= 0.495)).toBe(true);
    expect(bars.at(-1)?.y).toBe(Math.max(...bars.map(({ y }) => y)));
    const pdf = await printPages([page], { title: "label", at: new Date(0) });
    expect(readBarcodes(pdf, 203)).toEqual(["CODE-128:00106141411234567897", "CODE-128:TP00012345678"]);
  });
});

describe("part labels", () => {
  test("carry each piece's opaque code, read again, and nothing of the builder", async () => {
    const orderId = await tabsOff();
    const printed = await printPartLabels({ of: { orderId }, paper: "roll" });
    const pdf = printed?.bytes ?? new Uint8Array();
    const codes = (await listPieces(db, orderId)).map(({ code }) => `QR-Code:${code}`);
    expect(codes).toHaveLength(3);
    expect(readBarcodes(pdf, 203)).toEqual(codes.sort());
    const { words, pages } = readWords(pdf);
    // 62 x 40 mm in points.
    expect(pages).toEqual(Array(3).fill("175.748 x 113.386"));
    const { reference } = await orderAsIs(orderId);
    for (const said of [
      reference,
      "rev 1",
      "2 of 2",
      "sheet 1 / 1",
      "18 mm BB-18",
      "L-1801",
      "next: tabs off",
      "face up",
    ])
      expect(words).toContain(said);
    expect(words).not.toMatch(/Isolde|Brambleton|Halloran|Towpath/);
  });

  test("printed again are the same to the byte, one alone or all, whatever happened since", async () => {
    const orderId = await tabsOff();
    const [first] = await listPieces(db, orderId);
    const print = async () => ({
      all: (await printPartLabels({ of: { orderId }, paper: "letter" }))?.bytes,
      one: (await printPartLabels({ of: { orderId }, paper: "roll", pieceIds: [first?.id ?? ""] }))?.bytes,
    });
    const before = await print();
    await new Promise((resolve) => setTimeout(resolve, 1_100));
    await packAndLabel(clerk, orderId);
    expect(await print()).toEqual(before);
    expect(before.one?.length).toBeGreaterThan(1_000);
  });

  test("fill sheets of paper with as many as fit", () => {
    const label = {
      reference: "KP-2047",
      revision: 1,
      part: "A",
      partName: null,
      number: 1,
      of: 1,
      remake: false,
      grain: "along-x" as const,
      hasGrain: true,
      width: 600,
      height: 300,
      material: "BB-18",
      nominalThickness: 18,
      lot: "L-1801",
      sheet: null,
      next: ["tabs off"],
      code: "code",
    };
    const forty = Array.from({ length: 40 }, () => label);
    // 62 x 40 mm on Letter (215.9 x 279.4): 3 by 6; on A4 (210 x 297): 3 by 7.
    expect(partLabelPages(forty, "letter")).toHaveLength(3);
    expect(partLabelPages(forty, "a4")).toHaveLength(2);
  });

  test("print nothing for an order without pieces", async () => {
    expect(await printPartLabels({ of: { orderId: "none" }, paper: "roll" })).toBeUndefined();
  });
});

describe("a shipping label", () => {
  test("is 4 x 6 in, its tracking number and box read again, the same to the byte each time", async () => {
    const orderId = await tabsOff();
    const [parcel] = await packAndLabel(clerk, orderId);
    const order = await orderAsIs(orderId);
    const printed = await printShippingLabel(order, parcel?.id ?? "");
    const pdf = printed?.bytes ?? new Uint8Array();
    const [label] = await db.select().from(labelRows);
    expect(readBarcodes(pdf, 203)).toEqual([`CODE-128:${label?.trackingNumber}`, `QR-Code:${parcel?.id}`]);
    const { words, pages } = readWords(pdf);
    expect(pages).toEqual(["288 x 432"]);
    for (const said of [
      "WREN HALLORAN",
      "12 TOWPATH ROW",
      "MARROW POINT WA 98999",
      order.reference,
      "box 1 of 1",
    ])
      expect(words).toContain(said);
    await new Promise((resolve) => setTimeout(resolve, 1_100));
    expect((await printShippingLabel(order, parcel?.id ?? ""))?.bytes).toEqual(pdf);
  });
});

describe("a packing list", () => {
  test("says what is in the box, from which lot, and when to report damage; printing moves nothing", async () => {
    await db.update(lots).set({ supplierDocument: "papers/l-1801.pdf" });
    const orderId = await tabsOff();
    await packAndLabel(clerk, orderId);
    const order = await orderAsIs(orderId);
    const moves = await listStageMoves(db, orderId);
    const printed = await printPackingList(order);
    const pdf = printed?.bytes ?? new Uint8Array();
    const { words } = readWords(pdf);
    const flat = words.replace(/\s+/g, " ");
    for (const said of [
      `${order.reference} rev 1`,
      "Box 1 of 1",
      "WREN HALLORAN",
      "BB-18, L-1801",
      "TSCA Title VI compliant. Made by Alder Ferry Panelworks,",
      "within 5 business days",
      clerk.name,
    ])
      expect(flat).toContain(said);
    // Two shelves of 600 x 300, all of them here, none back-ordered.
    expect(flat).toMatch(/600 x 300 2 2 0 BB-18/);
    expect(readBarcodes(pdf, 200)).toEqual([expect.stringContaining(`/orders/${order.id}`)]);
    expect(await orderAsIs(orderId)).toEqual(order);
    expect(await listStageMoves(db, orderId)).toEqual(moves);
    expect((await listParcels(db, orderId)).every(({ handedOverAt }) => handedOverAt === null)).toBe(true);
  });

  test("makes no formaldehyde statement where a lot's paper is missing, and says so", async () => {
    const orderId = await tabsOff();
    await packAndLabel(clerk, orderId);
    const printed = await printPackingList(await orderAsIs(orderId));
    const flat = readWords(printed?.bytes ?? new Uint8Array()).words.replace(/\s+/g, " ");
    expect(flat).not.toContain("TSCA Title VI compliant");
    expect(flat).toContain("the supplier's paper for L-1801 is not on file");
  });

  test("is not there before a box is closed", async () => {
    const orderId = await tabsOff();
    expect(await printPackingList(await orderAsIs(orderId))).toBeUndefined();
    expect(await db.select().from(pieceRows).where(eq(pieceRows.orderId, orderId))).toHaveLength(3);
  });
});

test("words are broken at blanks, and a longer one anywhere", () => {
  // Ten letters of 0.6 em fit on 6 mm at 1 mm.
  expect(wrapped("one two three abcdefghijklmn", 1, 6)).toEqual(["one two", "three", "abcdefghij", "klmn"]);
});
