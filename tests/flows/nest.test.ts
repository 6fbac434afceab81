import { beforeEach, describe, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { auditEntries, lots, materials, nests, placements } from "~/db/schema";
import { pathBox } from "~/domain/geometry";
import { dropNest } from "~/flows/drop-nest.server";
import { loadGeometry } from "~/flows/geometry-store.server";
import { proposeNest } from "~/flows/nest-orders.server";
import { orderInterpretation } from "~/flows/order-interpretation.server";
import { quoteOrder } from "~/flows/quote-order.server";
import { receiveOrder } from "~/flows/receive-order.server";
import { saveInterpretation } from "~/flows/save-interpretation.server";
import { setChoices } from "~/flows/set-choices.server";
import { findNest, findNestContent, listNests } from "~/models/nests.server";
import { listPieces, listPiecesToNest } from "~/models/pieces.server";
import { findRevision } from "~/models/revisions.server";
import { listStageMoves } from "~/models/stage-moves.server";
import {
  approve,
  asked,
  done,
  makeReadyDraft,
  makeReceived,
  nest,
  openPayPage,
  refused,
} from "../support/chain";
import { resetDatabase } from "../support/database";
import {
  freshScene,
  makePerson,
  makeShop,
  orderAsIs,
  SETTINGS,
  type TestPerson,
  type TestShop,
} from "../support/scene";
import { receiveWebhooks } from "../support/webhook-receiver";

const running = freshScene();
const receiver = receiveWebhooks();
let operator: TestPerson;
let shop: TestShop;
const received = async () =>
  makeReceived({ builder: await makePerson(), operator }, shop, running.fakes.payments);

beforeEach(async () => {
  await running.fakes.payments.webhooksSettled();
  running.fakes.payments.pointWebhooksAt(receiver.url);
  await resetDatabase();
  operator = await makePerson({ roles: ["operator"] });
  shop = await makeShop();
});

const contentOf = async (nestId: string) => {
  const content = await findNestContent(db, nestId);
  if (!content) throw new Error("There is no nest.");
  return content;
};

/** Where a placed piece's outline lies on its sheet: its part's own outline, turned and moved as stored. */
async function placedBox(
  placed: Awaited<ReturnType<typeof contentOf>>["sheets"][number]["placements"][number],
) {
  const order = await orderAsIs(placed.piece.orderId);
  const revision = await findRevision(db, order.id, order.revisionId ?? "");
  const geometry = await loadGeometry(revision?.geometryKey ?? "");
  const part = geometry?.files
    .find(({ sha256 }) => sha256 === placed.part.fileSha)
    ?.report.parts.find(({ id }) => id === placed.part.letter);
  if (!part) throw new Error("There is no part.");
  const box = pathBox(part.outer);
  const turn = (placed.turnDegrees * Math.PI) / 180;
  const corners = [
    [box.minX, box.minY],
    [box.maxX, box.minY],
    [box.maxX, box.maxY],
    [box.minX, box.maxY],
  ].map(([x = 0, y = 0]) => ({
    x: x * Math.cos(turn) - y * Math.sin(turn) + placed.x,
    y: x * Math.sin(turn) + y * Math.cos(turn) + placed.y,
  }));
  return {
    minX: Math.min(...corners.map(({ x }) => x)),
    maxX: Math.max(...corners.map(({ x }) => x)),
    minY: Math.min(...corners.map(({ y }) => y)),
    maxY: Math.max(...corners.map(({ y }) => y)),
  };
}

describe("a nest", () => {
  test("is proposed without anything being saved", async () => {
    const order = await received();
    const proposal = await done(
      proposeNest({ actor: operator, materialId: shop.material.id, orderIds: [order.id] }),
    );
    expect(proposal.sheets).toHaveLength(1);
    expect(proposal.sheets[0]?.placements).toHaveLength(3);
    expect(await db.$count(nests)).toBe(0);
    expect((await orderAsIs(order.id)).stage).toBe("received");
  });

  test("of two builders' orders lays every piece once, apart and off the edge, along its grain", async () => {
    const orders = [await received(), await received()];
    const { nest: made } = await done(
      nest(
        operator,
        shop,
        orders.map(({ id }) => id),
      ),
    );
    expect(made).toMatchObject({ number: 1, status: "locked", lotId: shop.lot.id, lockedBy: operator.id });
    const { sheets } = await contentOf(made.id);
    const placed = sheets.flatMap((sheet) => sheet.placements);
    const all = (await Promise.all(orders.map(({ id }) => listPieces(db, id)))).flat();
    expect(placed.map(({ pieceId }) => pieceId).sort()).toEqual(all.map(({ id }) => id).sort());
    expect(all.every((piece) => piece.stage === "nested")).toBe(true);
    for (const { id } of orders) expect((await orderAsIs(id)).stage).toBe("nested");

    const { spacing, margin } = SETTINGS.nesting;
    for (const sheet of sheets) {
      expect(sheet.estimatedMinutes).toBeGreaterThan(0);
      const boxes = await Promise.all(sheet.placements.map(placedBox));
      for (const [index, box] of boxes.entries()) {
        expect(sheet.placements[index]?.turnDegrees).toBe(0);
        expect(Math.min(box.minX, box.minY)).toBeGreaterThanOrEqual(margin - 0.01);
        expect(box.maxX).toBeLessThanOrEqual(sheet.length - margin + 0.01);
        expect(box.maxY).toBeLessThanOrEqual(sheet.width - margin + 0.01);
        for (const other of boxes.slice(index + 1)) {
          const apart = Math.hypot(
            Math.max(0, box.minX - other.maxX, other.minX - box.maxX),
            Math.max(0, box.minY - other.maxY, other.minY - box.maxY),
          );
          expect(apart).toBeGreaterThanOrEqual(spacing - 0.01);
        }
      }
    }
    expect(await listNests(db, { statuses: ["locked"], limit: 10 })).toMatchObject([
      { nest: { id: made.id }, material: { code: "BB-18" }, sheets: sheets.length, pieces: 6 },
    ]);
  });

  test("turns a part whose grain runs across its drawing", async () => {
    const builder = await makePerson();
    const draft = await makeReadyDraft(builder, shop);
    const { content, number } = await orderInterpretation(db, draft);
    const [file] = content.files;
    await done(
      saveInterpretation({
        actor: builder,
        orderId: draft.id,
        after: number,
        content: {
          ...content,
          parts: [{ sha256: file?.sha256 ?? "", letter: "A", name: "Back", grain: "along-y" }],
        },
      }),
    );
    await done(quoteOrder(await asked(builder, draft.id)));
    await done(approve(builder, draft.id));
    const { sessionId } = await openPayPage(builder, draft.id);
    await running.fakes.payments.pay(sessionId);
    await running.fakes.payments.webhooksSettled();
    await done(receiveOrder(await asked(operator, draft.id)));
    const { nest: made } = await done(nest(operator, shop, [draft.id]));
    const placed = (await contentOf(made.id)).sheets.flatMap(({ placements }) => placements);
    expect(placed.map(({ part, turnDegrees }) => [part.name, turnDegrees])).toEqual([
      ["Back", 90],
      ["B", 0],
      ["B", 0],
    ]);
    const back = placed[0];
    if (!back) throw new Error("There is no back.");
    const box = await placedBox(back);
    // 800 x 400 as drawn: turned, 400 along the sheet and 800 across it, inside the margins.
    expect(box.maxX - box.minX).toBeCloseTo(400, 6);
    expect(box.maxY - box.minY).toBeCloseTo(800, 6);
    expect(Math.min(box.minX, box.minY)).toBeGreaterThanOrEqual(SETTINGS.nesting.margin - 0.01);
  });

  test("is made once when two operators nest the same order", async () => {
    const order = await received();
    const other = await makePerson({ roles: ["operator"] });
    const answers = await Promise.all([nest(operator, shop, [order.id]), nest(other, shop, [order.id])]);
    expect(answers.filter(({ ok }) => ok)).toHaveLength(1);
    expect(answers.find(({ ok }) => !ok)).toMatchObject({ reason: "changed" });
    expect(await db.$count(nests)).toBe(1);
    expect(await db.$count(placements)).toBe(3);
    expect(await refused(nest(operator, shop, [order.id]))).toMatchObject({ reason: "wrong-stage" });
  });

  test("is the operators' work, of one lot at a time", async () => {
    const order = await received();
    const clerk = await makePerson({ roles: ["clerk"] });
    expect(await refused(nest(clerk, shop, [order.id]))).toMatchObject({ reason: "not-allowed" });

    await transact((tx) => tx.update(lots).set({ active: false }));
    await transact((tx) =>
      tx.insert(lots).values({
        materialId: shop.material.id,
        code: "L-1802",
        sheetsOnHand: 5,
        thicknessMin: 17.9,
        thicknessMean: 18,
        thicknessMax: 18.1,
        measuredAt: new Date(),
      }),
    );
    const later = await received();
    expect(await refused(nest(operator, shop, [order.id, later.id]))).toMatchObject({ reason: "invalid" });
    await done(nest(operator, shop, [order.id]));
    expect((await listPiecesToNest(db, {})).map(({ orderId }) => orderId)).toEqual([
      later.id,
      later.id,
      later.id,
    ]);
  });

  test("of a part that no longer goes on the sheet is refused, and names it", async () => {
    const order = await received();
    await transact((tx) => tx.update(materials).set({ sheetLength: 700 }));
    expect(await refused(nest(operator, shop, [order.id]))).toMatchObject({
      reason: "no-room",
      words: expect.stringContaining("Part A"),
    });
  });
});

describe("a nest dropped before it is cut", () => {
  test("sends its pieces back to wait, with the reason kept", async () => {
    const order = await received();
    const { nest: made } = await done(nest(operator, shop, [order.id]));
    const drop = { actor: operator, nestId: made.id, version: made.version, reason: "The lot is bowed." };
    expect(await refused(dropNest({ ...drop, reason: "" }))).toMatchObject({ reason: "incomplete" });
    expect(await refused(dropNest({ ...drop, version: made.version + 1 }))).toMatchObject({
      reason: "changed",
    });
    await done(dropNest(drop));
    expect(await refused(dropNest(drop))).toMatchObject({ reason: "wrong-stage" });
    expect(await findNest(db, made.id)).toMatchObject({ status: "dropped" });
    expect((await orderAsIs(order.id)).stage).toBe("received");
    expect((await listPieces(db, order.id)).every((piece) => piece.stage === "received")).toBe(true);
    expect((await listStageMoves(db, order.id)).at(-1)).toMatchObject({
      act: "drop-nest",
      from: "nested",
      to: "received",
      reason: "Nest N-1: The lot is bowed.",
    });
    expect(await db.select().from(auditEntries)).toMatchObject([
      { act: "nest.drop", subjectId: made.id, detail: { reason: "The lot is bowed.", pieces: 3 } },
    ]);
    const { nest: again } = await done(nest(operator, shop, [order.id]));
    expect(again.number).toBe(2);
    expect(await db.$count(placements)).toBe(6);
  });

  test("leaves the builder's choices as they are frozen", async () => {
    const order = await received();
    const builder = { id: order.builderId, roles: ["builder"] as const };
    expect(await refused(setChoices({ actor: builder, orderId: order.id, after: 1 }))).toMatchObject({
      reason: "wrong-stage",
    });
  });
});
