import { asc, eq } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { newId, parts } from "~/db/schema";

export type PartRow = typeof parts.$inferSelect;
type NewPart = Omit<PartRow, "id" | "mirrorOf"> & { mirrorOf?: string | null };

/** SQLite takes a limited number of values in one statement; this many rows stay far below it. */
const ROWS_AT_ONCE = 100;

/** Writes the kinds of part of a frozen revision, in the order given. */
export async function addParts(executor: Executor, added: readonly NewPart[]): Promise<PartRow[]> {
  const written: PartRow[] = [];
  for (let start = 0; start < added.length; start += ROWS_AT_ONCE) {
    const rows = added.slice(start, start + ROWS_AT_ONCE).map((part) => ({ id: newId(), ...part }));
    written.push(...(await executor.insert(parts).values(rows).returning()));
  }
  return written;
}

/** The kinds of part of a revision, in their order. */
export async function listParts(executor: Executor, revisionId: string): Promise<PartRow[]> {
  return executor.select().from(parts).where(eq(parts.revisionId, revisionId)).orderBy(asc(parts.position));
}
