import { and, count, desc, eq, gte, inArray, lt, or, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { orders, quotes } from "~/db/schema";
import type { Stage } from "~/domain/orders";
import type { Order, OrderScope } from "./orders.server";

export interface OrderSearch {
  /** Orders in one of these stages; all when left out. */
  readonly stages?: readonly Stage[] | undefined;
  /** Part of a name or a reference. */
  readonly words?: string | undefined;
  /** From 1. */
  readonly page: number;
  readonly size: number;
}

export interface ListedOrder extends Order {
  /** Of the current quote, null while there is none. */
  readonly quote: {
    readonly total: number;
    readonly currency: string;
    readonly status: (typeof quotes.$inferSelect)["status"];
    readonly expiresAt: Date;
  } | null;
}

/** Orders within the scope, the last changed first, one page of them. */
export async function pageOfOrders(
  executor: Executor,
  scope: OrderScope,
  search: OrderSearch,
): Promise<{ readonly rows: ListedOrder[]; readonly found: number }> {
  const asked = and(within(scope), inStages(search.stages), withWords(search.words));
  const rows = await executor
    .select({ order: orders, quote: quotes })
    .from(orders)
    .leftJoin(quotes, eq(quotes.id, orders.quoteId))
    .where(asked)
    .orderBy(desc(orders.updatedAt), desc(orders.reference))
    .limit(search.size)
    .offset((search.page - 1) * search.size);
  const [counted] = await executor.select({ found: count() }).from(orders).where(asked);
  return { rows: rows.map(listed), found: counted?.found ?? 0 };
}

const listed = ({
  order,
  quote,
}: {
  order: Order;
  quote: typeof quotes.$inferSelect | null;
}): ListedOrder => ({
  ...order,
  quote: quote && {
    total: quote.total,
    currency: quote.currency,
    status: quote.status,
    expiresAt: quote.expiresAt,
  },
});

/** Where a list of orders was left: the last one that was given. */
export interface OrderPlace {
  readonly createdAt: Date;
  readonly id: string;
}

export interface OrderWalk extends Omit<OrderSearch, "page" | "size"> {
  /** Only orders changed at this instant or later. */
  readonly changedSince?: Date | undefined;
  /** Goes on behind this order; begins with the newest when left out. */
  readonly after?: OrderPlace | undefined;
  readonly limit: number;
}

/** Orders within the scope, newest first, from a place on: an order made meanwhile shifts nothing. */
export async function ordersBehind(
  executor: Executor,
  scope: OrderScope,
  walk: OrderWalk,
): Promise<ListedOrder[]> {
  const { after, changedSince } = walk;
  const rows = await executor
    .select({ order: orders, quote: quotes })
    .from(orders)
    .leftJoin(quotes, eq(quotes.id, orders.quoteId))
    .where(
      and(
        within(scope),
        inStages(walk.stages),
        withWords(walk.words),
        changedSince && gte(orders.updatedAt, changedSince),
        after &&
          or(
            lt(orders.createdAt, after.createdAt),
            and(eq(orders.createdAt, after.createdAt), lt(orders.id, after.id)),
          ),
      ),
    )
    .orderBy(desc(orders.createdAt), desc(orders.id))
    .limit(walk.limit);
  return rows.map(listed);
}

/** How many orders within the scope stand in each stage. */
export async function countByStage(
  executor: Executor,
  scope: OrderScope,
): Promise<ReadonlyMap<Stage, number>> {
  const rows = await executor
    .select({ stage: orders.stage, found: count() })
    .from(orders)
    .where(within(scope))
    .groupBy(orders.stage);
  return new Map(rows.map(({ stage, found }) => [stage, found]));
}

const within = (scope: OrderScope) =>
  scope.kind === "staff" ? undefined : eq(orders.builderId, scope.userId);

const inStages = (stages: readonly Stage[] | undefined) =>
  stages === undefined ? undefined : inArray(orders.stage, [...stages]);

/** `%` and `_` in what a person typed are letters like any other. */
function withWords(words: string | undefined) {
  const wanted = words?.trim();
  if (!wanted) return undefined;
  const pattern = `%${wanted.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
  return or(
    sql`${orders.name} like ${pattern} escape '\\'`,
    sql`${orders.reference} like ${pattern} escape '\\'`,
  );
}
