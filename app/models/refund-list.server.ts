import { count, desc, eq, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { ledgerEntries, orders, refunds, users } from "~/db/schema";
import type { Refund } from "./refunds.server";

export interface ListedRefund extends Refund {
  readonly reference: string;
  readonly orderName: string;
  readonly builder: string;
}

/** Refunds of all orders, newest first, one page of them. */
export async function pageOfRefunds(
  executor: Executor,
  { page, size }: { readonly page: number; readonly size: number },
): Promise<{ readonly rows: ListedRefund[]; readonly found: number }> {
  const rows = await executor
    .select({ refund: refunds, reference: orders.reference, orderName: orders.name, builder: users.name })
    .from(refunds)
    .innerJoin(orders, eq(orders.id, refunds.orderId))
    .innerJoin(users, eq(users.id, orders.builderId))
    .orderBy(desc(refunds.createdAt), desc(refunds.id))
    .limit(size)
    .offset((page - 1) * size);
  const [counted] = await executor.select({ found: count() }).from(refunds);
  return {
    found: counted?.found ?? 0,
    rows: rows.map(({ refund, ...facts }) => ({ ...refund, ...facts })),
  };
}

/** Orders whose ledger says that more was paid than is owed: money to give back, in cents, the most first. */
export async function listOverpaid(executor: Executor, limit: number) {
  const over = sql<number>`-sum(${ledgerEntries.amount})`.mapWith(Number);
  return executor
    .select({
      orderId: orders.id,
      reference: orders.reference,
      name: orders.name,
      stage: orders.stage,
      currency: ledgerEntries.currency,
      over,
    })
    .from(ledgerEntries)
    .innerJoin(orders, eq(orders.id, ledgerEntries.orderId))
    .groupBy(orders.id)
    .having(sql`sum(${ledgerEntries.amount}) < 0`)
    .orderBy(desc(over))
    .limit(limit);
}

/** What came in and what went back over all orders, in cents. */
export async function ledgerTotals(executor: Executor): Promise<{ paid: number; refunded: number }> {
  const [row] = await executor
    .select({
      paid: sql<number>`coalesce(-sum(case when ${ledgerEntries.kind} = 'payment' then ${ledgerEntries.amount} end), 0)`,
      refunded: sql<number>`coalesce(sum(case when ${ledgerEntries.kind} = 'refund' then ${ledgerEntries.amount} end), 0)`,
    })
    .from(ledgerEntries);
  return { paid: row?.paid ?? 0, refunded: row?.refunded ?? 0 };
}
