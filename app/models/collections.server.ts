import { desc, eq } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { collections } from "~/db/schema";

export type Collection = typeof collections.$inferSelect;

export async function insertCollection(
  tx: Executor,
  collection: Pick<Collection, "orderId" | "name" | "signatureKey" | "handedBy">,
): Promise<void> {
  await tx.insert(collections).values(collection);
}

/** The newest signature for an order's pile: an earlier one was taken back with its hand-over. */
export async function findCollection(executor: Executor, orderId: string): Promise<Collection | undefined> {
  const [row] = await executor
    .select()
    .from(collections)
    .where(eq(collections.orderId, orderId))
    .orderBy(desc(collections.createdAt))
    .limit(1);
  return row;
}
