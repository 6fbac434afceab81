import { and, eq, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { orders } from "~/db/schema";

type Order = typeof orders.$inferSelect;

export type OrderChange = Partial<
  Pick<
    Order,
    | "name"
    | "trial"
    | "stage"
    | "heldFrom"
    | "holdReason"
    | "delivery"
    | "shipTo"
    | "reviewAsked"
    | "reviewedAt"
    | "reviewedBy"
    | "revisionId"
    | "quoteId"
    | "promisedFor"
    | "paidAt"
    | "shippedAt"
    | "cancelledAt"
  >
>;

/**
 * Changes an order that the caller found under its scope, and raises its version. Undefined when somebody changed
 * it since `version` was read.
 */
export async function changeOrder(
  tx: Executor,
  { orderId, version, change }: { orderId: string; version: number; change: OrderChange },
): Promise<Order | undefined> {
  const [row] = await tx
    .update(orders)
    .set({ ...change, version: sql`${orders.version} + 1`, updatedAt: new Date() })
    .where(and(eq(orders.id, orderId), eq(orders.version, version)))
    .returning();
  return row;
}
