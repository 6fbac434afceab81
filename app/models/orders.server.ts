import { and, desc, eq } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { orders } from "~/db/schema";

export type Order = typeof orders.$inferSelect;

/** Whose orders may be seen: a builder's own, or all by staff. */
export type OrderScope = { readonly kind: "builder"; readonly userId: string } | { readonly kind: "staff" };

const within = (scope: OrderScope) =>
  scope.kind === "staff" ? undefined : eq(orders.builderId, scope.userId);

/** Undefined also when the order is outside the scope: it then does not exist for who asks. */
export async function findOrder(
  executor: Executor,
  id: string,
  scope: OrderScope,
): Promise<Order | undefined> {
  const [order] = await executor
    .select()
    .from(orders)
    .where(and(eq(orders.id, id), within(scope)));
  return order;
}

/** Orders within the scope, newest first. */
export async function listOrders(executor: Executor, scope: OrderScope, limit = 200): Promise<Order[]> {
  return executor
    .select()
    .from(orders)
    .where(within(scope))
    .orderBy(desc(orders.createdAt), desc(orders.reference))
    .limit(limit);
}
