import { beforeEach, describe, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { machines, nestSheets, runs } from "~/db/schema";
import { dropNest } from "~/flows/drop-nest.server";
import { finishRun } from "~/flows/finish-run.server";
import { holdOrder } from "~/flows/hold-order.server";
import { priceOrder } from "~/flows/price-order.server";
import { type ScheduleSheetOptions, scheduleSheet } from "~/flows/schedule-sheet.server";
import { startRun } from "~/flows/start-run.server";
import { findNest, listSheets } from "~/models/nests.server";
import { findQuote } from "~/models/quotes.server";
import { findRunOfSheet, listRuns, listSheetsToSchedule } from "~/models/runs.server";
import {
  asked,
  done,
  makeApproved,
  makePaid,
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
  type TestPerson,
  type TestShop,
} from "../support/scene";
import { receiveWebhooks } from "../support/webhook-receiver";

const running = freshScene();
const receiver = receiveWebhooks();
/** 7 December 2026 is a Monday: the scene's machine works 8:00 to 16:30, 510 minutes, Monday to Friday. */
const MONDAY = "2026-12-07";
const SUNDAY = "2026-12-06";
let operator: TestPerson;
let shop: TestShop;
let orderId: string;
let nestId: string;
let sheetId: string;
let minutes: number;
let plan: (change?: Partial<ScheduleSheetOptions>) => ScheduleSheetOptions;

beforeEach(async () => {
  await running.fakes.payments.webhooksSettled();
  running.fakes.payments.pointWebhooksAt(receiver.url);
  await resetDatabase();
  operator = await makePerson({ roles: ["operator"] });
  shop = await makeShop();
  ({ orderId, nestId, sheetId, minutes } = await nestedSheet());
  plan = (change = {}) => ({
    actor: operator,
    sheetId,
    machineId: shop.machine.id,
    day: MONDAY,
    runVersion: 0,
    ...change,
  });
});

async function nestedSheet() {
  const order = await makeReceived({ builder: await makePerson(), operator }, shop, running.fakes.payments);
  const { nest: made } = await done(nest(operator, shop, [order.id]));
  const [sheet] = await listSheets(db, made.id);
  if (!sheet) throw new Error("There is no sheet.");
  return { orderId: order.id, nestId: made.id, sheetId: sheet.id, minutes: sheet.estimatedMinutes };
}

describe("a sheet", () => {
  test("gets its turn on a machine's day, with its minutes against the machine's", async () => {
    expect((await listSheetsToSchedule(db)).map(({ sheet }) => sheet.id)).toEqual([sheetId]);
    await transact((tx) => tx.update(machines).set({ calibration: 1.25 }));
    const { run, bookedMinutes, openMinutes } = await done(scheduleSheet(plan()));
    expect(run).toMatchObject({ day: MONDAY, sequence: 1, plannedMinutes: minutes * 1.25 });
    expect([bookedMinutes, openMinutes]).toEqual([minutes * 1.25, 510]);
    expect(await listSheetsToSchedule(db)).toEqual([]);
    const second = await nestedSheet();
    expect((await done(scheduleSheet(plan({ sheetId: second.sheetId })))).run.sequence).toBe(2);
    expect((await listRuns(db, { from: MONDAY, to: MONDAY })).map(({ sheet }) => sheet.id)).toEqual([
      sheetId,
      second.sheetId,
    ]);
  });

  test("is refused a closed day, a full day, and a bed too small", async () => {
    expect(await refused(scheduleSheet(plan({ day: SUNDAY })))).toMatchObject({
      reason: "no-room",
      words: "North does not work that day.",
    });
    await transact((tx) => tx.update(nestSheets).set({ estimatedMinutes: 511 }));
    expect(await refused(scheduleSheet(plan()))).toMatchObject({
      reason: "no-room",
      words: "North has 8 h 30 min left that day; the sheet takes 8 h 31 min.",
    });
    expect(await done(scheduleSheet(plan({ overbook: true })))).toMatchObject({ bookedMinutes: 511 });
    await transact((tx) => tx.update(machines).set({ bedLength: 2_000 }));
    expect(await refused(scheduleSheet(plan({ day: "2026-12-08", runVersion: 1 })))).toMatchObject({
      reason: "no-room",
    });
  });

  test("moves to another day until it begins; the later of two is told", async () => {
    const { run } = await done(scheduleSheet(plan()));
    expect(await refused(scheduleSheet(plan({ day: "2026-12-08" })))).toMatchObject({ reason: "changed" });
    const moved = await done(scheduleSheet(plan({ day: "2026-12-08", runVersion: run.version })));
    expect(moved.run).toMatchObject({ id: run.id, day: "2026-12-08", sequence: 1 });
    const answers = await Promise.all(
      ["2026-12-09", "2026-12-10"].map((day) => scheduleSheet(plan({ day, runVersion: moved.run.version }))),
    );
    expect(answers.map(({ ok }) => ok).sort()).toEqual([false, true]);
    const now = await findRunOfSheet(db, sheetId);
    await done(startRun({ actor: operator, runId: run.id, version: now?.version ?? 0 }));
    expect(await refused(scheduleSheet(plan({ runVersion: (now?.version ?? 0) + 1 })))).toMatchObject({
      reason: "wrong-stage",
    });
  });

  test("is scheduled by operators only", async () => {
    const clerk = await makePerson({ roles: ["clerk"] });
    expect(await refused(scheduleSheet(plan({ actor: clerk })))).toMatchObject({ reason: "not-allowed" });
  });
});

describe("a run", () => {
  test("begun and finished cuts what lies on the sheet and keeps its minutes", async () => {
    const { run } = await done(scheduleSheet(plan()));
    const start = { actor: operator, runId: run.id, version: run.version };
    expect(await refused(finishRun(start))).toMatchObject({ reason: "wrong-stage" });
    await done(startRun({ ...start, now: new Date("2026-12-07T17:00:00Z") }));
    expect(await refused(startRun(start))).toMatchObject({ reason: "wrong-stage" });
    expect((await findNest(db, nestId))?.status).toBe("cutting");
    expect(await refused(dropNest({ actor: operator, nestId, version: 2, reason: "Late." }))).toMatchObject({
      reason: "wrong-stage",
    });
    const finish = { ...start, version: run.version + 1, now: new Date("2026-12-07T17:23:30Z") };
    expect(await refused(finishRun({ ...finish, actualMinutes: -1 }))).toMatchObject({ reason: "invalid" });
    expect(await done(finishRun(finish))).toMatchObject({ moved: 3 });
    expect(await refused(finishRun(finish))).toMatchObject({ reason: "wrong-stage" });
    expect(await findRunOfSheet(db, sheetId)).toMatchObject({ actualMinutes: 23.5, startedBy: operator.id });
    expect((await findNest(db, nestId))?.status).toBe("done");
    expect((await orderAsIs(orderId)).stage).toBe("cut");
  });

  test("of a held order waits for the release", async () => {
    const { run } = await done(scheduleSheet(plan()));
    await done(startRun({ actor: operator, runId: run.id, version: run.version }));
    await done(holdOrder({ ...(await asked(operator, orderId)), reason: "Wrong lot." }));
    const finish = { actor: operator, runId: run.id, version: run.version + 1 };
    expect(await refused(finishRun(finish))).toMatchObject({ reason: "wrong-stage" });
    expect(await findRunOfSheet(db, sheetId)).toMatchObject({ finishedAt: null });
  });

  test("is given up with its nest", async () => {
    await done(scheduleSheet(plan()));
    const { version = 0 } = (await findNest(db, nestId)) ?? {};
    await done(dropNest({ actor: operator, nestId, version, reason: "The lot is bowed." }));
    expect(await db.$count(runs)).toBe(0);
  });
});

describe("the promise", () => {
  test("of a new order comes after what is paid and what is planned", async () => {
    const builder = await makePerson();
    const draft = await makeReadyDraft(builder, shop);
    /** A Monday morning in the shop's zone, before the hour from which approvals count for the next day. */
    const now = new Date("2026-12-07T17:00:00Z");
    const promise = async () =>
      (await done(priceOrder({ actor: builder, orderId: draft.id, now }))).promisedFor;
    // Counted from Monday, cut on Tuesday, one day for the bench: Wednesday, out by 17:00 Pacific time.
    expect(await promise()).toEqual(new Date("2026-12-10T01:00:00Z"));
    // A waiting sheet of a day and a half moves the cut by as much.
    await transact((tx) => tx.update(nestSheets).set({ estimatedMinutes: 765 }));
    expect(await promise()).toEqual(new Date("2026-12-11T01:00:00Z"));
    await transact((tx) => tx.update(nestSheets).set({ estimatedMinutes: 505 }));
    await done(scheduleSheet(plan({ day: "2026-12-08" })));
    expect(await promise()).toEqual(new Date("2026-12-11T01:00:00Z"));
  });

  test("is checked again when the money comes: later if the machines have filled up, never earlier", async () => {
    const builder = await makePerson();
    const prompt = await makePaid(builder, shop, running.fakes.payments);
    expect(prompt.promisedFor).toEqual((await findQuote(db, prompt.id, prompt.quoteId ?? ""))?.promisedFor);

    const late = await makeApproved(builder, shop);
    await transact((tx) => tx.update(nestSheets).set({ estimatedMinutes: 2 * 510 }));
    const { sessionId } = await openPayPage(builder, late.id);
    await running.fakes.payments.pay(sessionId);
    await running.fakes.payments.webhooksSettled();
    const after = await orderAsIs(late.id);
    const quoted = (await findQuote(db, late.id, late.quoteId ?? ""))?.promisedFor;
    expect(after.stage).toBe("paid");
    expect(Number(after.promisedFor)).toBeGreaterThan(Number(quoted));
  });
});
