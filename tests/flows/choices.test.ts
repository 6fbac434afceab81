import { expect, it } from "vitest";
import { db } from "~/db/client.server";
import { DEMO_DRAWINGS } from "~/db/seed/drawings";
import { orderInterpretation } from "~/flows/order-interpretation.server";
import { setChoices } from "~/flows/set-choices.server";
import { takeOutDrawing } from "~/flows/take-out-drawing.server";
import { undoChoices } from "~/flows/undo-choices.server";
import { uploadDrawing } from "~/flows/upload-drawing.server";
import { findDrawing, listDrawings } from "~/models/drawing-files.server";
import { countByStage, pageOfOrders } from "~/models/order-list.server";
import {
  chooseStock,
  freshScene,
  makeDraftOrder,
  makePerson,
  makeShop,
  orderAsIs,
  runReadings,
} from "../support/scene";

freshScene();
const shop = makeShopOnce();

function makeShopOnce(): () => ReturnType<typeof makeShop> {
  let made: ReturnType<typeof makeShop> | undefined;
  return () => {
    made ??= makeShop();
    return made;
  };
}

const numberOf = async (order: Awaited<ReturnType<typeof makeDraftOrder>>) =>
  orderInterpretation(db, order).then(({ number, content }) => ({ number, content }));

it("takes the last change back, and back again, and loses nothing of the history", async () => {
  const { material } = await shop();
  const person = await makePerson();
  const order = await makeDraftOrder(person);
  await chooseStock(person, order, material.id);
  const changed = await setChoices({ actor: person, orderId: order.id, after: 1, sanding: "grit-150" });
  expect(changed).toEqual({ ok: true, number: 2 });

  expect(await undoChoices({ actor: person, orderId: order.id, after: 2 })).toEqual({ ok: true, number: 3 });
  expect((await numberOf(order)).content.sanding).toBe("none");
  expect((await numberOf(order)).content.files[0]?.materialId).toBe(material.id);

  expect(await undoChoices({ actor: person, orderId: order.id, after: 3 })).toEqual({ ok: true, number: 4 });
  expect((await numberOf(order)).content.sanding).toBe("grit-150");
});

it("refuses an undo where nothing went before, and one that comes too late", async () => {
  const { material } = await shop();
  const person = await makePerson();
  const order = await makeDraftOrder(person);
  await chooseStock(person, order, material.id);
  expect(await undoChoices({ actor: person, orderId: order.id, after: 1 })).toMatchObject({
    ok: false,
    reason: "incomplete",
  });
  await setChoices({ actor: person, orderId: order.id, after: 1, leaveTabs: true });
  await setChoices({ actor: person, orderId: order.id, after: 2, sanding: "arrises" });
  expect(await undoChoices({ actor: person, orderId: order.id, after: 2 })).toMatchObject({
    ok: false,
    reason: "changed",
  });
  expect((await numberOf(order)).content).toMatchObject({ leaveTabs: true, sanding: "arrises" });
});

it("keeps a part's name and grain beside those of other parts, and layers of one drawing only", async () => {
  const { material } = await shop();
  const person = await makePerson();
  const order = await makeDraftOrder(person);
  await chooseStock(person, order, material.id);
  const { content } = await numberOf(order);
  const sha256 = content.files[0]?.sha256 ?? "";
  const part = (letter: string, name: string) => ({ sha256, letter, name, grain: "along-y" as const });
  await setChoices({ actor: person, orderId: order.id, after: 1, parts: [part("A", "side")] });
  await setChoices({ actor: person, orderId: order.id, after: 2, parts: [part("B", "shelf")] });
  await setChoices({ actor: person, orderId: order.id, after: 3, parts: [part("A", "left side")] });
  expect((await numberOf(order)).content.parts).toEqual([part("B", "shelf"), part("A", "left side")]);

  const layers = [{ layer: "0", kind: "engrave" as const, depth: { depth: 1 } }];
  await setChoices({ actor: person, orderId: order.id, after: 4, files: [{ sha256, layers }] });
  expect((await numberOf(order)).content.files[0]?.layers).toEqual(expect.arrayContaining(layers));
  expect((await numberOf(order)).content.files[0]?.materialId).toBe(material.id);
});

it("takes a drawing out of a draft once, keeps its row, and tells who comes with an older page", async () => {
  const person = await makePerson();
  const order = await makeDraftOrder(person);
  const file = new Blob([DEMO_DRAWINGS["lamp-shelf"].draw()]);
  const second = await uploadDrawing({ actor: person, orderId: order.id, fileName: "lamp.dxf", file });
  if (!second.ok) throw new Error(second.words);
  await runReadings();
  const { version } = await orderAsIs(order.id);
  const drawingId = second.drawingId;
  const out = await takeOutDrawing({ actor: person, orderId: order.id, version, drawingId });
  expect(out.ok).toBe(true);
  expect((await listDrawings(db, order.id)).map(({ fileName }) => fileName)).toEqual(["shelves.dxf"]);
  expect((await findDrawing(db, order.id, drawingId))?.removedAt).toBeInstanceOf(Date);

  expect(await takeOutDrawing({ actor: person, orderId: order.id, version, drawingId })).toMatchObject({
    ok: false,
    reason: "changed",
  });
  const now = (await orderAsIs(order.id)).version;
  expect(await takeOutDrawing({ actor: person, orderId: order.id, version: now, drawingId })).toMatchObject({
    ok: false,
    reason: "not-found",
  });
  expect((await orderAsIs(order.id)).version).toBe(now);

  const stranger = await makePerson();
  expect(await takeOutDrawing({ actor: stranger, orderId: order.id, version: now, drawingId })).toMatchObject(
    { ok: false, reason: "not-found" },
  );
});

it("lists a builder's own orders by page, by stage and by words, and takes % for the letter it is", async () => {
  const person = await makePerson();
  const stranger = await makePerson();
  for (const name of ["galley side.dxf", "100% shelf.dxf", "bunk.dxf"])
    await makeDraftOrder(person, undefined, name);
  await makeDraftOrder(stranger, undefined, "galley of another.dxf");
  const scope = { kind: "builder", userId: person.id } as const;
  const names = async (search: { words?: string; page?: number; size?: number }) =>
    (await pageOfOrders(db, scope, { page: 1, size: 25, ...search })).rows.map(({ name }) => name);

  expect(await names({})).toEqual(["bunk", "100% shelf", "galley side"]);
  expect(await names({ size: 2, page: 2 })).toEqual(["galley side"]);
  expect(await names({ words: "GALLEY" })).toEqual(["galley side"]);
  expect(await names({ words: "100%" })).toEqual(["100% shelf"]);
  expect(await names({ words: "%" })).toEqual(["100% shelf"]);
  expect(await names({ words: "_" })).toEqual([]);
  const { rows, found } = await pageOfOrders(db, scope, { page: 1, size: 1, stages: ["quoted"] });
  expect([rows.length, found]).toEqual([0, 0]);
  expect(await countByStage(db, scope)).toEqual(new Map([["draft", 3]]));
});
