import { beforeEach, describe, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { ledgerEntries, lots, nests, newId, outbox, pieces } from "~/db/schema";
import { cancelOrder } from "~/flows/cancel-order.server";
import { dropNest } from "~/flows/drop-nest.server";
import { handOver } from "~/flows/hand-over.server";
import { holdOrder } from "~/flows/hold-order.server";
import { movePieces } from "~/flows/move-pieces.server";
import { receiveOrder } from "~/flows/receive-order.server";
import { releaseOrder } from "~/flows/release-order.server";
import { remakePiece } from "~/flows/remake-piece.server";
import { reviseOrder } from "~/flows/revise-order.server";
import { undoMove } from "~/flows/undo-move.server";
import { eventsAfter } from "~/models/events.server";
import { enterLedger, owedOnQuote } from "~/models/ledger.server";
import { findNestContent, listSheets } from "~/models/nests.server";
import { listParcels } from "~/models/parcels.server";
import { listPieces } from "~/models/pieces.server";
import { listStageMoves } from "~/models/stage-moves.server";
import {
  asked,
  cutNest,
  done,
  makeApproved,
  makePaid,
  makeQuoted,
  makeReceived,
  nest,
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
const fake = () => running.fakes.payments;
/** A Monday on which the scene's machine works. */
const MONDAY = "2026-12-07";
let builder: TestPerson;
let operator: TestPerson;
let clerk: TestPerson;
let owner: TestPerson;
let shop: TestShop;

beforeEach(async () => {
  await fake().webhooksSettled();
  fake().pointWebhooksAt(receiver.url);
  await resetDatabase();
  builder = await makePerson();
  operator = await makePerson({ roles: ["operator"] });
  clerk = await makePerson({ roles: ["clerk"] });
  owner = await makePerson({ roles: ["owner"] });
  shop = await makeShop();
});

const stage = async (orderId: string) => (await orderAsIs(orderId)).stage;
const stagesOfPieces = async (orderId: string) =>
  (await listPieces(db, orderId)).map((piece) => `${piece.part.label}${piece.number} ${piece.stage}`);
const received = () => makeReceived({ builder, operator }, shop, fake());
const nested = async () => {
  const order = await received();
  const { nest: made } = await done(nest(operator, shop, [order.id]));
  return { orderId: order.id, nestId: made.id };
};
const cut = async () => {
  const { orderId, nestId } = await nested();
  await cutNest(operator, shop, nestId, MONDAY);
  return { orderId, nestId };
};
const tabsOff = async () => {
  const { orderId, nestId } = await cut();
  await done(takeTabsOff(operator, orderId));
  return { orderId, nestId };
};
const move = async (
  actor: TestPerson,
  orderId: string,
  act: "cut" | "remove-tabs",
  pieceIds: string[] | "all",
) => movePieces({ ...(await asked(actor, orderId)), act, pieceIds });

describe("an order", () => {
  test("goes from draft to shipped, each step by whom it belongs to, each told once", async () => {
    const { orderId } = await tabsOff();
    await packAndLabel(clerk, orderId);
    const { parcels } = await done(handOver(await asked(clerk, orderId)));
    expect(await orderAsIs(orderId)).toMatchObject({ stage: "shipped", shippedAt: expect.any(Date) });

    const moves = await listStageMoves(db, orderId);
    expect(moves.map(({ act, from, to, actorRole }) => `${act}: ${from} -> ${to} by ${actorRole}`)).toEqual([
      "quote: draft -> quoted by builder",
      "pay: quoted -> paid by system",
      "receive: paid -> received by operator",
      "nest: received -> nested by operator",
      "cut: nested -> cut by operator",
      "remove-tabs: cut -> tabs-removed by operator",
      "ship: tabs-removed -> shipped by clerk",
    ]);
    const told = (await eventsAfter(db, orderId, 0, "builder")).filter(({ kind }) => kind === "stage");
    expect(told.map(({ data }) => data.to)).toEqual([
      "quoted",
      "paid",
      "received",
      "nested",
      "cut",
      "tabs-removed",
      "shipped",
    ]);
    const mails = (await db.select().from(outbox)).filter((mail) => mail.orderId === orderId);
    expect(mails.map(({ template, recipient }) => [template, recipient])).toEqual(
      ["quote", "receipt", "stage", "stage", "stage", "stage", "stage"].map((template) => [
        template,
        builder.email,
      ]),
    );
    const packed = await listParcels(db, orderId);
    expect(packed).toHaveLength(parcels);
    expect(
      (await listPieces(db, orderId)).every((piece) => packed.some(({ id }) => id === piece.parcelId)),
    ).toBe(true);
    // One sheet of the lot's twenty was cut; nothing is reserved any more.
    expect(await db.select().from(lots)).toMatchObject([{ sheetsOnHand: 19, sheetsReserved: 0 }]);
  });

  test("received is pieces, n of N of each part", async () => {
    const order = await received();
    const list = await listPieces(db, order.id);
    expect(list.map((piece) => [piece.part.label, piece.number, piece.of, piece.stage, piece.state])).toEqual(
      [
        ["A", 1, 1, "received", "good"],
        ["B", 1, 2, "received", "good"],
        ["B", 2, 2, "received", "good"],
      ],
    );
    expect(new Set(list.map(({ code }) => code)).size).toBe(3);
  });

  test("follows its pieces: it is at a stage when all of them are", async () => {
    const { orderId } = await cut();
    const [a, ...b] = await listPieces(db, orderId);
    if (!a) throw new Error("There is no piece.");
    await done(move(operator, orderId, "remove-tabs", [a.id]));
    expect(await stage(orderId)).toBe("cut");
    expect(await stagesOfPieces(orderId)).toEqual(["A1 tabs-removed", "B1 cut", "B2 cut"]);
    await done(
      move(
        operator,
        orderId,
        "remove-tabs",
        b.map(({ id }) => id),
      ),
    );
    expect(await stage(orderId)).toBe("tabs-removed");
    expect(await refused(move(operator, orderId, "remove-tabs", "all"))).toMatchObject({
      reason: "wrong-stage",
    });
  });
});

describe("two people at once", () => {
  test("on one order: the later is told, and nothing is done twice", async () => {
    const { orderId } = await cut();
    const other = await makePerson({ roles: ["operator"] });
    const mine = { ...(await asked(operator, orderId)), act: "remove-tabs", pieceIds: "all" } as const;
    const theirs = { ...(await asked(other, orderId)), reason: "Warped." };
    const answers = await Promise.all([movePieces(mine), holdOrder(theirs)]);
    expect(answers.filter(({ ok }) => ok)).toHaveLength(1);
    expect(answers.find(({ ok }) => !ok)).toMatchObject({
      reason: "changed",
      words: expect.stringContaining("Somebody changed this order"),
    });
    expect((await listStageMoves(db, orderId)).filter(({ act }) => act !== "cut").at(-1)?.act).toBe(
      answers[0].ok ? "remove-tabs" : "hold",
    );
  });

  test("receiving the same order make its pieces once", async () => {
    const order = await makePaid(builder, shop, fake());
    const other = await makePerson({ roles: ["operator"] });
    const answers = await Promise.all([
      receiveOrder(await asked(operator, order.id)),
      receiveOrder(await asked(other, order.id)),
    ]);
    expect(answers.map(({ ok }) => ok).sort()).toEqual([false, true]);
    expect(await db.$count(pieces)).toBe(3);
  });

  test("the same act sent twice by one form is done once and well both times", async () => {
    const order = await makePaid(builder, shop, fake());
    const form = await asked(operator, order.id);
    const answers = await Promise.all([receiveOrder(form), receiveOrder(form)]);
    expect(answers).toMatchObject([{ ok: true }, { ok: true }]);
    expect(await db.$count(pieces)).toBe(3);
    expect((await listStageMoves(db, order.id)).filter(({ act }) => act === "receive")).toHaveLength(1);
  });
});

describe("guards", () => {
  test("let nobody act out of turn", async () => {
    const order = await makePaid(builder, shop, fake());
    const tries: [string, Promise<{ ok: boolean }>][] = [
      ["nest before receiving", nest(operator, shop, [order.id])],
      ["cut before nesting", move(operator, order.id, "cut", "all")],
      ["tabs off before cutting", move(operator, order.id, "remove-tabs", "all")],
      ["ship before making", handOver(await asked(clerk, order.id))],
      ["revise once paid", reviseOrder(await asked(builder, order.id))],
      ["receive by a clerk", receiveOrder(await asked(clerk, order.id))],
      ["receive by the builder", receiveOrder(await asked(builder, order.id))],
      ["hold by the builder", holdOrder({ ...(await asked(builder, order.id)), reason: "No." })],
      ["hold without a reason", holdOrder({ ...(await asked(operator, order.id)), reason: " " })],
      ["release what is not held", releaseOrder(await asked(operator, order.id))],
      ["another builder", cancelOrder({ ...(await asked(await makePerson(), order.id)), reason: "Mine." })],
    ];
    for (const [name, answer] of tries) expect(await answer, name).toMatchObject({ ok: false });
    expect(await stage(order.id)).toBe("paid");
  });

  test("keep an unpaid order out of the shop", async () => {
    const order = await makeApproved(builder, shop);
    expect(await refused(receiveOrder(await asked(operator, order.id)))).toMatchObject({
      reason: "wrong-stage",
    });
  });

  test("ship nothing that is owed for, and nothing by the router's operator", async () => {
    const { orderId } = await tabsOff();
    expect(await refused(handOver(await asked(operator, orderId)))).toMatchObject({ reason: "not-allowed" });
    const order = await orderAsIs(orderId);
    await transact((tx) =>
      enterLedger(tx, { orderId, kind: "debt", amount: 500, currency: "usd", quoteId: order.quoteId }),
    );
    expect(await refused(handOver(await asked(clerk, orderId)))).toMatchObject({ reason: "unpaid" });
    await transact((tx) => tx.delete(ledgerEntries));
    expect(await owedOnQuote(db, orderId, order.quoteId ?? "")).toBe(0);
    await packAndLabel(clerk, orderId);
    await done(handOver(await asked(clerk, orderId)));
  });
});

describe("a hold", () => {
  test("stops every act, and ends where it began", async () => {
    const { orderId } = await cut();
    await done(holdOrder({ ...(await asked(operator, orderId)), reason: "The face is scratched." }));
    expect(await orderAsIs(orderId)).toMatchObject({
      stage: "on-hold",
      heldFrom: "cut",
      holdReason: "The face is scratched.",
    });
    expect(await refused(move(operator, orderId, "remove-tabs", "all"))).toMatchObject({
      reason: "wrong-stage",
    });
    expect((await db.select().from(outbox)).filter(({ template }) => template === "hold")).toMatchObject([
      { recipient: builder.email, payload: { text: expect.stringContaining("The face is scratched.") } },
    ]);
    await done(releaseOrder(await asked(clerk, orderId)));
    expect(await orderAsIs(orderId)).toMatchObject({ stage: "cut", heldFrom: null, holdReason: null });
  });
});

describe("undo", () => {
  const undo = async (actor: TestPerson, orderId: string, reason = "Pressed by mistake.") =>
    undoMove({ ...(await asked(actor, orderId)), reason });

  test("takes back one step at a time, with a reason, as far as the order was received", async () => {
    const { orderId } = await tabsOff();
    await packAndLabel(clerk, orderId);
    await done(handOver(await asked(clerk, orderId)));
    expect(await refused(undo(clerk, orderId))).toMatchObject({ reason: "wrong-stage" });
    expect(await done(undo(owner, orderId))).toMatchObject({ undone: "ship" });
    expect(await orderAsIs(orderId)).toMatchObject({ stage: "tabs-removed", shippedAt: null });
    expect(await refused(undo(operator, orderId, " "))).toMatchObject({ reason: "incomplete" });
    expect(await refused(undo(builder, orderId))).toMatchObject({ reason: "not-allowed" });
    expect(await done(undo(operator, orderId))).toMatchObject({ undone: "remove-tabs" });
    expect(await stage(orderId)).toBe("cut");
    expect(await done(undo(operator, orderId))).toMatchObject({ undone: "cut" });
    expect(await stage(orderId)).toBe("nested");
    expect(await refused(undo(operator, orderId))).toMatchObject({
      reason: "wrong-stage",
      words: expect.stringContaining("Drop the nest"),
    });
    const moves = await listStageMoves(db, orderId);
    expect(moves.filter(({ undoes }) => undoes !== null).map(({ act, reason }) => [act, reason])).toEqual([
      ["undo-ship", "Pressed by mistake."],
      ["undo", "Pressed by mistake."],
      ["undo", "Pressed by mistake."],
    ]);
  });

  test("of a cut puts the sheet, its run and its lot back", async () => {
    const { orderId, nestId } = await cut();
    expect(await listSheets(db, nestId)).toMatchObject([{ status: "cut" }]);
    expect(await db.select().from(lots)).toMatchObject([{ sheetsOnHand: 19, sheetsReserved: 0 }]);
    await done(undo(operator, orderId));
    expect(await listSheets(db, nestId)).toMatchObject([{ status: "planned" }]);
    expect(await db.select().from(nests)).toMatchObject([{ status: "locked" }]);
    expect(await db.select().from(lots)).toMatchObject([{ sheetsOnHand: 20, sheetsReserved: 1 }]);
    await done(move(operator, orderId, "cut", "all"));
    expect(await listSheets(db, nestId)).toMatchObject([{ status: "cut" }]);
  });

  test("of the receiving takes its pieces away; received again, they are made again", async () => {
    const order = await received();
    await done(undo(operator, order.id));
    expect(await stage(order.id)).toBe("paid");
    expect(await db.$count(pieces)).toBe(0);
    await done(receiveOrder(await asked(operator, order.id)));
    expect(await db.$count(pieces)).toBe(3);
  });

  test("sent twice takes back one step", async () => {
    const { orderId } = await tabsOff();
    const form = { ...(await asked(operator, orderId)), reason: "Too early." };
    await done(undoMove(form));
    await done(undoMove(form));
    expect(await stage(orderId)).toBe("cut");
  });
});

describe("a spoiled piece", () => {
  test("is made again while the others go on; only shipping waits", async () => {
    const { orderId } = await cut();
    const [a] = await listPieces(db, orderId);
    if (!a) throw new Error("There is no piece.");
    const spoil = { pieceId: a.id, state: "spoiled", payer: "shop" } as const;
    expect(
      await refused(remakePiece({ ...(await asked(operator, orderId)), ...spoil, reason: "" })),
    ).toMatchObject({ reason: "incomplete" });
    await done(remakePiece({ ...(await asked(operator, orderId)), ...spoil, reason: "Torn edge." }));
    expect(
      (await listPieces(db, orderId)).map((piece) => [
        `${piece.part.label}${piece.number}`,
        piece.stage,
        piece.state,
        piece.remakeOf,
        piece.cause,
        piece.payer,
      ]),
    ).toEqual([
      ["A1", "cut", "spoiled", null, null, null],
      ["A1", "received", "good", a.id, "Torn edge.", "shop"],
      ["B1", "cut", "good", null, null, null],
      ["B2", "cut", "good", null, null, null],
    ]);
    await done(takeTabsOff(operator, orderId));
    expect(await stage(orderId)).toBe("tabs-removed");
    expect(await refused(handOver(await asked(clerk, orderId)))).toMatchObject({ reason: "wrong-stage" });

    const { nest: second } = await done(nest(operator, shop, [orderId]));
    expect(
      (await findNestContent(db, second.id))?.sheets.flatMap(({ placements }) => placements),
    ).toHaveLength(1);
    await cutNest(operator, shop, second.id, MONDAY);
    await done(takeTabsOff(operator, orderId));
    await packAndLabel(clerk, orderId);
    await done(handOver(await asked(clerk, orderId)));
    expect(await stage(orderId)).toBe("shipped");
    expect(
      (await listPieces(db, orderId)).filter(({ state }) => state === "good").map((piece) => piece.stage),
    ).toEqual(["shipped", "shipped", "shipped"]);
  });

  test("cannot be spoiled twice", async () => {
    const { orderId } = await cut();
    const [a] = await listPieces(db, orderId);
    const spoil = async () =>
      remakePiece({
        ...(await asked(operator, orderId)),
        pieceId: a?.id ?? "",
        state: "missing",
        payer: "shop",
        reason: "Not in the pile.",
      });
    await done(spoil());
    expect(await refused(spoil())).toMatchObject({ reason: "wrong-stage" });
    expect(await db.$count(pieces)).toBe(4);
  });
});

describe("cancelling", () => {
  const cancel = async (actor: TestPerson, orderId: string) =>
    cancelOrder({ ...(await asked(actor, orderId)), reason: "Drawn anew." });

  test("is the builder's while nothing is nested: nothing is owed, the lot is free", async () => {
    const quoted = await makeQuoted(builder, shop);
    await done(cancel(builder, quoted.id));
    expect(await orderAsIs(quoted.id)).toMatchObject({ stage: "cancelled", cancelledAt: expect.any(Date) });

    const paid = await makePaid(builder, shop, fake());
    expect(await db.select().from(lots)).toMatchObject([{ sheetsReserved: 1 }]);
    await done(cancel(builder, paid.id));
    expect(await db.select().from(lots)).toMatchObject([{ sheetsReserved: 0 }]);
    expect(await owedOnQuote(db, paid.id, paid.quoteId ?? "")).toBeLessThan(0);
    expect((await db.select().from(outbox)).filter(({ template }) => template === "cancelled")).toHaveLength(
      2,
    );
  });

  test("once nested is the shop's; the nest is given up with it", async () => {
    const { orderId, nestId } = await nested();
    expect(await refused(cancel(builder, orderId))).toMatchObject({ reason: "wrong-stage" });
    expect(await refused(cancel(clerk, orderId))).toMatchObject({ reason: "not-allowed" });
    await done(cancel(operator, orderId));
    expect(await stage(orderId)).toBe("cancelled");
    expect((await listPieces(db, orderId)).map(({ state }) => state)).toEqual([
      "cancelled",
      "cancelled",
      "cancelled",
    ]);
    expect((await findNestContent(db, nestId))?.nest.status).toBe("dropped");
  });

  test("leaves the other orders on the nest where they are", async () => {
    const first = await received();
    const second = await received();
    const { nest: made } = await done(nest(operator, shop, [first.id, second.id]));
    await done(cancel(owner, first.id));
    const content = await findNestContent(db, made.id);
    expect(content?.nest.status).toBe("locked");
    expect(
      new Set(content?.sheets.flatMap(({ placements }) => placements.map(({ piece }) => piece.orderId))),
    ).toEqual(new Set([second.id]));
    await cutNest(operator, shop, made.id, MONDAY);
    expect(await stage(second.id)).toBe("cut");
    expect(await stage(first.id)).toBe("cancelled");
  });
});

describe("dropping a nest of a held order", () => {
  test("keeps it held; released, it waits for another nest", async () => {
    const { orderId, nestId } = await nested();
    await done(holdOrder({ ...(await asked(operator, orderId)), reason: "Wait for the builder." }));
    const version = (await findNestContent(db, nestId))?.nest.version ?? 0;
    await done(dropNest({ actor: operator, nestId, version, reason: "The order waits." }));
    expect(await orderAsIs(orderId)).toMatchObject({ stage: "on-hold", heldFrom: "received" });
    await done(releaseOrder({ ...(await asked(operator, orderId)), requestId: newId() }));
    expect(await stage(orderId)).toBe("received");
  });
});
