import { and, eq, sql, sum } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { ledgerEntries } from "~/db/schema";

export type LedgerEntry = typeof ledgerEntries.$inferSelect;

export interface NewLedgerEntry {
  readonly orderId: string;
  readonly kind: LedgerEntry["kind"];
  /** Integer cents: debts and refunds positive, payments and released debts negative. */
  readonly amount: number;
  readonly currency: string;
  readonly quoteId?: string | null;
  readonly checkoutId?: string | null;
  readonly externalId?: string | null;
  readonly note?: string | null;
  readonly actorId?: string | null;
}

/** False when the same outside thing was entered before: nothing is entered twice. */
export async function enterLedger(tx: Executor, entry: NewLedgerEntry): Promise<boolean> {
  const inserted = await tx
    .insert(ledgerEntries)
    .values(entry)
    .onConflictDoNothing({ target: [ledgerEntries.kind, ledgerEntries.externalId] })
    .returning({ id: ledgerEntries.id });
  return inserted.length === 1;
}

export async function listLedger(executor: Executor, orderId: string): Promise<LedgerEntry[]> {
  return executor
    .select()
    .from(ledgerEntries)
    .where(eq(ledgerEntries.orderId, orderId))
    .orderBy(ledgerEntries.createdAt, sql`rowid`);
}

/** Cents still owed on one quote; below zero when more was paid than owed. */
export async function owedOnQuote(executor: Executor, orderId: string, quoteId: string): Promise<number> {
  const [row] = await executor
    .select({ total: sum(ledgerEntries.amount).mapWith(Number) })
    .from(ledgerEntries)
    .where(and(eq(ledgerEntries.orderId, orderId), eq(ledgerEntries.quoteId, quoteId)));
  return row?.total ?? 0;
}

/** Cents paid through one checkout and not yet given back. */
export async function keptFromCheckout(
  executor: Executor,
  orderId: string,
  checkoutId: string,
): Promise<number> {
  const entries = await executor
    .select({ kind: ledgerEntries.kind, amount: ledgerEntries.amount })
    .from(ledgerEntries)
    .where(and(eq(ledgerEntries.orderId, orderId), eq(ledgerEntries.checkoutId, checkoutId)));
  return -entries
    .filter((entry) => entry.kind === "payment" || entry.kind === "refund")
    .reduce((total, entry) => total + entry.amount, 0);
}
