import { and, desc, eq, max } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { priceBookVersions } from "~/db/schema";
import type { PriceBook } from "~/domain/pricing";

export type PriceBookVersion = typeof priceBookVersions.$inferSelect;

/** The published version with the highest number: the one in force. */
export async function findPublishedPriceBook(executor: Executor): Promise<PriceBookVersion | undefined> {
  const [row] = await executor
    .select()
    .from(priceBookVersions)
    .where(eq(priceBookVersions.status, "published"))
    .orderBy(desc(priceBookVersions.number))
    .limit(1);
  return row;
}

export async function findPriceBook(executor: Executor, id: string): Promise<PriceBookVersion | undefined> {
  const [row] = await executor.select().from(priceBookVersions).where(eq(priceBookVersions.id, id));
  return row;
}

/** Every version, the newest first. */
export async function listPriceBooks(executor: Executor): Promise<PriceBookVersion[]> {
  return executor.select().from(priceBookVersions).orderBy(desc(priceBookVersions.number));
}

/** The draft, of which there is one at most. */
export async function findDraftPriceBook(executor: Executor): Promise<PriceBookVersion | undefined> {
  const [row] = await executor
    .select()
    .from(priceBookVersions)
    .where(eq(priceBookVersions.status, "draft"))
    .limit(1);
  return row;
}

/** A draft under the number after the last. */
export async function insertDraftPriceBook(
  tx: Executor,
  draft: { content: PriceBook; note: string | null; by: string },
): Promise<PriceBookVersion> {
  const [last] = await tx.select({ number: max(priceBookVersions.number) }).from(priceBookVersions);
  const { content, note, by } = draft;
  const [row] = await tx
    .insert(priceBookVersions)
    .values({ number: (last?.number ?? 0) + 1, content, note, status: "draft", createdBy: by })
    .returning();
  if (!row) throw new Error("The draft was not stored.");
  return row;
}

/** Changes a version that is still a draft; what was published is never changed. */
export async function changeDraftPriceBook(
  tx: Executor,
  id: string,
  change: { content: PriceBook; note: string | null },
): Promise<void> {
  await tx
    .update(priceBookVersions)
    .set(change)
    .where(and(eq(priceBookVersions.id, id), eq(priceBookVersions.status, "draft")));
}

export async function deleteDraftPriceBook(tx: Executor, id: string): Promise<void> {
  await tx
    .delete(priceBookVersions)
    .where(and(eq(priceBookVersions.id, id), eq(priceBookVersions.status, "draft")));
}

/** The draft comes into force; what was in force before is superseded. */
export async function putDraftInForce(tx: Executor, id: string, at: Date): Promise<void> {
  await tx
    .update(priceBookVersions)
    .set({ status: "superseded" })
    .where(eq(priceBookVersions.status, "published"));
  await tx
    .update(priceBookVersions)
    .set({ status: "published", publishedAt: at })
    .where(and(eq(priceBookVersions.id, id), eq(priceBookVersions.status, "draft")));
}
