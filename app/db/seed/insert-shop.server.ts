import { thicknessOf } from "~/domain/fit";
import type { Executor } from "../client.server";
import { lotReadings, lots, machines, materials, priceBookVersions, settings, tools } from "../schema";
import { DEMO_MACHINES, DEMO_TOOLS } from "./machines";
import { DEMO_PRICE_BOOK } from "./price-book";
import { DEMO_SETTINGS } from "./settings";
import { DEMO_MATERIALS, type DemoLot } from "./stock";

const DAY = 24 * 60 * 60_000;

async function insertLot(tx: Executor, materialId: string, lot: DemoLot, now: Date): Promise<void> {
  const { code, supplierLot, supplierDocument, sheetsOnHand, readings } = lot;
  const { min, mean, max } = thicknessOf(readings);
  const measuredAt = new Date(now.getTime() - lot.measuredDaysAgo * DAY);
  const [inserted] = await tx
    .insert(lots)
    .values({
      materialId,
      code,
      supplierLot,
      supplierDocument,
      sheetsOnHand,
      thicknessMin: min,
      thicknessMean: mean,
      thicknessMax: max,
      measuredAt,
    })
    .onConflictDoNothing()
    .returning({ id: lots.id });
  if (!inserted) return;
  await tx
    .insert(lotReadings)
    .values(readings.map((reading) => ({ ...reading, lotId: inserted.id, measuredAt })));
}

async function insertStock(tx: Executor, now: Date): Promise<void> {
  for (const { lots: stacks, ...material } of DEMO_MATERIALS) {
    await tx.insert(materials).values(material).onConflictDoNothing();
  }
  const ids = new Map(
    (await tx.select({ id: materials.id, code: materials.code }).from(materials)).map(({ id, code }) => [
      code,
      id,
    ]),
  );
  for (const { code, lots: stacks } of DEMO_MATERIALS) {
    const materialId = ids.get(code);
    if (materialId === undefined) throw new Error(`The material ${code} was not inserted.`);
    for (const lot of stacks) await insertLot(tx, materialId, lot, now);
  }
}

/**
 * The invented shop: settings, materials with their lots and readings, tools, machines, the first price book. What
 * is there already (by its code, number or name) is left as it is, so that it may be run again. In a transaction.
 */
export async function insertShop(tx: Executor, now: Date): Promise<void> {
  await tx.insert(settings).values({ content: DEMO_SETTINGS }).onConflictDoNothing();
  await insertStock(tx, now);
  await tx
    .insert(tools)
    .values(DEMO_TOOLS.map((tool) => ({ ...tool, measuredAt: new Date(now.getTime() - 10 * DAY) })))
    .onConflictDoNothing();
  await tx
    .insert(machines)
    .values([...DEMO_MACHINES])
    .onConflictDoNothing();
  await tx
    .insert(priceBookVersions)
    .values({
      number: 1,
      content: DEMO_PRICE_BOOK,
      note: "First price book.",
      status: "published",
      publishedAt: now,
    })
    .onConflictDoNothing();
}
