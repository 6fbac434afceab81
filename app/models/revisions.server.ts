import { and, desc, eq } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { newId, revisions } from "~/db/schema";

export type Revision = typeof revisions.$inferSelect;
type NewRevision = Pick<Revision, "orderId" | "interpretationId" | "files" | "geometryKey"> &
  Partial<Pick<Revision, "derivedFrom" | "derivation" | "frozenBy">>;

/** Freezes drawings, readings and interpretation under the order's next revision number. */
export async function freezeRevision(executor: Executor, frozen: NewRevision): Promise<Revision> {
  const newest = await findNewestRevision(executor, frozen.orderId);
  const [row] = await executor
    .insert(revisions)
    .values({ id: newId(), ...frozen, number: (newest?.number ?? 0) + 1 })
    .returning();
  if (!row) throw new Error("The revision was not written.");
  return row;
}

export async function findRevision(
  executor: Executor,
  orderId: string,
  id: string,
): Promise<Revision | undefined> {
  const [row] = await executor
    .select()
    .from(revisions)
    .where(and(eq(revisions.orderId, orderId), eq(revisions.id, id)));
  return row;
}

export async function findNewestRevision(executor: Executor, orderId: string): Promise<Revision | undefined> {
  const [row] = await executor
    .select()
    .from(revisions)
    .where(eq(revisions.orderId, orderId))
    .orderBy(desc(revisions.number))
    .limit(1);
  return row;
}
