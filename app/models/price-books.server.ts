import { desc, eq } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { priceBookVersions } from "~/db/schema";

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
