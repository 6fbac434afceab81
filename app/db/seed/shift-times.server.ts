import { eq, inArray, type SQL, sql } from "drizzle-orm";
import type { SQLiteColumn } from "drizzle-orm/sqlite-core";
import type { Executor } from "../client.server";
import {
  ledgerEntries,
  nestSheets,
  orderDrawings,
  orders,
  pieces,
  placements,
  quotes,
  revisions,
  runs,
  stageMoves,
} from "../schema";

const DAY_MS = 24 * 60 * 60_000;

/**
 * Lays an order's history back by whole days, so that a shop made in a minute looks as if it had worked for weeks.
 * For the demonstration only.
 */
export async function shiftOrderTimes(tx: Executor, orderId: string, days: number): Promise<void> {
  const by = days * DAY_MS;
  if (by === 0) return;
  const earlier = (column: SQLiteColumn): SQL => sql`${column} - ${by}`;
  await tx
    .update(orders)
    .set({
      createdAt: earlier(orders.createdAt),
      updatedAt: earlier(orders.updatedAt),
      paidAt: earlier(orders.paidAt),
      shippedAt: earlier(orders.shippedAt),
      cancelledAt: earlier(orders.cancelledAt),
      reviewedAt: earlier(orders.reviewedAt),
      promisedFor: earlier(orders.promisedFor),
    })
    .where(eq(orders.id, orderId));
  await tx
    .update(stageMoves)
    .set({ createdAt: earlier(stageMoves.createdAt) })
    .where(eq(stageMoves.orderId, orderId));
  await tx
    .update(orderDrawings)
    .set({ createdAt: earlier(orderDrawings.createdAt) })
    .where(eq(orderDrawings.orderId, orderId));
  await tx
    .update(revisions)
    .set({ frozenAt: earlier(revisions.frozenAt) })
    .where(eq(revisions.orderId, orderId));
  await tx
    .update(quotes)
    .set({
      createdAt: earlier(quotes.createdAt),
      acceptedAt: earlier(quotes.acceptedAt),
      expiresAt: earlier(quotes.expiresAt),
      promisedFor: earlier(quotes.promisedFor),
    })
    .where(eq(quotes.orderId, orderId));
  await tx
    .update(ledgerEntries)
    .set({ createdAt: earlier(ledgerEntries.createdAt) })
    .where(eq(ledgerEntries.orderId, orderId));
  const sheets = tx
    .select({ id: nestSheets.id })
    .from(nestSheets)
    .innerJoin(placements, eq(placements.sheetId, nestSheets.id))
    .innerJoin(pieces, eq(pieces.id, placements.pieceId))
    .where(eq(pieces.orderId, orderId));
  await tx
    .update(runs)
    .set({ startedAt: earlier(runs.startedAt), finishedAt: earlier(runs.finishedAt) })
    .where(inArray(runs.sheetId, sheets));
}
