import { db } from "~/db/client.server";
import { DEMO_DRAWINGS, type DemoDrawingName } from "~/db/seed/drawings";
import type { Sanding } from "~/domain/orders";
import { answerFinding } from "~/flows/answer-finding.server";
import { approveQuote } from "~/flows/approve-quote.server";
import { finishRun } from "~/flows/finish-run.server";
import { movePieces } from "~/flows/move-pieces.server";
import { nestOrders } from "~/flows/nest-orders.server";
import { orderInterpretation } from "~/flows/order-interpretation.server";
import { listHashOfOrder } from "~/flows/part-list-hash.server";
import { quoteOrder } from "~/flows/quote-order.server";
import { receiveOrder } from "~/flows/receive-order.server";
import { renameOrder } from "~/flows/rename-order.server";
import { acceptReview, askReview } from "~/flows/review-order.server";
import { scheduleSheet } from "~/flows/schedule-sheet.server";
import { setChoices } from "~/flows/set-choices.server";
import { setDelivery } from "~/flows/set-delivery.server";
import { settleCheckout } from "~/flows/settle-checkout.server";
import { startCheckout } from "~/flows/start-checkout.server";
import { startRun } from "~/flows/start-run.server";
import { uploadDrawing } from "~/flows/upload-drawing.server";
import type { Refusal, Verdict } from "~/flows/verdict";
import { jobHandlers } from "~/jobs/handlers.server";
import { runDueJobs } from "~/jobs/run-job.server";
import { listAddresses } from "~/models/addresses.server";
import { findCheckoutById } from "~/models/checkouts.server";
import { listFindings } from "~/models/findings.server";
import { listMachines } from "~/models/machines.server";
import { listMaterials } from "~/models/materials.server";
import { findNestContent, listNestsOfOrder } from "~/models/nests.server";
import { findOrder, type Order } from "~/models/orders.server";
import { findRunOfSheet } from "~/models/runs.server";
import { listStockGroups } from "~/models/stock-groups.server";
import { letGo } from "./let-go";
import type { SeededPerson } from "./people";

/** How far an order of the demonstration has come. */
export const CARRIED = [
  "draft",
  "quoted",
  "approved",
  "paid",
  "received",
  "nested",
  "scheduled",
  "cut",
  "tabs-removed",
  "shipped",
] as const;
export type Carried = (typeof CARRIED)[number];

export interface DemoOrder {
  readonly builder: SeededPerson;
  readonly drawing: DemoDrawingName;
  readonly name: string;
  readonly to: Carried;
  /** Code of the stock, when not the one the drawing is made for. */
  readonly material?: string;
  readonly sets?: number;
  readonly sanding?: Sanding;
  readonly leaveTabs?: boolean;
  readonly pickUp?: boolean;
  readonly askReview?: boolean;
  /** A draft whose builder has not confirmed the size yet. */
  readonly unitOpen?: boolean;
  readonly trial?: boolean;
}

export interface Shop {
  readonly operator: SeededPerson;
  readonly clerk: SeededPerson;
  /** The shop's day, YYYY-MM-DD, on which sheets are scheduled. */
  readonly day: string;
}

function must<Value extends object>(verdict: Verdict<Value>): { readonly ok: true } & Value {
  if (verdict.ok) return verdict;
  const { reason, words }: Refusal = verdict;
  throw new Error(`${reason}: ${words}`);
}

/** Makes an order as its builder would and carries it as far as asked, each step through the flow that serves it. */
export async function carryOrder(demo: DemoOrder, shop: Shop): Promise<Order> {
  const orderId = await upload(demo);
  const reaches = (stage: Carried) => CARRIED.indexOf(demo.to) >= CARRIED.indexOf(stage);
  if (!demo.unitOpen) await choose(demo, orderId);
  if (reaches("quoted")) await quote(demo, orderId, shop, reaches("approved"));
  if (reaches("approved")) await approve(demo, orderId);
  if (reaches("paid")) await pay(demo, orderId);
  if (reaches("received"))
    must(await receiveOrder({ actor: shop.operator, orderId, version: await versionOf(orderId) }));
  if (reaches("nested")) await nest(orderId, shop);
  if (reaches("scheduled")) await schedule(orderId, shop);
  if (reaches("cut")) await cut(orderId, shop);
  if (reaches("tabs-removed"))
    must(
      await movePieces({
        actor: shop.operator,
        orderId,
        version: await versionOf(orderId),
        act: "remove-tabs",
        pieceIds: "all",
      }),
    );
  if (reaches("shipped")) await letGo(await orderOf(orderId), shop.clerk);
  return orderOf(orderId);
}

async function orderOf(orderId: string): Promise<Order> {
  const order = await findOrder(db, orderId, { kind: "staff" });
  if (!order) throw new Error("The order is gone.");
  return order;
}
const versionOf = async (orderId: string): Promise<number> => (await orderOf(orderId)).version;

/** The number after KP-. */
const numberOf = async (orderId: string): Promise<number> =>
  Number((await orderOf(orderId)).reference.replace(/\D/g, ""));

async function upload({ builder, drawing, name, trial }: DemoOrder): Promise<string> {
  const { fileName, draw } = DEMO_DRAWINGS[drawing];
  const { orderId } = must(
    await uploadDrawing({ actor: builder, orderId: null, fileName, file: new Blob([draw()]) }),
  );
  await runDueJobs(jobHandlers);
  must(
    await renameOrder({
      actor: builder,
      orderId,
      version: await versionOf(orderId),
      name,
      trial: trial ?? false,
    }),
  );
  return orderId;
}

