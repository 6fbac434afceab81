import { and, desc, eq, inArray, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { newId, type ReadingSummary, readings } from "~/db/schema";

export type Reading = typeof readings.$inferSelect;
export type { ReadingSummary } from "~/db/schema";

/** Where a reading's drawing lies in object storage, gzipped JSON. */
export const readingKey = (fileSha: string, readerVersion: string): string =>
  `readings/${fileSha}-${readerVersion}.json`;

/**
 * Makes the row of a reading that is to be done. False when this version has read the file, or is about to; a
 * failed reading is tried again.
 */
export async function queueReading(
  executor: Executor,
  fileSha: string,
  readerVersion: string,
): Promise<boolean> {
  const queued = await executor
    .insert(readings)
    .values({ id: newId(), fileSha, readerVersion, status: "queued" })
    .onConflictDoUpdate({
      target: [readings.fileSha, readings.readerVersion],
      set: { status: "queued", failure: null, finishedAt: null },
      setWhere: eq(readings.status, "failed"),
    })
    .returning({ id: readings.id });
  return queued.length === 1;
}

/** What the reading came to. */
export type ReadingOutcome =
  | { status: "done"; summary: ReadingSummary; drawingKey: string }
  | { status: "failed"; failure: string };

export async function settleReading(
  executor: Executor,
  fileSha: string,
  readerVersion: string,
  outcome: ReadingOutcome,
  now: Date,
): Promise<void> {
  await executor
    .update(readings)
    .set({ ...outcome, finishedAt: now })
    .where(and(eq(readings.fileSha, fileSha), eq(readings.readerVersion, readerVersion)));
}

/**
 * For each file the reading in force: the given version's, or else the newest earlier one that was done. Files never
 * read are absent.
 */
export async function findReadings(
  executor: Executor,
  fileShas: readonly string[],
  readerVersion: string,
): Promise<Map<string, Reading>> {
  if (fileShas.length === 0) return new Map();
  const rows = await executor
    .select()
    .from(readings)
    .where(inArray(readings.fileSha, [...new Set(fileShas)]))
    .orderBy(sql`${readings.readerVersion} = ${readerVersion} desc`, desc(readings.createdAt));
  const inForce = new Map<string, Reading>();
  for (const row of rows) {
    const best = inForce.get(row.fileSha);
    if (!best || (best.status !== "done" && row.status === "done")) inForce.set(row.fileSha, row);
  }
  return inForce;
}
