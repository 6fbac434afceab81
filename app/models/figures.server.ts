import { and, count, desc, eq, isNotNull, sql, sum } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { machines, nestSheets, nests, orders, pieces, refunds, runs } from "~/db/schema";

/** A sheet's finished run: what it was planned with and what it took. Minutes. */
export interface FinishedRun {
  readonly id: string;
  readonly machine: string;
  readonly nestId: string;
  readonly nest: number;
  readonly sheet: number;
  readonly day: string;
  readonly plannedMinutes: number;
  readonly actualMinutes: number;
}

/** Finished runs, the last cut first. */
export async function listFinishedRuns(executor: Executor): Promise<FinishedRun[]> {
  const rows = await executor
    .select({
      id: runs.id,
      machine: machines.name,
      nestId: nests.id,
      nest: nests.number,
      sheet: nestSheets.number,
      day: runs.day,
      plannedMinutes: runs.plannedMinutes,
      actualMinutes: sql<number>`coalesce(${runs.actualMinutes}, 0)`.mapWith(Number),
    })
    .from(runs)
    .innerJoin(machines, eq(machines.id, runs.machineId))
    .innerJoin(nestSheets, eq(nestSheets.id, runs.sheetId))
    .innerJoin(nests, eq(nests.id, nestSheets.nestId))
    .where(and(isNotNull(runs.finishedAt), isNotNull(runs.actualMinutes)))
    .orderBy(desc(runs.finishedAt), desc(runs.id));
  return rows;
}

/** Orders that have left the shop and were promised for a day. */
export async function listShippedDates(
  executor: Executor,
): Promise<{ readonly shippedAt: Date; readonly promisedFor: Date }[]> {
  const rows = await executor
    .select({ shippedAt: orders.shippedAt, promisedFor: orders.promisedFor })
    .from(orders)
    .where(and(eq(orders.stage, "shipped"), isNotNull(orders.shippedAt), isNotNull(orders.promisedFor)));
  return rows.flatMap(({ shippedAt, promisedFor }) =>
    shippedAt && promisedFor ? [{ shippedAt, promisedFor }] : [],
  );
}

/** Pieces cut again, by cause and who pays, the most first. */
export async function countRemakes(executor: Executor) {
  return executor
    .select({ cause: pieces.cause, payer: pieces.payer, found: count() })
    .from(pieces)
    .where(isNotNull(pieces.remakeOf))
    .groupBy(pieces.cause, pieces.payer)
    .orderBy(desc(count()), pieces.cause);
}

/** Money given back, by reason: how many times and how many cents, the most first. */
export async function sumRefunds(executor: Executor) {
  const amount = sum(refunds.amount).mapWith(Number);
  return executor
    .select({ reason: refunds.reason, found: count(), amount })
    .from(refunds)
    .where(eq(refunds.status, "done"))
    .groupBy(refunds.reason)
    .orderBy(desc(amount));
}