async function choose(demo: DemoOrder, orderId: string): Promise<void> {
  const { builder, drawing, pickUp } = demo;
  const order = await orderOf(orderId);
  const code = demo.material ?? DEMO_DRAWINGS[drawing].material;
  const material = (await listMaterials(db)).find((one) => one.code === code);
  if (!material) throw new Error(`There is no material ${code}.`);
  const { number, content } = await orderInterpretation(db, order);
  must(
    await setChoices({
      actor: builder,
      orderId,
      after: number,
      files: content.files.map(({ sha256 }) => ({
        sha256,
        unit: DEMO_DRAWINGS[drawing].unit,
        materialId: material.id,
        sets: demo.sets ?? 1,
      })),
      sanding: demo.sanding ?? "arrises",
      leaveTabs: demo.leaveTabs ?? false,
    }),
  );
  const [address] = await listAddresses(db, builder.id);
  must(
    await setDelivery({
      actor: builder,
      orderId,
      version: await versionOf(orderId),
      delivery: pickUp || !address ? { kind: "pick-up" } : { kind: "ship", shipTo: address.shipTo },
    }),
  );
}

async function quote(demo: DemoOrder, orderId: string, shop: Shop, settle: boolean): Promise<void> {
  const { builder } = demo;
  must(await quoteOrder({ actor: builder, orderId, version: await versionOf(orderId) }));
  if (demo.askReview && (await orderOf(orderId)).stage === "quoted")
    must(await askReview({ actor: builder, orderId, version: await versionOf(orderId) }));
  if (!settle) return;
  const { revisionId } = await orderOf(orderId);
  for (const finding of revisionId ? await listFindings(db, revisionId) : [])
    if (finding.severity === "ask")
      must(await answerFinding({ actor: builder, orderId, findingId: finding.id, answer: "accept" }));
  if ((await orderOf(orderId)).stage === "needs-review")
    must(await acceptReview({ actor: shop.operator, orderId, version: await versionOf(orderId) }));
}

async function approve({ builder }: DemoOrder, orderId: string): Promise<void> {
  const order = await orderOf(orderId);
  if (!order.quoteId) throw new Error("There is no quote.");
  must(
    await approveQuote({
      actor: builder,
      orderId,
      version: order.version,
      quoteId: order.quoteId,
      listHash: await listHashOfOrder(db, order),
    }),
  );
}

/** A card of the local payment service that always succeeds. */
const GOOD_CARD = { number: "4242424242424242", expiry: "12/40", cvc: "123" };

async function pay({ builder }: DemoOrder, orderId: string): Promise<void> {
  const { url, checkoutId } = must(await startCheckout({ actor: builder, orderId }));
  const paid = await fetch(url, {
    method: "POST",
    redirect: "manual",
    body: new URLSearchParams({ ...GOOD_CARD, email: builder.email }),
  });
  if (paid.status < 300 || paid.status >= 400) throw new Error(`The pay page answered ${paid.status}.`);
  const checkout = await findCheckoutById(db, checkoutId);
  if (!checkout?.sessionId) throw new Error("The checkout has no session.");
  must(await settleCheckout(checkout.sessionId));
}

async function nest(orderId: string, shop: Shop): Promise<void> {
  const order = await orderOf(orderId);
  const groups = order.revisionId ? await listStockGroups(db, order.id, order.revisionId) : [];
  for (const materialId of new Set(groups.map((group) => group.materialId)))
    must(
      await nestOrders({
        actor: shop.operator,
        materialId,
        orderIds: [orderId],
        versions: { [orderId]: await versionOf(orderId) },
      }),
    );
}

async function sheetsOf(orderId: string): Promise<{ id: string; minutes: number }[]> {
  const contents = await Promise.all(
    (await listNestsOfOrder(db, orderId)).map(({ id }) => findNestContent(db, id)),
  );
  return contents.flatMap((content) =>
    (content?.sheets ?? []).map(({ id, estimatedMinutes }) => ({ id, minutes: estimatedMinutes })),
  );
}

async function schedule(orderId: string, shop: Shop): Promise<void> {
  const machines = (await listMachines(db)).filter(({ active }) => active);
  /* Two orders in three go to the first machine. */
  const turn = (await numberOf(orderId)) % 3 === 0 ? 1 : 0;
  for (const [index, sheet] of (await sheetsOf(orderId)).entries()) {
    const machine = machines[(turn + index) % machines.length];
    if (!machine) throw new Error("The shop has no machine.");
    must(
      await scheduleSheet({
        actor: shop.operator,
        sheetId: sheet.id,
        machineId: machine.id,
        day: shop.day,
        runVersion: 0,
        overbook: true,
      }),
    );
  }
}

async function cut(orderId: string, shop: Shop): Promise<void> {
  const turn = await numberOf(orderId);
  for (const [index, sheet] of (await sheetsOf(orderId)).entries()) {
    const run = await findRunOfSheet(db, sheet.id);
    if (!run) throw new Error("The sheet has no run.");
    must(await startRun({ actor: shop.operator, runId: run.id, version: run.version }));
    const started = await findRunOfSheet(db, sheet.id);
    /* Some sheets take longer than planned, some less. */
    const share = 0.9 + ((turn * 7 + index * 4) % 9) * 0.03;
    must(
      await finishRun({
        actor: shop.operator,
        runId: run.id,
        version: started?.version ?? run.version,
        actualMinutes: Math.round(sheet.minutes * share * 10) / 10,
      }),
    );
  }
}
