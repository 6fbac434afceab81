import { and, eq, inArray, sum } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { refunds } from "~/db/schema";

export type Refund = typeof refunds.$inferSelect;

export interface NewRefund {
  /** As the form made it; a new one when there was no form. */
  readonly id?: string;
  readonly orderId: string;
  readonly checkoutId: string;
  readonly amount: number;
  readonly reason: string;
  readonly askedBy: string;
  /** Known from the start when the payment service made it by itself. */
  readonly externalId?: string;
}

/** False when this refund was asked for before. */
export async function insertRefund(tx: Executor, refund: NewRefund): Promise<boolean> {
  const inserted = await tx
    .insert(refunds)
    .values({ ...refund, status: "asked" })
    .onConflictDoNothing({ target: refunds.id })
    .returning({ id: refunds.id });
  return inserted.length === 1;
}

export async function findRefund(
  executor: Executor,
  orderId: string,
  refundId: string,
): Promise<Refund | undefined> {
  const [row] = await executor
    .select()
    .from(refunds)
    .where(and(eq(refunds.id, refundId), eq(refunds.orderId, orderId)));
  return row;
}

/** Cents asked back or given back through a checkout; failed ones do not count. */
export async function refundedThrough(executor: Executor, checkoutId: string): Promise<number> {
  const [row] = await executor
    .select({ total: sum(refunds.amount).mapWith(Number) })
    .from(refunds)
    .where(and(eq(refunds.checkoutId, checkoutId), inArray(refunds.status, ["asked", "done"])));
  return row?.total ?? 0;
}

/** Oldest first. */
export async function listRefunds(executor: Executor, orderId: string): Promise<Refund[]> {
  return executor.select().from(refunds).where(eq(refunds.orderId, orderId)).orderBy(refunds.createdAt);
}

/** By our id, which the service carries as metadata, or by the service's own. */
export async function findRefundTold(
  executor: Executor,
  told: { refundId: string | null; externalId: string },
): Promise<Refund | undefined> {
  const [known] = await executor.select().from(refunds).where(eq(refunds.externalId, told.externalId));
  if (known || told.refundId === null) return known;
  const [asked] = await executor.select().from(refunds).where(eq(refunds.id, told.refundId));
  return asked;
}

/** Asked of the service without an answer yet. */
export async function listAskedRefunds(executor: Executor, limit: number): Promise<Refund[]> {
  return executor
    .select()
    .from(refunds)
    .where(eq(refunds.status, "asked"))
    .orderBy(refunds.createdAt)
    .limit(limit);
}

export async function settleRefund(
  tx: Executor,
  refundId: string,
  outcome: { status: "done" | "failed"; externalId?: string },
): Promise<void> {
  await tx.update(refunds).set(outcome).where(eq(refunds.id, refundId));
}
