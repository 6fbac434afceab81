import { and, asc, eq, inArray, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { lots, materials } from "~/db/schema";

export type Material = typeof materials.$inferSelect;
export type Lot = typeof lots.$inferSelect;

/** Materials that can be chosen, by name and thickness. */
export async function listMaterials(executor: Executor): Promise<Material[]> {
  return executor
    .select()
    .from(materials)
    .where(eq(materials.active, true))
    .orderBy(asc(materials.name), asc(materials.nominalThickness));
}

export async function findMaterials(executor: Executor, ids: readonly string[]): Promise<Material[]> {
  if (ids.length === 0) return [];
  return executor
    .select()
    .from(materials)
    .where(inArray(materials.id, [...new Set(ids)]));
}

/** Lots of a material that can be cut from, those with most free sheets first. */
export async function listLots(executor: Executor, materialId: string): Promise<Lot[]> {
  return executor
    .select()
    .from(lots)
    .where(and(eq(lots.materialId, materialId), eq(lots.active, true)))
    .orderBy(sql`${lots.sheetsOnHand} - ${lots.sheetsReserved} desc`, asc(lots.code));
}

export async function findLot(executor: Executor, id: string): Promise<Lot | undefined> {
  const [lot] = await executor.select().from(lots).where(eq(lots.id, id));
  return lot;
}

/** Takes sheets of a lot for an order. False when not as many are free. */
export async function reserveSheets(executor: Executor, lotId: string, sheets: number): Promise<boolean> {
  const reserved = await executor
    .update(lots)
    .set({
      sheetsReserved: sql`${lots.sheetsReserved} + ${sheets}`,
      version: sql`${lots.version} + 1`,
    })
    .where(and(eq(lots.id, lotId), sql`${lots.sheetsOnHand} - ${lots.sheetsReserved} >= ${sheets}`))
    .returning({ id: lots.id });
  return reserved.length === 1;
}

/** Gives reserved sheets free again. */
export async function releaseSheets(executor: Executor, lotId: string, sheets: number): Promise<void> {
  await executor
    .update(lots)
    .set({
      sheetsReserved: sql`max(0, ${lots.sheetsReserved} - ${sheets})`,
      version: sql`${lots.version} + 1`,
    })
    .where(eq(lots.id, lotId));
}

/** Takes cut sheets off a lot; a number below zero puts them back. */
export async function takeSheets(executor: Executor, lotId: string, sheets: number): Promise<void> {
  await executor
    .update(lots)
    .set({
      sheetsOnHand: sql`max(0, ${lots.sheetsOnHand} - ${sheets})`,
      version: sql`${lots.version} + 1`,
    })
    .where(eq(lots.id, lotId));
}
