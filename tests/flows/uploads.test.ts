import { createHash } from "node:crypto";
import { beforeEach, describe, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { drawingFiles, jobs, orderDrawings, orders, readings } from "~/db/schema";
import { openDrawing } from "~/flows/open-drawing.server";
import { removeOrderDrawing } from "~/flows/remove-drawing.server";
import { uploadDrawing } from "~/flows/upload-drawing.server";
import { listDrawings } from "~/models/drawing-files.server";
import { changeOrder } from "~/models/order-writes.server";
import { resetDatabase } from "../support/database";
import { shelvesDxf } from "../support/drawings";
import { takeConsoleErrors } from "../support/loud-console";
import { freshScene, makePerson, orderAsIs, runReadings, type TestPerson } from "../support/scene";

const running = freshScene();
beforeEach(resetDatabase);

const sha256 = (bytes: Uint8Array) => createHash("sha256").update(bytes).digest("hex");
const upload = (
  actor: TestPerson,
  bytes: Uint8Array | string,
  more: { orderId?: string; fileName?: string } = {},
) =>
  uploadDrawing({
    actor,
    orderId: null,
    fileName: "galley_sides.dxf",
    file: new Blob([typeof bytes === "string" ? bytes : new Uint8Array(bytes)]),
    ...more,
  });
const joined = (...pieces: (Uint8Array | string)[]) =>
  new Uint8Array(Buffer.concat(pieces.map((piece) => Buffer.from(piece))));
const nothingIsThere = async () => {
  for (const table of [orders, orderDrawings, drawingFiles, readings, jobs])
    expect(await db.$count(table)).toBe(0);
};

describe("a drawing", () => {
  test("starts a draft order named after the file, with its bytes kept and its reading queued", async () => {
    const person = await makePerson();
    const bytes = shelvesDxf();
    const verdict = await upload(person, bytes);
    if (!verdict.ok) throw new Error(verdict.words);
    expect(await orderAsIs(verdict.orderId)).toMatchObject({
      reference: "KP-2001",
      builderId: person.id,
      name: "galley sides",
      stage: "draft",
    });
    expect(verdict.sha256).toBe(sha256(bytes));
    expect(await running.services.storage.get(`drawings/${verdict.sha256}`)).toEqual(bytes);
    expect(await db.select().from(readings)).toMatchObject([{ fileSha: verdict.sha256, status: "queued" }]);
    expect(await db.select().from(jobs)).toMatchObject([{ kind: "read-drawing", status: "queued" }]);
  });

  test("of several megabytes is kept byte for byte", async () => {
    const comment = `999\n${"x".repeat(250)}\n`.repeat(40_000);
    const bytes = joined(comment, shelvesDxf());
    expect(bytes.length).toBeGreaterThan(10_000_000);
    const verdict = await upload(await makePerson(), bytes);
    expect(verdict).toMatchObject({ ok: false, reason: "invalid" });

    const late = joined(shelvesDxf().slice(0, -4), comment, shelvesDxf().slice(-4));
    const kept = await upload(await makePerson(), late);
    if (!kept.ok) throw new Error(kept.words);
    const stored = await running.services.storage.get(`drawings/${kept.sha256}`);
    expect(stored && sha256(stored)).toBe(sha256(late));
  });

  test("joins a given order after the drawings that are there", async () => {
    const person = await makePerson();
    const first = await upload(person, shelvesDxf());
    if (!first.ok) throw new Error(first.words);
    const second = await upload(person, shelvesDxf({ mark: 1 }), {
      orderId: first.orderId,
      fileName: "doors.dxf",
    });
    expect(second).toMatchObject({ ok: true, orderId: first.orderId, added: true });
    const drawings = await db.select().from(orderDrawings).orderBy(orderDrawings.position);
    expect(drawings.map(({ fileName, position }) => [fileName, position])).toEqual([
      ["galley_sides.dxf", 1],
      ["doors.dxf", 2],
    ]);
    expect(await db.$count(orders)).toBe(1);
  });

  test("sent twice is one object and one reading; in the same order it is the drawing that is there", async () => {
    const person = await makePerson();
    const first = await upload(person, shelvesDxf());
    if (!first.ok) throw new Error(first.words);
    expect(await upload(person, shelvesDxf(), { orderId: first.orderId })).toEqual({
      ...first,
      added: false,
    });
    await runReadings();
    const elsewhere = await upload(person, shelvesDxf());
    expect(elsewhere).toMatchObject({ ok: true, added: true });
    expect([await db.$count(drawingFiles), await db.$count(readings), await db.$count(jobs)]).toEqual([
      1, 1, 1,
    ]);
    expect(await db.$count(orders)).toBe(2);
  });

  test("uploaded many times at once gives each order its own reference and one reading", async () => {
    const person = await makePerson();
    const verdicts = await Promise.all(Array.from({ length: 12 }, () => upload(person, shelvesDxf())));
    expect(verdicts.every(({ ok }) => ok)).toBe(true);
    const rows = await db.select({ reference: orders.reference }).from(orders);
    expect(rows.map(({ reference }) => reference).sort()).toEqual(
      Array.from({ length: 12 }, (_, n) => `KP-${2001 + n}`),
    );
    expect(await db.$count(readings)).toBe(1);
  });

  test("taken out of a draft is gone from it, and can be put back", async () => {
    const person = await makePerson();
    const first = await upload(person, shelvesDxf());
    if (!first.ok) throw new Error(first.words);
    const { orderId, drawingId } = first;
    const stranger = await makePerson();
    expect(await removeOrderDrawing({ actor: stranger, orderId, drawingId })).toMatchObject({
      reason: "not-found",
    });
    expect(await removeOrderDrawing({ actor: person, orderId, drawingId })).toEqual({ ok: true });
    expect(await removeOrderDrawing({ actor: person, orderId, drawingId })).toMatchObject({
      reason: "not-found",
    });
    expect(await listDrawings(db, orderId)).toEqual([]);
    expect(await upload(person, shelvesDxf(), { orderId })).toMatchObject({ ok: true, added: true });
    expect(await listDrawings(db, orderId)).toMatchObject([{ position: 2 }]);
  });

  test("is given back as it came, and only within its order", async () => {
    const person = await makePerson();
    const [mine, other] = [await upload(person, shelvesDxf()), await upload(person, shelvesDxf({ mark: 1 }))];
    if (!mine.ok || !other.ok) throw new Error("not uploaded");
    const opened = await openDrawing({ orderId: mine.orderId, drawingId: mine.drawingId });
    expect(opened).toMatchObject({ fileName: "galley_sides.dxf", contentType: "image/vnd.dxf" });
    const chunks: Uint8Array[] = [];
    for await (const chunk of opened?.body ?? []) chunks.push(chunk);
    expect(new Uint8Array(Buffer.concat(chunks))).toEqual(shelvesDxf());
    expect(await openDrawing({ orderId: other.orderId, drawingId: mine.drawingId })).toBeUndefined();
  });

  test.each([
    ["../../etc/passwd.dxf", "passwd.dxf", "passwd"],
    ["C:\\cad\\boat galley.DXF", "boat galley.DXF", "boat galley"],
    ["\u0000\u202e.dxf", ".dxf", "Drawing"],
  ])("named %j is kept as %j", async (given, fileName, name) => {
    const verdict = await upload(await makePerson(), shelvesDxf(), { fileName: given });
    if (!verdict.ok) throw new Error(verdict.words);
    expect(await db.select().from(orderDrawings)).toMatchObject([{ fileName }]);
    expect(await orderAsIs(verdict.orderId)).toMatchObject({ name });
  });
});

describe("refusals leave nothing", () => {
  test.each([
    ["PDF", "%PDF-1.7\n1 0 obj"],
    ["zip", "PK\u0003\u0004 and so on"],
    ["DWG", "AC1032\u0000\u0000\u0000"],
    ["empty", ""],
    ["DXF", "Dear shop, please find attached"],
  ])("%s content is refused with what to send instead", async (named, content) => {
    const verdict = await upload(await makePerson(), content);
    expect(verdict).toMatchObject({ ok: false, reason: "invalid" });
    expect(!verdict.ok && verdict.words).toMatch(new RegExp(named, "i"));
    await nothingIsThere();
  });

  test("another builder's order takes no drawing", async () => {
    const mine = await upload(await makePerson(), shelvesDxf());
    if (!mine.ok) throw new Error(mine.words);
    const theirs = await upload(await makePerson(), shelvesDxf({ mark: 1 }), { orderId: mine.orderId });
    expect(theirs).toMatchObject({ ok: false, reason: "not-found" });
    expect(await db.$count(orderDrawings)).toBe(1);
    expect(await db.$count(drawingFiles)).toBe(1);
  });

  test("a quoted order takes no drawing", async () => {
    const person = await makePerson();
    const mine = await upload(person, shelvesDxf());
    if (!mine.ok) throw new Error(mine.words);
    const { id: orderId, version } = await orderAsIs(mine.orderId);
    await transact((tx) => changeOrder(tx, { orderId, version, change: { stage: "quoted" } }));
    expect(await upload(person, shelvesDxf({ mark: 1 }), { orderId })).toMatchObject({
      reason: "wrong-stage",
    });
    expect(await db.$count(orderDrawings)).toBe(1);
  });

  test("a file that breaks off while it is read leaves nothing", async () => {
    const broken = new Blob([new Uint8Array(shelvesDxf())]);
    let reads = 0;
    broken.stream = () =>
      new ReadableStream({
        pull(controller) {
          reads += 1;
          if (reads === 1) controller.enqueue(new Uint8Array(shelvesDxf().slice(0, 100)));
          else controller.error(new Error("the line went dead"));
        },
      });
    const attempt = uploadDrawing({
      actor: await makePerson(),
      orderId: null,
      fileName: "a.dxf",
      file: broken,
    });
    await expect(attempt).rejects.toThrow("the line went dead");
    await nothingIsThere();
  });

  test("a storage that is away refuses in plain words; once it is back the same file is taken", async () => {
    const person = await makePerson();
    running.fakes.storage.failNext(20);
    const refused = await upload(person, shelvesDxf({ mark: 5 }));
    running.fakes.storage.failNext(0);
    expect(refused).toMatchObject({ ok: false, reason: "unavailable" });
    expect(takeConsoleErrors()).toEqual([expect.stringContaining("could not be stored")]);
    await nothingIsThere();
    expect(await upload(person, shelvesDxf({ mark: 5 }))).toMatchObject({ ok: true });
  });
});
