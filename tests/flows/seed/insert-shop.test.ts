import { expect, it } from "vitest";
import { db, transact } from "~/db/client.server";
import { lotReadings, lots, machines, materials, priceBookVersions, settings, tools } from "~/db/schema";
import { insertShop } from "~/db/seed/insert-shop.server";
import { findPublishedPriceBook } from "~/models/price-books.server";
import { currentSettings } from "~/models/settings.server";
import { freshDatabase } from "../../support/database";

freshDatabase();
const now = new Date("2026-12-01T15:00:00Z");

const counts = async () => ({
  settings: await db.$count(settings),
  materials: await db.$count(materials),
  lots: await db.$count(lots),
  readings: await db.$count(lotReadings),
  tools: await db.$count(tools),
  machines: await db.$count(machines),
  books: await db.$count(priceBookVersions),
});

it("sets the shop up once, however often it is run", async () => {
  await transact((tx) => insertShop(tx, now));
  const first = await counts();
  // Ten lots with three sheets of eight points each.
  expect(first).toEqual({
    settings: 1,
    materials: 8,
    lots: 10,
    readings: 240,
    tools: 6,
    machines: 2,
    books: 1,
  });
  await transact((tx) => insertShop(tx, new Date(now.getTime() + 86_400_000)));
  expect(await counts()).toEqual(first);
});

it("leaves the owner's changes alone", async () => {
  await transact((tx) => tx.update(machines).set({ rapid: 1 }));
  await transact((tx) => insertShop(tx, now));
  expect((await db.select({ rapid: machines.rapid }).from(machines)).map(({ rapid }) => rapid)).toEqual([
    1, 1,
  ]);
});

it("can be read by those who price", async () => {
  expect((await currentSettings(db)).shop.name).toBe("Alder Ferry Panelworks");
  expect((await findPublishedPriceBook(db))?.number).toBe(1);
});

it("gives every lot the thickness of its own readings", async () => {
  for (const lot of await db.select().from(lots)) {
    const readings = (await db.select().from(lotReadings)).filter(({ lotId }) => lotId === lot.id);
    const thicknesses = readings.map(({ thickness }) => thickness);
    expect(lot.thicknessMin).toBe(Math.min(...thicknesses));
    expect(lot.thicknessMax).toBe(Math.max(...thicknesses));
    expect(lot.thicknessMean).toBeGreaterThan(lot.thicknessMin);
    expect(lot.thicknessMean).toBeLessThan(lot.thicknessMax);
  }
});
