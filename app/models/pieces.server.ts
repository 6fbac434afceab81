import { and, eq, inArray, ne, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { orders, parts, pieces, stockGroups } from "~/db/schema";
import type { PieceStage } from "~/domain/orders";

export type Piece = typeof pieces.$inferSelect;
export type PieceWithPart = Piece & { readonly part: typeof parts.$inferSelect };

export type NewPiece = Pick<Piece, "orderId" | "partId" | "stockGroupId" | "number" | "of" | "stage"> &
  Partial<Pick<Piece, "remakeOf" | "cause" | "payer">>;

/** SQLite takes at most 32,766 bound values in a statement; a row here has about twelve. */
const ROWS_AT_ONCE = 500;

export async function insertPieces(tx: Executor, rows: readonly NewPiece[]): Promise<void> {
  for (let at = 0; at < rows.length; at += ROWS_AT_ONCE)
    await tx.insert(pieces).values(rows.slice(at, at + ROWS_AT_ONCE));
}

/** An order's pieces with their parts, by the part list's order and number. */
export async function listPieces(executor: Executor, orderId: string): Promise<PieceWithPart[]> {
  const rows = await executor
    .select({ piece: pieces, part: parts })
    .from(pieces)
    .innerJoin(parts, eq(pieces.partId, parts.id))
    .where(eq(pieces.orderId, orderId))
    .orderBy(parts.position, pieces.number, sql`${pieces}.rowid`);
  return rows.map(({ piece, part }) => ({ ...piece, part }));
}

/** Good pieces of the shop's live orders on one material that wait for a nest, earliest promise first. */
export async function listPiecesToNest(
  executor: Executor,
  { materialId, orderId }: { materialId?: string; orderId?: string },
): Promise<(PieceWithPart & { readonly materialId: string; readonly lotId: string | null })[]> {
  const rows = await executor
    .select({ piece: pieces, part: parts, materialId: stockGroups.materialId, lotId: stockGroups.lotId })
    .from(pieces)
    .innerJoin(parts, eq(pieces.partId, parts.id))
    .innerJoin(stockGroups, eq(pieces.stockGroupId, stockGroups.id))
    .innerJoin(orders, eq(pieces.orderId, orders.id))
    .where(
      and(
        eq(pieces.stage, "received"),
        eq(pieces.state, "good"),
        inArray(orders.stage, ["received", "nested", "cut", "tabs-removed"]),
        materialId === undefined ? undefined : eq(stockGroups.materialId, materialId),
        orderId === undefined ? undefined : eq(pieces.orderId, orderId),
      ),
    )
    .orderBy(orders.promisedFor, parts.position, pieces.number);
  return rows.map(({ piece, part, ...stock }) => ({ ...piece, part, ...stock }));
}

/** Moves those of the pieces that still stand at `from` and are good; gives how many moved. */
export async function movePieces(
  tx: Executor,
  move: { ids: readonly string[]; from: PieceStage; to: PieceStage },
): Promise<number> {
  if (move.ids.length === 0) return 0;
  const moved = await tx
    .update(pieces)
    .set({ stage: move.to, version: sql`${pieces.version} + 1`, updatedAt: new Date() })
    .where(and(inArray(pieces.id, [...move.ids]), eq(pieces.stage, move.from), eq(pieces.state, "good")))
    .returning({ id: pieces.id });
  return moved.length;
}

/** Takes a good piece out of the count; false when it was out already. */
export async function losePiece(
  tx: Executor,
  pieceId: string,
  state: "spoiled" | "missing",
): Promise<boolean> {
  const changed = await tx
    .update(pieces)
    .set({ state, version: sql`${pieces.version} + 1`, updatedAt: new Date() })
    .where(and(eq(pieces.id, pieceId), eq(pieces.state, "good")))
    .returning({ id: pieces.id });
  return changed.length === 1;
}

/** The order is cancelled: nothing more is made of it. */
export async function cancelPieces(tx: Executor, orderId: string): Promise<void> {
  await tx
    .update(pieces)
    .set({ state: "cancelled", version: sql`${pieces.version} + 1`, updatedAt: new Date() })
    .where(and(eq(pieces.orderId, orderId), eq(pieces.state, "good"), ne(pieces.stage, "shipped")));
}

/** Takes the pieces of an order back out of the shop: its receiving was a mistake. */
export async function removePieces(tx: Executor, orderId: string): Promise<void> {
  await tx.delete(pieces).where(eq(pieces.orderId, orderId));
}

export async function setParcel(
  tx: Executor,
  pieceIds: readonly string[],
  parcelId: string | null,
): Promise<void> {
  if (pieceIds.length === 0) return;
  await tx
    .update(pieces)
    .set({ parcelId, updatedAt: new Date() })
    .where(inArray(pieces.id, [...pieceIds]));
}

/** Puts every piece of an order out of its parcel. */
export async function clearParcels(tx: Executor, orderId: string): Promise<void> {
  await tx.update(pieces).set({ parcelId: null, updatedAt: new Date() }).where(eq(pieces.orderId, orderId));
}

/** Marks pieces of an order counted, or not counted after all. */
export async function setCounted(
  tx: Executor,
  count: { orderId: string; ids: readonly string[]; at: Date | null; by: string | null },
): Promise<void> {
  if (count.ids.length === 0) return;
  await tx
    .update(pieces)
    .set({ countedAt: count.at, countedBy: count.by, updatedAt: new Date() })
    .where(and(eq(pieces.orderId, count.orderId), inArray(pieces.id, [...count.ids])));
}

/** The piece whose label carries this code; any order's, for the shop's people. */
export async function findPieceByCode(executor: Executor, code: string): Promise<Piece | undefined> {
  const [row] = await executor.select().from(pieces).where(eq(pieces.code, code));
  return row;
}

/** Pieces by their ids, of whichever orders, with their parts. */
export async function listPiecesById(executor: Executor, ids: readonly string[]): Promise<PieceWithPart[]> {
  if (ids.length === 0) return [];
  const rows = await executor
    .select({ piece: pieces, part: parts })
    .from(pieces)
    .innerJoin(parts, eq(pieces.partId, parts.id))
    .where(inArray(pieces.id, [...ids]))
    .orderBy(pieces.orderId, parts.position, pieces.number);
  return rows.map(({ piece, part }) => ({ ...piece, part }));
}
