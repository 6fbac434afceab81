import { beforeEach, describe, expect, test } from "vitest";
import { matchScan } from "~/components/shipping/match-scan";
import { db } from "~/db/client.server";
import { newId, outbox } from "~/db/schema";
import { benchAct } from "~/flows/bench-act.server";
import { countPieces } from "~/flows/count-pieces.server";
import { listPiecesWithSheet, listSheetsAtBench } from "~/models/bench.server";
import { listPieces } from "~/models/pieces.server";
import { listStageMoves } from "~/models/stage-moves.server";
import { cutNest, done, makeReceived, nest, refused } from "../support/chain";
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
let shop: TestShop;

beforeEach(async () => {
  await running.fakes.payments.webhooksSettled();
  running.fakes.payments.pointWebhooksAt(receiver.url);
  await resetDatabase();
  operator = await makePerson({ roles: ["operator"] });
  shop = await makeShop();
});

/** Orders that share a nest, cut. */
async function cutTogether(count: number): Promise<string[]> {
  const ids: string[] = [];
  for (let i = 0; i < count; i += 1)
    ids.push(
      (await makeReceived({ builder: await makePerson(), operator }, shop, running.fakes.payments)).id,
    );
  const { nest: made } = await done(nest(operator, shop, ids));
  await cutNest(operator, shop, made.id, MONDAY);
  return ids;
}
const idsOf = async (orderId: string) => (await listPieces(db, orderId)).map(({ id }) => id);
const good = (pieceIds: readonly string[], requestId = newId(), actor = operator) =>
  benchAct(actor, { kind: "good", requestId, pieceIds: [...pieceIds] });
const stage = async (orderId: string) => (await orderAsIs(orderId)).stage;

describe("the bench", () => {
  test("takes the tabs off a sheet of two orders in one act, sent twice done once, and takes it back", async () => {
    const [one = "", two = ""] = await cutTogether(2);
    const sheets = await listSheetsAtBench(db);
    expect(sheets.reduce((sum, { waiting }) => sum + waiting, 0)).toBe(6);
    const all = [...(await idsOf(one)), ...(await idsOf(two))];
    const act = newId();
    expect(await done(good(all, act))).toMatchObject({ changed: 6 });
    expect(await done(good(all, act))).toMatchObject({ changed: 0 });
    expect([await stage(one), await stage(two)]).toEqual(["tabs-removed", "tabs-removed"]);
    expect((await listStageMoves(db, one)).filter(({ act: name }) => name === "remove-tabs")).toHaveLength(1);
    expect(await listSheetsAtBench(db)).toEqual([]);

    const undo = { kind: "undo" as const, requestId: newId(), of: act };
    expect(await done(benchAct(operator, undo))).toMatchObject({ changed: 6 });
    expect([await stage(one), await stage(two)]).toEqual(["cut", "cut"]);
    expect(await done(good(all))).toMatchObject({ changed: 6 });
  });

  test("makes a spoiled piece again at once, with cause and payer, and lets the others go on", async () => {
    const [orderId = ""] = await cutTogether(1);
    const [a = "", ...rest] = await idsOf(orderId);
    const lost = {
      kind: "lost" as const,
      requestId: newId(),
      pieceId: a,
      state: "spoiled" as const,
      cause: "Torn edge at the tab.",
      payer: "supplier" as const,
    };
    await done(benchAct(operator, lost));
    await done(benchAct(operator, lost));
    await done(good(rest));
    expect(await stage(orderId)).toBe("tabs-removed");
    const remakes = (await listPieces(db, orderId)).filter(({ remakeOf }) => remakeOf !== null);
    expect(remakes).toMatchObject([
      { remakeOf: a, stage: "received", cause: "Torn edge at the tab.", payer: "supplier" },
    ]);
    expect((await db.select().from(outbox)).filter(({ template }) => template === "shortage")).toHaveLength(
      1,
    );
    expect(await refused(good([a]))).toMatchObject({ reason: "wrong-stage" });
    expect(await refused(good([remakes[0]?.id ?? ""]))).toMatchObject({ reason: "wrong-stage" });
  });

  test("takes back only the last act, and a piece taken back leaves the clerk's count", async () => {
    const [orderId = ""] = await cutTogether(1);
    const [a = "", b = "", c = ""] = await idsOf(orderId);
    const first = newId();
    const second = newId();
    await done(good([a], first));
    await done(good([b, c], second));
    const clerk = await makePerson({ roles: ["clerk"] });
    await done(countPieces({ actor: clerk, orderId, pieceIds: "all", counted: true }));
    const undo = (of: string) => benchAct(operator, { kind: "undo", requestId: newId(), of });
    expect(await refused(undo(first))).toMatchObject({ reason: "wrong-stage" });
    await done(undo(second));
    expect((await listPieces(db, orderId)).filter(({ countedAt }) => countedAt !== null)).toHaveLength(1);
    await done(undo(first));
    expect(await stage(orderId)).toBe("cut");
  });

  test("is not the clerk's nor a builder's", async () => {
    const [orderId = ""] = await cutTogether(1);
    for (const role of ["clerk", "builder"] as const)
      expect(
        await refused(good(await idsOf(orderId), newId(), await makePerson({ roles: [role] }))),
      ).toMatchObject({
        reason: "not-allowed",
      });
  });

  test("finds a piece by what was scanned or typed", async () => {
    const [orderId = ""] = await cutTogether(1);
    const pieces = (await listPiecesWithSheet(db, { orderId })).map((piece) => ({
      id: piece.id,
      code: piece.code,
      reference: piece.reference,
      label: piece.part.label,
      number: piece.number,
    }));
    const find = (typed: string, done: readonly string[] = []) =>
      matchScan(pieces, typed, ({ id }) => !done.includes(id))?.id;
    const [a, b1, b2] = pieces;
    if (!a || !b1 || !b2) throw new Error("Three pieces are cut.");
    expect(find(b2.code)).toBe(b2.id);
    expect(find(`${b2.reference} B 2`)).toBe(b2.id);
    expect(find(" b2 ")).toBe(b2.id);
    expect(find("B")).toBe(b1.id);
    expect(find("b", [b1.id])).toBe(b2.id);
    expect(find("C")).toBeUndefined();
    expect(find("")).toBeUndefined();
  });
});
