import { beforeEach, describe, expect, test } from "vitest";
import { db } from "~/db/client.server";
import { interpretations, readings } from "~/db/schema";
import type { Interpretation } from "~/domain/orders";
import { findOrderGeometry } from "~/flows/find-order-geometry.server";
import { findOrderParts } from "~/flows/find-order-parts.server";
import { loadGeometry } from "~/flows/geometry-store.server";
import { orderInterpretation } from "~/flows/order-interpretation.server";
import { readDrawingHandler } from "~/flows/read-drawing.server";
import { saveInterpretation } from "~/flows/save-interpretation.server";
import { uploadDrawing } from "~/flows/upload-drawing.server";
import { runDueJobs } from "~/jobs/run-job.server";
import { eventsAfter } from "~/models/events.server";
import { resetDatabase } from "../support/database";
import { dxfBytes, rectangle, round, shelvesDxf } from "../support/drawings";
import { freshScene, makeDraftOrder, makePerson, makeShop, runReadings } from "../support/scene";
import trouble from "../support/workers/trouble-reading.worker.ts?node-worker";

const running = freshScene();
beforeEach(resetDatabase);

async function upload(
  person: Awaited<ReturnType<typeof makePerson>>,
  bytes: Uint8Array,
  orderId: string | null = null,
) {
  const verdict = await uploadDrawing({
    actor: person,
    orderId,
    fileName: "drawing.dxf",
    file: new Blob([new Uint8Array(bytes)]),
  });
  if (!verdict.ok) throw new Error(verdict.words);
  return verdict;
}

describe("reading", () => {
  test("a drawing is read in a worker, kept, summed up, and every order that uses it is told", async () => {
    const [one, other] = [await makePerson(), await makePerson()];
    const first = await upload(one, shelvesDxf());
    const second = await upload(other, shelvesDxf());
    expect(await runReadings()).toBe(1);
    const [reading] = await db.select().from(readings);
    expect(reading).toMatchObject({
      fileSha: first.sha256,
      status: "done",
      failure: null,
      summary: { declared: "mm", ignored: [] },
    });
    expect(reading?.summary?.layers.map(({ name }) => name).sort()).toEqual(
      expect.arrayContaining(["DRILL", "INSIDE", "OUTSIDE"]),
    );
    for (const { orderId } of [first, second]) {
      const events = await eventsAfter(db, orderId, 0, "builder");
      expect(events.at(-1)).toMatchObject({
        kind: "reading",
        data: { status: "done", sha256: first.sha256 },
      });
    }
  });

  test.each([
    ["hang", "too long"],
    ["devour", "too large"],
    ["exit", "damaged"],
  ])("a file that makes the reader %s ends as a failed reading with a plain sentence", async (how, words) => {
    const comment = new TextEncoder().encode(`999\ntrouble: ${how}\n`);
    const order = await upload(await makePerson(), new Uint8Array([...comment, ...shelvesDxf()]));
    const handler = readDrawingHandler({ workerUrl: trouble, timeLimitMs: how === "hang" ? 1_500 : 55_000 });
    expect(await runDueJobs({ "read-drawing": handler })).toBe(1);
    const [reading] = await db.select().from(readings);
    expect(reading).toMatchObject({ status: "failed", failure: expect.stringContaining(words) });
    const events = await eventsAfter(db, order.orderId, 0, "builder");
    expect(events.at(-1)).toMatchObject({ data: { status: "failed" } });
    const parts = await findOrderParts({ order: { id: order.orderId, builderId: "" } });
    expect(parts).toMatchObject({ geometryKey: null, files: [{ state: "failed", words: reading?.failure }] });
  });

  test("a reading that the storage failed is queued again by the next upload of the file", async () => {
    const person = await makePerson();
    const { orderId, sha256 } = await upload(person, shelvesDxf());
    await running.services.storage.remove(`drawings/${sha256}`);
    for (const minutes of [0, 10, 20])
      await runDueJobs(
        { "read-drawing": readDrawingHandler() },
        { now: () => new Date(Date.now() + minutes * 60_000) },
      );
    expect(await db.select().from(readings)).toMatchObject([
      { status: "failed", failure: expect.stringContaining("Upload it again") },
    ]);
    await running.services.storage.put(`drawings/${sha256}`, shelvesDxf(), "image/vnd.dxf");
    expect(await upload(person, shelvesDxf(), orderId)).toMatchObject({ added: false });
    await runReadings();
    expect(await db.select().from(readings)).toMatchObject([{ status: "done", failure: null }]);
  });
});

