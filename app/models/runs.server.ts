import { and, eq, gte, inArray, isNull, lte, max, ne, sql, sum } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { machines, materials, nestSheets, nests, orders, quotes, runs } from "~/db/schema";

export type Run = typeof runs.$inferSelect;

export interface RunPlan {
  readonly sheetId: string;
  readonly machineId: string;
  /** The shop's calendar day, YYYY-MM-DD. */
  readonly day: string;
  readonly plannedMinutes: number;
}

export async function findRun(executor: Executor, runId: string): Promise<Run | undefined> {
  const [row] = await executor.select().from(runs).where(eq(runs.id, runId));
  return row;
}

export async function findRunOfSheet(executor: Executor, sheetId: string): Promise<Run | undefined> {
  const [row] = await executor.select().from(runs).where(eq(runs.sheetId, sheetId));
  return row;
}

/** Runs of the days given, both included, with what lies on the machine, in the order they are cut. */
export async function listRuns(executor: Executor, { from, to }: { from: string; to: string }) {
  return executor
    .select({ run: runs, machine: machines, sheet: nestSheets, nest: nests, material: materials })
    .from(runs)
    .innerJoin(machines, eq(runs.machineId, machines.id))
    .innerJoin(nestSheets, eq(runs.sheetId, nestSheets.id))
    .innerJoin(nests, eq(nestSheets.nestId, nests.id))
    .innerJoin(materials, eq(nests.materialId, materials.id))
    .where(and(gte(runs.day, from), lte(runs.day, to)))
    .orderBy(runs.day, machines.name, runs.sequence);
}

/** Sheets of locked nests that have no run yet. */
export async function listSheetsToSchedule(executor: Executor) {
  return executor
    .select({ sheet: nestSheets, nest: nests, material: materials })
    .from(nestSheets)
    .innerJoin(nests, eq(nestSheets.nestId, nests.id))
    .innerJoin(materials, eq(nests.materialId, materials.id))
    .leftJoin(runs, eq(runs.sheetId, nestSheets.id))
    .where(
      and(inArray(nests.status, ["locked", "cutting"]), eq(nestSheets.status, "planned"), isNull(runs.id)),
    )
    .orderBy(nests.number, nestSheets.number);
}

/** Minutes planned on a machine's day, one sheet's own run left out. */
export async function plannedMinutesOn(
  executor: Executor,
  { machineId, day, exceptSheetId }: { machineId: string; day: string; exceptSheetId: string },
): Promise<number> {
  const [row] = await executor
    .select({ total: sum(runs.plannedMinutes).mapWith(Number) })
    .from(runs)
    .where(and(eq(runs.machineId, machineId), eq(runs.day, day), ne(runs.sheetId, exceptSheetId)));
  return row?.total ?? 0;
}

/** Minutes not yet cut, by day from `from` on: what the promise of a date counts with. */
export async function minutesByDay(executor: Executor, from: string): Promise<Map<string, number>> {
  const rows = await executor
    .select({ day: runs.day, minutes: sum(runs.plannedMinutes).mapWith(Number) })
    .from(runs)
    .where(and(gte(runs.day, from), isNull(runs.finishedAt)))
    .groupBy(runs.day);
  return new Map(rows.map((row) => [row.day, row.minutes ?? 0]));
}

/** Minutes that are paid for and on no machine's day yet: by the quotes of orders not nested, by the sheets of others. */
export async function waitingMinutes(executor: Executor): Promise<number> {
  const [quoted] = await executor
    .select({ minutes: sum(quotes.machineMinutes).mapWith(Number) })
    .from(orders)
    .innerJoin(quotes, eq(orders.quoteId, quotes.id))
    .where(inArray(orders.stage, ["paid", "received"]));
  const [nested] = await executor
    .select({ minutes: sum(nestSheets.estimatedMinutes).mapWith(Number) })
    .from(nestSheets)
    .innerJoin(nests, eq(nestSheets.nestId, nests.id))
    .leftJoin(runs, eq(runs.sheetId, nestSheets.id))
    .where(and(eq(nests.status, "locked"), eq(nestSheets.status, "planned"), isNull(runs.id)));
  return (quoted?.minutes ?? 0) + (nested?.minutes ?? 0);
}

export async function insertRun(tx: Executor, plan: RunPlan): Promise<Run> {
  const [row] = await tx
    .insert(runs)
    .values({ ...plan, sequence: await nextSequence(tx, plan) })
    .returning();
  if (!row) throw new Error("The run was not stored.");
  return row;
}

/** Puts a run that has not begun elsewhere, last of its new day; false when it changed since `version`. */
export async function moveRun(tx: Executor, run: Run, plan: RunPlan): Promise<boolean> {
  const changed = await tx
    .update(runs)
    .set({
      machineId: plan.machineId,
      day: plan.day,
      plannedMinutes: plan.plannedMinutes,
      sequence: await nextSequence(tx, plan),
      version: sql`${runs.version} + 1`,
    })
    .where(and(eq(runs.id, run.id), eq(runs.version, run.version), isNull(runs.startedAt)))
    .returning({ id: runs.id });
  return changed.length === 1;
}

async function nextSequence(tx: Executor, { machineId, day }: RunPlan): Promise<number> {
  const [last] = await tx
    .select({ sequence: max(runs.sequence) })
    .from(runs)
    .where(and(eq(runs.machineId, machineId), eq(runs.day, day)));
  return (last?.sequence ?? 0) + 1;
}

export async function removeRunsOfSheets(tx: Executor, sheetIds: readonly string[]): Promise<void> {
  if (sheetIds.length === 0) return;
  await tx.delete(runs).where(and(inArray(runs.sheetId, [...sheetIds]), isNull(runs.startedAt)));
}

/** False when it began before or changed since `version`. */
export async function markRunStarted(
  tx: Executor,
  start: { runId: string; version: number; at: Date; by: string },
): Promise<boolean> {
  const changed = await tx
    .update(runs)
    .set({ startedAt: start.at, startedBy: start.by, version: sql`${runs.version} + 1` })
    .where(and(eq(runs.id, start.runId), eq(runs.version, start.version), isNull(runs.startedAt)))
    .returning({ id: runs.id });
  return changed.length === 1;
}

/** False when it ended before or changed since `version`. */
export async function markRunFinished(
  tx: Executor,
  finish: { runId: string; version: number; at: Date; actualMinutes: number },
): Promise<boolean> {
  const changed = await tx
    .update(runs)
    .set({ finishedAt: finish.at, actualMinutes: finish.actualMinutes, version: sql`${runs.version} + 1` })
    .where(and(eq(runs.id, finish.runId), eq(runs.version, finish.version), isNull(runs.finishedAt)))
    .returning({ id: runs.id });
  return changed.length === 1;
}

/** Takes back that runs were made: their sheets wait again. */
export async function clearRuns(tx: Executor, runIds: readonly string[]): Promise<void> {
  if (runIds.length === 0) return;
  await tx
    .update(runs)
    .set({
      startedAt: null,
      startedBy: null,
      finishedAt: null,
      actualMinutes: null,
      version: sql`${runs.version} + 1`,
    })
    .where(inArray(runs.id, [...runIds]));
}
