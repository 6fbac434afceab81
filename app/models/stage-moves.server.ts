import { and, desc, eq, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { stageMoves } from "~/db/schema";

export type StageMove = typeof stageMoves.$inferSelect;
export type NewStageMove = Omit<typeof stageMoves.$inferInsert, "id" | "createdAt">;

/** False when the same request moved before. */
export async function insertStageMove(tx: Executor, move: NewStageMove): Promise<boolean> {
  const inserted = await tx
    .insert(stageMoves)
    .values(move)
    .onConflictDoNothing({ target: [stageMoves.orderId, stageMoves.requestId] })
    .returning({ id: stageMoves.id });
  return inserted.length === 1;
}

/** Oldest first. */
export async function listStageMoves(executor: Executor, orderId: string): Promise<StageMove[]> {
  return executor
    .select()
    .from(stageMoves)
    .where(eq(stageMoves.orderId, orderId))
    .orderBy(stageMoves.createdAt, sql`rowid`);
}

export async function findMoveByRequest(
  executor: Executor,
  orderId: string,
  requestId: string,
): Promise<StageMove | undefined> {
  const [row] = await executor
    .select()
    .from(stageMoves)
    .where(and(eq(stageMoves.orderId, orderId), eq(stageMoves.requestId, requestId)));
  return row;
}

/** Newest first: an undo looks for the last one that has not been taken back. */
export async function listMovesBackwards(executor: Executor, orderId: string): Promise<StageMove[]> {
  return executor
    .select()
    .from(stageMoves)
    .where(eq(stageMoves.orderId, orderId))
    .orderBy(desc(stageMoves.createdAt), sql`rowid desc`);
}

/** What one request moved, on however many orders. */
export async function listMovesByRequest(executor: Executor, requestId: string): Promise<StageMove[]> {
  return executor.select().from(stageMoves).where(eq(stageMoves.requestId, requestId)).orderBy(sql`rowid`);
}