describe("parts of an order", () => {
  test("are found with the declared unit, marked unconfirmed, and kept by content", async () => {
    const order = await makeDraftOrder(await makePerson());
    const found = await findOrderParts({ order });
    const [file] = found.files;
    if (file?.state !== "read") throw new Error("not read");
    expect(file.geometry).toMatchObject({ unit: "mm", confirmed: false });
    const { totals, parts } = file.geometry.report;
    expect(totals).toMatchObject({ parts: 3, distinctParts: 2 });
    // Closed forms: two shelves of 600 x 300 less two 5 mm holes, one back of 800 x 400 less 100 x 50.
    expect(totals.area).toBeCloseTo(2 * (600 * 300 - 2 * Math.PI * 2.5 ** 2) + 800 * 400 - 100 * 50, 3);
    expect(parts.map(({ quantity, outerLength }) => [quantity, outerLength])).toEqual([
      [1, 2_400],
      [2, 1_800],
    ]);
    expect(await findOrderParts({ order })).toEqual(found);
    expect(await loadGeometry(found.geometryKey ?? "")).toEqual({ files: [file.geometry] });
  });

  test("follow unit and layers of unsaved choices without changing what is saved", async () => {
    const order = await makeDraftOrder(await makePerson());
    const saved = await findOrderParts({ order });
    const inches: Interpretation = {
      ...saved.interpretation.content,
      files: saved.interpretation.content.files.map((file) => ({
        ...file,
        unit: "in",
        layers: [{ layer: "INSIDE", kind: "set-aside", depth: null }],
      })),
    };
    const tried = await findOrderParts({ order, content: inches });
    const [file] = tried.files;
    if (file?.state !== "read") throw new Error("not read");
    expect(file.geometry).toMatchObject({ unit: "in", confirmed: true });
    expect(file.geometry.report.parts[0]?.outerLength).toBeCloseTo(2_400 * 25.4, 6);
    expect(file.geometry.report.parts[0]?.features).toEqual([]);
    expect(tried.geometryKey).not.toBe(saved.geometryKey);
    expect((await findOrderParts({ order })).geometryKey).toBe(saved.geometryKey);
  });

  test("a geometry document opens only in an order that holds its files", async () => {
    const [one, other] = [await makePerson(), await makePerson()];
    const mine = await makeDraftOrder(one);
    const theirs = await makeDraftOrder(
      other,
      dxfBytes([{ layer: "0", path: rectangle({ x: 0, y: 0 }, 90, 60) }]),
    );
    const { geometryKey } = await findOrderParts({ order: mine });
    if (!geometryKey) throw new Error("no geometry");
    expect(await findOrderGeometry({ orderId: mine.id, geometryKey })).toBeInstanceOf(Uint8Array);
    expect(await findOrderGeometry({ orderId: theirs.id, geometryKey })).toBeUndefined();
    expect(await findOrderGeometry({ orderId: mine.id, geometryKey: "../drawings/x" })).toBeUndefined();
  });
});

describe("interpretation", () => {
  test("begins with the names' guesses, unit and stock open", async () => {
    const order = await makeDraftOrder(await makePerson());
    const { number, content } = await orderInterpretation(db, order);
    expect(number).toBe(0);
    expect(content).toMatchObject({
      files: [{ unit: null, materialId: null, sets: 1 }],
      sanding: "none",
      leaveTabs: false,
    });
    const kinds = Object.fromEntries(content.files[0]?.layers.map(({ layer, kind }) => [layer, kind]) ?? []);
    expect(kinds).toMatchObject({ OUTSIDE: "outside", DRILL: "drill" });
  });

  test("is saved with history, and the later of two people is told", async () => {
    const person = await makePerson();
    const { material } = await makeShop();
    const order = await makeDraftOrder(person);
    const { content } = await orderInterpretation(db, order);
    const change = (sets: number): Interpretation => ({
      ...content,
      files: content.files.map((file) => ({ ...file, unit: "mm", materialId: material.id, sets })),
    });
    const save = (after: number, sets: number) =>
      saveInterpretation({ actor: person, orderId: order.id, after, content: change(sets) });
    expect(await save(0, 2)).toEqual({ ok: true, number: 1 });
    const both = await Promise.all([save(1, 3), save(1, 4)]);
    expect(both.map(({ ok }) => ok).sort()).toEqual([false, true]);
    expect(both.find(({ ok }) => !ok)).toMatchObject({ reason: "changed" });
    expect(await db.$count(interpretations)).toBe(2);
    expect((await orderInterpretation(db, order)).content.files[0]).toMatchObject({ unit: "mm", sets: 3 });
  });

  test("refuses another builder, unknown stock and files that are not the order's", async () => {
    const person = await makePerson();
    const order = await makeDraftOrder(person);
    const { content } = await orderInterpretation(db, order);
    const save = (actor: typeof person, changed: Interpretation) =>
      saveInterpretation({ actor, orderId: order.id, after: 0, content: changed });
    expect(await save(await makePerson(), content)).toMatchObject({ ok: false, reason: "not-found" });
    const ghost = { ...content, files: content.files.map((file) => ({ ...file, materialId: "ghost" })) };
    expect(await save(person, ghost)).toMatchObject({ ok: false, reason: "invalid" });
    expect(await save(person, { ...content, files: [] })).toMatchObject({ ok: false, reason: "changed" });
    expect(await db.$count(interpretations)).toBe(0);
  });

  test("what a builder settled for a layer is offered in their next drawing, and only to them", async () => {
    const person = await makePerson();
    const drawing = (diameter: number) =>
      dxfBytes([
        { layer: "OUTSIDE", path: rectangle({ x: 0, y: 0 }, 400, 300) },
        { layer: "POTS", path: round({ x: 200, y: 150 }, diameter) },
      ]);
    const order = await makeDraftOrder(person, drawing(100));
    const { content } = await orderInterpretation(db, order);
    const rule = { layer: "POTS", kind: "pocket", depth: { depth: 6 } } as const;
    await saveInterpretation({
      actor: person,
      orderId: order.id,
      after: 0,
      content: {
        ...content,
        files: content.files.map((file) => ({
          ...file,
          layers: [...file.layers.filter(({ layer }) => layer !== "POTS"), rule],
        })),
      },
    });
    const layersOf = async (who: typeof person) =>
      (await orderInterpretation(db, await makeDraftOrder(who, drawing(110)))).content.files[0]?.layers;
    expect(await layersOf(person)).toContainEqual(rule);
    expect(await layersOf(await makePerson())).not.toContainEqual(rule);
  });
});
