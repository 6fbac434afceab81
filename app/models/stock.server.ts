import { and, asc, desc, eq, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { lotReadings, lots, materials } from "~/db/schema";
import type { ThicknessReading } from "~/domain/fit";
import type { Lot, Material } from "./materials.server";

export type MaterialFields = Omit<Material, "id" | "active" | "version" | "createdAt">;
export type LotReading = typeof lotReadings.$inferSelect;
export type LotFields = Pick<Lot, "code" | "supplierLot" | "supplierDocument" | "sheetsOnHand">;
export type LotThickness = Pick<Lot, "thicknessMin" | "thicknessMean" | "thicknessMax" | "measuredAt">;

/** Every material, retired ones last, by kind and thickness. */
export async function listAllMaterials(executor: Executor): Promise<Material[]> {
  return executor
    .select()
    .from(materials)
    .orderBy(
      desc(materials.active),
      asc(materials.kind),
      asc(materials.nominalThickness),
      asc(materials.code),
    );
}

export async function findMaterial(executor: Executor, id: string): Promise<Material | undefined> {
  const [row] = await executor.select().from(materials).where(eq(materials.id, id));
  return row;
}

/** Undefined when the code is taken. */
export async function insertMaterial(tx: Executor, fields: MaterialFields): Promise<Material | undefined> {
  const [row] = await tx
    .insert(materials)
    .values(fields)
    .onConflictDoNothing({ target: materials.code })
    .returning();
  return row;
}

/** False when somebody else changed it since it was read at `version`. */
export async function changeMaterial(
  tx: Executor,
  { id, version, change }: { id: string; version: number; change: Partial<Material> },
): Promise<boolean> {
  const changed = await tx
    .update(materials)
    .set({ ...change, version: version + 1 })
    .where(and(eq(materials.id, id), eq(materials.version, version)))
    .returning({ id: materials.id });
  return changed.length === 1;
}

export async function findMaterialByCode(executor: Executor, code: string): Promise<Material | undefined> {
  const [row] = await executor.select().from(materials).where(eq(materials.code, code));
  return row;
}

/** Every lot, those in use first, the newest first. */
export async function listAllLots(executor: Executor): Promise<Lot[]> {
  return executor.select().from(lots).orderBy(desc(lots.active), desc(lots.measuredAt), asc(lots.code));
}

export async function findLotByCode(executor: Executor, code: string): Promise<Lot | undefined> {
  const [row] = await executor.select().from(lots).where(eq(lots.code, code));
  return row;
}

export async function insertLot(
  tx: Executor,
  lot: LotFields & LotThickness & { readonly materialId: string },
): Promise<Lot> {
  const [row] = await tx.insert(lots).values(lot).returning();
  if (!row) throw new Error("The lot was not stored.");
  return row;
}

/** False when somebody else changed it, or took sheets of it, since it was read at `version`. */
export async function changeLot(
  tx: Executor,
  { id, version, change }: { id: string; version: number; change: Partial<Lot> },
): Promise<boolean> {
  const changed = await tx
    .update(lots)
    .set({ ...change, version: sql`${lots.version} + 1` })
    .where(and(eq(lots.id, id), eq(lots.version, version)))
    .returning({ id: lots.id });
  return changed.length === 1;
}

/** One measuring: all its readings carry the same instant. */
export async function insertReadings(
  tx: Executor,
  measuring: { lotId: string; readings: readonly ThicknessReading[]; by: string; at: Date },
): Promise<void> {
  const { lotId, readings, by, at } = measuring;
  await tx
    .insert(lotReadings)
    .values(readings.map((reading) => ({ ...reading, lotId, measuredBy: by, measuredAt: at })));
}

/** All readings of a lot, the newest measuring first, within it by sheet and as they were taken. */
export async function listLotReadings(executor: Executor, lotId: string): Promise<LotReading[]> {
  return executor
    .select()
    .from(lotReadings)
    .where(eq(lotReadings.lotId, lotId))
    .orderBy(desc(lotReadings.measuredAt), asc(lotReadings.sheet), sql`rowid`);
}

/** Readings of every lot's newest measuring. */
export async function listNewestReadings(executor: Executor): Promise<LotReading[]> {
  const rows = await executor
    .select({ reading: lotReadings })
    .from(lotReadings)
    .innerJoin(lots, and(eq(lots.id, lotReadings.lotId), eq(lots.measuredAt, lotReadings.measuredAt)));
  return rows.map(({ reading }) => reading);
}
