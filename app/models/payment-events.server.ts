import { and, eq, isNull, lt, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { paymentEvents } from "~/db/schema";

export type PaymentEvent = typeof paymentEvents.$inferSelect;

export interface NewPaymentEvent {
  readonly id: string;
  readonly type: string;
  readonly objectId: string;
  readonly payload: Record<string, unknown>;
}

/** False when the event was stored before. */
export async function storePaymentEvent(tx: Executor, event: NewPaymentEvent): Promise<boolean> {
  const inserted = await tx
    .insert(paymentEvents)
    .values(event)
    .onConflictDoNothing({ target: paymentEvents.id })
    .returning({ id: paymentEvents.id });
  return inserted.length === 1;
}

export async function findPaymentEvent(executor: Executor, id: string): Promise<PaymentEvent | undefined> {
  const [row] = await executor.select().from(paymentEvents).where(eq(paymentEvents.id, id));
  return row;
}

/** Stored but not applied, oldest first, left alone after `maxAttempts`. */
export async function listUnappliedEvents(
  executor: Executor,
  { maxAttempts, limit }: { maxAttempts: number; limit: number },
): Promise<PaymentEvent[]> {
  return executor
    .select()
    .from(paymentEvents)
    .where(and(isNull(paymentEvents.appliedAt), lt(paymentEvents.attempts, maxAttempts)))
    .orderBy(paymentEvents.receivedAt)
    .limit(limit);
}

export async function markEventApplied(tx: Executor, id: string, outcome: string): Promise<void> {
  await tx
    .update(paymentEvents)
    .set({ appliedAt: new Date(), outcome, attempts: sql`${paymentEvents.attempts} + 1` })
    .where(and(eq(paymentEvents.id, id), isNull(paymentEvents.appliedAt)));
}

export async function markEventFailed(tx: Executor, id: string, outcome: string): Promise<void> {
  await tx
    .update(paymentEvents)
    .set({ outcome, attempts: sql`${paymentEvents.attempts} + 1` })
    .where(and(eq(paymentEvents.id, id), isNull(paymentEvents.appliedAt)));
}
