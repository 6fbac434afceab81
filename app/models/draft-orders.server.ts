import { sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { newId, orderNumbers, orders } from "~/db/schema";

/** The first order is KP-2001: a number that can be said on the telephone, not a count of orders. */
const FIRST_NUMBER = 2001;

/** Starts an order of a builder under the next reference; in the transaction that gives it its first drawing. */
export async function createDraftOrder(
  tx: Executor,
  order: { builderId: string; name: string },
): Promise<{ id: string; reference: string }> {
  const [taken] = await tx
    .insert(orderNumbers)
    .values({ next: FIRST_NUMBER + 1 })
    .onConflictDoUpdate({ target: orderNumbers.id, set: { next: sql`${orderNumbers.next} + 1` } })
    .returning({ next: orderNumbers.next });
  if (!taken) throw new Error("No order number was given.");
  const id = newId();
  const reference = `KP-${taken.next - 1}`;
  await tx.insert(orders).values({ id, reference, stage: "draft", ...order });
  return { id, reference };
}
