import { and, desc, eq, inArray, isNotNull, isNull, max, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { lots, materials, nestSheets, nests, parts, pieces, placements, runs } from "~/db/schema";

export type Nest = typeof nests.$inferSelect;
export type NestSheet = typeof nestSheets.$inferSelect;
export type Placement = typeof placements.$inferSelect;

export interface NewNest {
  readonly materialId: string;
  readonly lotId: string | null;
  /** Millimetres. */
  readonly spacing: number;
  readonly margin: number;
  readonly seed: number;
  readonly createdBy: string;
  readonly sheets: readonly {
    readonly length: number;
    readonly width: number;
    readonly yield: number;
    readonly estimatedMinutes: number;
    readonly placements: readonly { pieceId: string; x: number; y: number; turnDegrees: number }[];
  }[];
}

/** Stores a locked nest with its sheets and placements under the next number. */
export async function insertLockedNest(tx: Executor, nest: NewNest): Promise<Nest> {
  const { sheets, ...fields } = nest;
  const [last] = await tx.select({ number: max(nests.number) }).from(nests);
  const [row] = await tx
    .insert(nests)
    .values({
      ...fields,
      number: (last?.number ?? 0) + 1,
      status: "locked",
      lockedBy: nest.createdBy,
      lockedAt: new Date(),
    })
    .returning();
  if (!row) throw new Error("The nest was not stored.");
  for (const [index, sheet] of sheets.entries()) {
    const [stored] = await tx
      .insert(nestSheets)
      .values({
        nestId: row.id,
        number: index + 1,
        length: sheet.length,
        width: sheet.width,
        yield: sheet.yield,
        estimatedMinutes: sheet.estimatedMinutes,
      })
      .returning();
    if (!stored) throw new Error("The sheet was not stored.");
    if (sheet.placements.length > 0)
      await tx
        .insert(placements)
        .values(sheet.placements.map((placement) => ({ ...placement, sheetId: stored.id })));
  }
  return row;
}

export interface NestContent {
  readonly nest: Nest;
  readonly material: typeof materials.$inferSelect;
  readonly lot: typeof lots.$inferSelect | null;
  readonly sheets: readonly (NestSheet & { readonly placements: readonly PlacedPiece[] })[];
}
export type PlacedPiece = Placement & {
  readonly piece: typeof pieces.$inferSelect;
  readonly part: typeof parts.$inferSelect;
};

export async function findNest(executor: Executor, nestId: string): Promise<Nest | undefined> {
  const [row] = await executor.select().from(nests).where(eq(nests.id, nestId));
  return row;
}

/** With sheets and the placements still on them, released ones left out. */
export async function findNestContent(executor: Executor, nestId: string): Promise<NestContent | undefined> {
  const [head] = await executor
    .select({ nest: nests, material: materials, lot: lots })
    .from(nests)
    .innerJoin(materials, eq(nests.materialId, materials.id))
    .leftJoin(lots, eq(nests.lotId, lots.id))
    .where(eq(nests.id, nestId));
  if (!head) return undefined;
  const sheets = await executor
    .select()
    .from(nestSheets)
    .where(eq(nestSheets.nestId, nestId))
    .orderBy(nestSheets.number);
  const placed = await executor
    .select({ placement: placements, piece: pieces, part: parts })
    .from(placements)
    .innerJoin(nestSheets, eq(placements.sheetId, nestSheets.id))
    .innerJoin(pieces, eq(placements.pieceId, pieces.id))
    .innerJoin(parts, eq(pieces.partId, parts.id))
    .where(and(eq(nestSheets.nestId, nestId), isNull(placements.releasedAt)))
    .orderBy(parts.position, pieces.number);
  return {
    ...head,
    sheets: sheets.map((sheet) => ({
      ...sheet,
      placements: placed
        .filter(({ placement }) => placement.sheetId === sheet.id)
        .map(({ placement, piece, part }) => ({ ...placement, piece, part })),
    })),
  };
}

/** Newest first, with material and the number of sheets and of pieces on them. */
export async function listNests(
  executor: Executor,
  { statuses, limit }: { statuses: readonly Nest["status"][]; limit: number },
) {
  const sheetCount = sql<number>`(select count(*) from ${nestSheets} where ${nestSheets.nestId} = ${nests.id})`;
  const pieceCount = sql<number>`(select count(*) from ${placements} join ${nestSheets} on ${placements.sheetId} = ${nestSheets.id} where ${nestSheets.nestId} = ${nests.id} and ${placements.releasedAt} is null)`;
  return executor
    .select({ nest: nests, material: materials, sheets: sheetCount, pieces: pieceCount })
    .from(nests)
    .innerJoin(materials, eq(nests.materialId, materials.id))
    .where(inArray(nests.status, [...statuses]))
    .orderBy(desc(nests.number))
    .limit(limit);
}

/** Nests that hold pieces of an order, newest first. */
export async function listNestsOfOrder(executor: Executor, orderId: string): Promise<Nest[]> {
  const rows = await executor
    .selectDistinct({ nest: nests })
    .from(nests)
    .innerJoin(nestSheets, eq(nestSheets.nestId, nests.id))
    .innerJoin(placements, eq(placements.sheetId, nestSheets.id))
    .innerJoin(pieces, eq(placements.pieceId, pieces.id))
    .where(and(eq(pieces.orderId, orderId), isNull(placements.releasedAt)))
    .orderBy(desc(nests.number));
  return rows.map((row) => row.nest);
}

export async function findSheet(
  executor: Executor,
  sheetId: string,
): Promise<{ sheet: NestSheet; nest: Nest } | undefined> {
  const [row] = await executor
    .select({ sheet: nestSheets, nest: nests })
    .from(nestSheets)
    .innerJoin(nests, eq(nestSheets.nestId, nests.id))
    .where(eq(nestSheets.id, sheetId));
  return row;
}

export async function listSheets(executor: Executor, nestId: string): Promise<NestSheet[]> {
  return executor.select().from(nestSheets).where(eq(nestSheets.nestId, nestId)).orderBy(nestSheets.number);
}

/** Pieces on a sheet, released ones left out. */
export async function listPiecesOnSheet(
  executor: Executor,
  sheetId: string,
): Promise<(typeof pieces.$inferSelect)[]> {
  const rows = await executor
    .select({ piece: pieces })
    .from(placements)
    .innerJoin(pieces, eq(placements.pieceId, pieces.id))
    .where(and(eq(placements.sheetId, sheetId), isNull(placements.releasedAt)));
  return rows.map((row) => row.piece);
}

/** Ids of the finished runs that cut these pieces. */
export async function listRunsOfPieces(executor: Executor, pieceIds: readonly string[]): Promise<string[]> {
  if (pieceIds.length === 0) return [];
  const rows = await executor
    .selectDistinct({ id: runs.id })
    .from(placements)
    .innerJoin(runs, eq(runs.sheetId, placements.sheetId))
    .where(
      and(
        inArray(placements.pieceId, [...pieceIds]),
        isNull(placements.releasedAt),
        isNotNull(runs.finishedAt),
      ),
    );
  return rows.map((row) => row.id);
}

/** False when somebody changed the nest since `version` was read. */
export async function setNestStatus(
  tx: Executor,
  change: { nestId: string; version: number; status: Nest["status"] },
): Promise<boolean> {
  const changed = await tx
    .update(nests)
    .set({ status: change.status, version: sql`${nests.version} + 1` })
    .where(and(eq(nests.id, change.nestId), eq(nests.version, change.version)))
    .returning({ id: nests.id });
  return changed.length === 1;
}

export async function setSheetStatus(
  tx: Executor,
  sheetId: string,
  status: NestSheet["status"],
): Promise<void> {
  await tx.update(nestSheets).set({ status }).where(eq(nestSheets.id, sheetId));
}

/** Takes pieces off their sheets; the placements stay for the record. */
export async function releasePlacements(tx: Executor, pieceIds: readonly string[]): Promise<void> {
  if (pieceIds.length === 0) return;
  await tx
    .update(placements)
    .set({ releasedAt: new Date() })
    .where(and(inArray(placements.pieceId, [...pieceIds]), isNull(placements.releasedAt)));
}
