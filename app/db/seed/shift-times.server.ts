import { and, asc, eq, inArray, isNotNull, type SQL, sql } from "drizzle-orm";
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

export interface ShiftedTimes {
  readonly orderId: string;
  /** How long ago the order was made; its moves are spread over the time from then until the last of them. */
  readonly days: number;
  readonly until: Date;
  /** When it is promised for; as far back as everything else when null. */
  readonly promisedFor: Date | null;
  readonly now: Date;
}

/**
 * Lays an order's history back, so that a shop made in a minute looks as if it had worked for weeks. For the
 * demonstration only.
 */
export async function shiftOrderTimes(tx: Executor, shifted: ShiftedTimes): Promise<void> {
  const { orderId, days, promisedFor } = shifted;
  const by = days * DAY_MS;
  const earlier = (column: SQLiteColumn): SQL => sql`${column} - ${by}`;
  const promised = promisedFor ?? earlier(orders.promisedFor);
  const moves = await spreadMoves(tx, shifted);
  await tx
    .update(orders)
    .set({
      createdAt: earlier(orders.createdAt),
      updatedAt: moves.last,
      paidAt: moves.at("pay"),
      shippedAt: moves.at("ship"),
      cancelledAt: moves.at("cancel"),
      reviewedAt: moves.at("accept-review"),
      promisedFor: promised,
    })
    .where(eq(orders.id, orderId));
  await tx
    .update(orderDrawings)
    .set({ createdAt: earlier(orderDrawings.createdAt) })
    .where(eq(orderDrawings.orderId, orderId));
  await tx
    .update(revisions)
    .set({ frozenAt: moves.at("quote") ?? earlier(revisions.frozenAt) })
    .where(eq(revisions.orderId, orderId));
  await tx
    .update(quotes)
    .set({
      createdAt: moves.at("quote") ?? earlier(quotes.createdAt),
      acceptedAt: moves.at("pay"),
      expiresAt: earlier(quotes.expiresAt),
      promisedFor: promisedFor ?? earlier(quotes.promisedFor),
    })
    .where(eq(quotes.orderId, orderId));
  await tx
    .update(ledgerEntries)
    .set({ createdAt: moves.at("pay") ?? earlier(ledgerEntries.createdAt) })
    .where(eq(ledgerEntries.orderId, orderId));
  await shiftRuns(tx, orderId, moves.at("cut"));
}

/** Spreads an order's moves evenly over its time, in the order they were made. */
async function spreadMoves(
  tx: Executor,
  { orderId, days, until, now }: ShiftedTimes,
): Promise<{ last: Date; at(act: string): Date | null }> {
  const moves = await tx
    .select({ id: stageMoves.id, act: stageMoves.act })
    .from(stageMoves)
    .where(eq(stageMoves.orderId, orderId))
    .orderBy(asc(stageMoves.createdAt), asc(sql`rowid`));
  let last = new Date(now.getTime() - days * DAY_MS);
  const step = (until.getTime() - last.getTime()) / Math.max(1, moves.length);
  const times = new Map<string, Date>();
  for (const { id, act } of moves) {
    last = new Date(last.getTime() + step);
    times.set(act, last);
    await tx.update(stageMoves).set({ createdAt: last }).where(eq(stageMoves.id, id));
  }
  return { last, at: (act) => times.get(act) ?? null };
}

/** The order's sheets were cut when its pieces were, each as long as was written down. */
async function shiftRuns(tx: Executor, orderId: string, cutAt: Date | null): Promise<void> {
  if (cutAt === null) return;
  const sheets = tx
    .select({ id: nestSheets.id })
    .from(nestSheets)
    .innerJoin(placements, eq(placements.sheetId, nestSheets.id))
    .innerJoin(pieces, eq(pieces.id, placements.pieceId))
    .where(eq(pieces.orderId, orderId));
  await tx
    .update(runs)
    .set({
      finishedAt: cutAt,
      startedAt: sql`${cutAt.getTime()} - cast(${runs.actualMinutes} * 60000 as integer)`,
      day: cutAt.toISOString().slice(0, 10),
    })
    .where(and(inArray(runs.sheetId, sheets), isNotNull(runs.finishedAt)));
}
