import { and, eq, isNotNull, isNull, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { lots, materials, stockGroups } from "~/db/schema";

export type StockGroup = typeof stockGroups.$inferSelect;
export type NewStockGroup = Pick<StockGroup, "orderId" | "revisionId" | "materialId" | "lotId" | "sheets">;

export async function insertStockGroup(tx: Executor, group: NewStockGroup): Promise<StockGroup> {
  const [row] = await tx.insert(stockGroups).values(group).returning();
  if (!row) throw new Error("The stock group was not stored.");
  return row;
}

export type StockedGroup = StockGroup & {
  readonly material: typeof materials.$inferSelect;
  readonly lot: typeof lots.$inferSelect | null;
};

/** A revision's groups with their material and lot. */
export async function listStockGroups(
  executor: Executor,
  orderId: string,
  revisionId: string,
): Promise<StockedGroup[]> {
  const rows = await executor
    .select({ group: stockGroups, material: materials, lot: lots })
    .from(stockGroups)
    .innerJoin(materials, eq(stockGroups.materialId, materials.id))
    .leftJoin(lots, eq(stockGroups.lotId, lots.id))
    .where(and(eq(stockGroups.orderId, orderId), eq(stockGroups.revisionId, revisionId)))
    .orderBy(materials.code);
  return rows.map(({ group, material, lot }) => ({ ...group, material, lot }));
}

/**
 * Sets a group's whole sheets aside on its lot, once. Answers false when the lot holds fewer unreserved sheets than
 * that: they are reserved all the same, since the money has come, and the shop is short of stock.
 */
export async function reserveGroup(tx: Executor, group: StockGroup, at: Date): Promise<boolean> {
  if (group.lotId === null) return false;
  const taken = await tx
    .update(stockGroups)
    .set({ reservedAt: at })
    .where(and(eq(stockGroups.id, group.id), isNull(stockGroups.reservedAt)))
    .returning({ id: stockGroups.id });
  if (taken.length === 0) return true;
  const [lot] = await tx
    .update(lots)
    .set({
      sheetsReserved: sql`${lots.sheetsReserved} + ${Math.ceil(group.sheets)}`,
      version: sql`${lots.version} + 1`,
    })
    .where(eq(lots.id, group.lotId))
    .returning();
  return lot !== undefined && lot.sheetsReserved <= lot.sheetsOnHand;
}

/** Gives a group's sheets back to its lot, once. */
export async function releaseGroup(tx: Executor, group: StockGroup): Promise<void> {
  const released = await tx
    .update(stockGroups)
    .set({ reservedAt: null })
    .where(and(eq(stockGroups.id, group.id), isNotNull(stockGroups.reservedAt)))
    .returning({ id: stockGroups.id });
  if (released.length === 0 || group.lotId === null) return;
  await tx
    .update(lots)
    .set({
      sheetsReserved: sql`max(0, ${lots.sheetsReserved} - ${Math.ceil(group.sheets)})`,
      version: sql`${lots.version} + 1`,
    })
    .where(eq(lots.id, group.lotId));
}
