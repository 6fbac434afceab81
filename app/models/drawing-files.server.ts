import { and, asc, eq, inArray, isNull, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { drawingFiles, newId, orderDrawings } from "~/db/schema";

export type OrderDrawing = typeof orderDrawings.$inferSelect;

/** Where a file's original bytes lie in object storage. */
export const drawingKey = (sha256: string): string => `drawings/${sha256}`;

/** Notes that the bytes of a file are kept; a file that was erased once and is given again is kept again. */
export async function keepFile(executor: Executor, file: { sha256: string; size: number }): Promise<void> {
  await executor
    .insert(drawingFiles)
    .values(file)
    .onConflictDoUpdate({ target: drawingFiles.sha256, set: { erasedAt: null } });
}

/** Whether the bytes are kept already. */
export async function isFileKept(executor: Executor, sha256: string): Promise<boolean> {
  const [file] = await executor
    .select({ sha256: drawingFiles.sha256 })
    .from(drawingFiles)
    .where(and(eq(drawingFiles.sha256, sha256), isNull(drawingFiles.erasedAt)));
  return file !== undefined;
}

/** Lays a file into an order, after those that lie there. The same file again is the drawing that is there already. */
export async function addDrawing(
  executor: Executor,
  drawing: { orderId: string; fileSha: string; fileName: string; uploadedBy: string },
): Promise<{ id: string; added: boolean }> {
  const { orderId, fileSha } = drawing;
  const [present] = await executor
    .select({ id: orderDrawings.id })
    .from(orderDrawings)
    .where(
      and(
        eq(orderDrawings.orderId, orderId),
        eq(orderDrawings.fileSha, fileSha),
        isNull(orderDrawings.removedAt),
      ),
    );
  if (present) return { id: present.id, added: false };
  const id = newId();
  const position = sql<number>`(select coalesce(max(${orderDrawings.position}), 0) + 1 from ${orderDrawings} where ${orderDrawings.orderId} = ${orderId})`;
  await executor.insert(orderDrawings).values({ id, ...drawing, position });
  return { id, added: true };
}

/** The drawings of an order that are not taken out, in their order of upload. */
export async function listDrawings(executor: Executor, orderId: string): Promise<OrderDrawing[]> {
  return executor
    .select()
    .from(orderDrawings)
    .where(and(eq(orderDrawings.orderId, orderId), isNull(orderDrawings.removedAt)))
    .orderBy(asc(orderDrawings.position));
}

/** Bytes of each file, by its hash. */
export async function findFileSizes(
  executor: Executor,
  shas: readonly string[],
): Promise<ReadonlyMap<string, number>> {
  if (shas.length === 0) return new Map();
  const rows = await executor
    .select({ sha256: drawingFiles.sha256, size: drawingFiles.size })
    .from(drawingFiles)
    .where(inArray(drawingFiles.sha256, [...new Set(shas)]));
  return new Map(rows.map(({ sha256, size }) => [sha256, size]));
}

/** One drawing of an order, also when it was taken out since: its quote or revision may still name it. */
export async function findDrawing(
  executor: Executor,
  orderId: string,
  drawingId: string,
): Promise<OrderDrawing | undefined> {
  const [drawing] = await executor
    .select()
    .from(orderDrawings)
    .where(and(eq(orderDrawings.orderId, orderId), eq(orderDrawings.id, drawingId)));
  return drawing;
}

/** Takes a drawing out of the order; its bytes stay. False when it was not there. */
export async function removeDrawing(
  executor: Executor,
  orderId: string,
  drawingId: string,
  now: Date,
): Promise<boolean> {
  const removed = await executor
    .update(orderDrawings)
    .set({ removedAt: now })
    .where(
      and(
        eq(orderDrawings.orderId, orderId),
        eq(orderDrawings.id, drawingId),
        isNull(orderDrawings.removedAt),
      ),
    )
    .returning({ id: orderDrawings.id });
  return removed.length === 1;
}

/** Whether all these files lie, or once lay, in the order. */
export async function holdsFiles(
  executor: Executor,
  orderId: string,
  shas: readonly string[],
): Promise<boolean> {
  const wanted = [...new Set(shas)];
  const held = await executor
    .selectDistinct({ sha: orderDrawings.fileSha })
    .from(orderDrawings)
    .where(and(eq(orderDrawings.orderId, orderId), inArray(orderDrawings.fileSha, wanted)));
  return held.length === wanted.length;
}

/** Orders that a file lies in now. */
export async function ordersWithFile(executor: Executor, sha256: string): Promise<string[]> {
  const rows = await executor
    .selectDistinct({ orderId: orderDrawings.orderId })
    .from(orderDrawings)
    .where(and(eq(orderDrawings.fileSha, sha256), isNull(orderDrawings.removedAt)));
  return rows.map(({ orderId }) => orderId);
}
