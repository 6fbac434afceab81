import { and, desc, eq, isNotNull, lt } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { checkouts } from "~/db/schema";

export type Checkout = typeof checkouts.$inferSelect;

export interface NewCheckout {
  readonly orderId: string;
  readonly quoteId: string;
  readonly purpose: Checkout["purpose"];
  readonly amount: number;
  readonly currency: string;
  readonly expiresAt: Date;
}

/** False when the order has an open checkout already. */
export async function insertCheckout(tx: Executor, checkout: NewCheckout): Promise<boolean> {
  const inserted = await tx
    .insert(checkouts)
    .values({ ...checkout, status: "open" })
    .onConflictDoNothing()
    .returning({ id: checkouts.id });
  return inserted.length === 1;
}

export async function findOpenCheckout(executor: Executor, orderId: string): Promise<Checkout | undefined> {
  const [row] = await executor
    .select()
    .from(checkouts)
    .where(and(eq(checkouts.orderId, orderId), eq(checkouts.status, "open")));
  return row;
}

export async function findCheckout(
  executor: Executor,
  orderId: string,
  checkoutId: string,
): Promise<Checkout | undefined> {
  const [row] = await executor
    .select()
    .from(checkouts)
    .where(and(eq(checkouts.id, checkoutId), eq(checkouts.orderId, orderId)));
  return row;
}

/** By the payment service's own ids: for what the service tells us, never for what a visitor asks. */
export async function findCheckoutBySession(
  executor: Executor,
  sessionId: string,
): Promise<Checkout | undefined> {
  const [row] = await executor.select().from(checkouts).where(eq(checkouts.sessionId, sessionId));
  return row;
}

export async function findCheckoutByIntent(
  executor: Executor,
  paymentIntent: string,
): Promise<Checkout | undefined> {
  const [row] = await executor.select().from(checkouts).where(eq(checkouts.paymentIntent, paymentIntent));
  return row;
}

/** By the id that we gave the service as metadata. */
export async function findCheckoutById(
  executor: Executor,
  checkoutId: string,
): Promise<Checkout | undefined> {
  const [row] = await executor.select().from(checkouts).where(eq(checkouts.id, checkoutId));
  return row;
}

/** Newest first. */
export async function listCheckouts(executor: Executor, orderId: string): Promise<Checkout[]> {
  return executor
    .select()
    .from(checkouts)
    .where(eq(checkouts.orderId, orderId))
    .orderBy(desc(checkouts.createdAt));
}

/** Open checkouts begun before `before`, oldest first: those whose news may have been lost. */
export async function listOpenCheckouts(
  executor: Executor,
  { before, limit }: { before: Date; limit: number },
): Promise<Checkout[]> {
  return executor
    .select()
    .from(checkouts)
    .where(and(eq(checkouts.status, "open"), lt(checkouts.createdAt, before)))
    .orderBy(checkouts.createdAt)
    .limit(limit);
}

/** Paid through, newest first: what a refund can name. */
export async function listPaidCheckouts(executor: Executor, orderId: string): Promise<Checkout[]> {
  return executor
    .select()
    .from(checkouts)
    .where(
      and(eq(checkouts.orderId, orderId), eq(checkouts.status, "paid"), isNotNull(checkouts.paymentIntent)),
    )
    .orderBy(desc(checkouts.createdAt));
}

export async function attachSession(
  tx: Executor,
  checkoutId: string,
  session: { sessionId: string; url: string | null; expiresAt: Date },
): Promise<void> {
  await tx
    .update(checkouts)
    .set({ ...session, updatedAt: new Date() })
    .where(eq(checkouts.id, checkoutId));
}

/** Paid is final: a checkout that the service says is paid stays so whatever is told later. */
export async function closeCheckout(
  tx: Executor,
  checkoutId: string,
  status: "expired" | "cancelled",
): Promise<boolean> {
  const changed = await tx
    .update(checkouts)
    .set({ status, updatedAt: new Date() })
    .where(and(eq(checkouts.id, checkoutId), eq(checkouts.status, "open")))
    .returning({ id: checkouts.id });
  return changed.length === 1;
}

/** From any status: money that came is money that came. */
export async function markCheckoutPaid(
  tx: Executor,
  checkoutId: string,
  paymentIntent: string,
): Promise<void> {
  await tx
    .update(checkouts)
    .set({ status: "paid", paymentIntent, lastFailure: null, updatedAt: new Date() })
    .where(eq(checkouts.id, checkoutId));
}

export async function noteCheckoutFailure(
  tx: Executor,
  checkoutId: string,
  failure: { paymentIntent: string; message: string },
): Promise<void> {
  await tx
    .update(checkouts)
    .set({ lastFailure: failure.message, paymentIntent: failure.paymentIntent, updatedAt: new Date() })
    .where(and(eq(checkouts.id, checkoutId), eq(checkouts.status, "open")));
}
