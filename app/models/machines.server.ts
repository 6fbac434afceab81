import { and, asc, count, desc, eq, isNull } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { machines, runs } from "~/db/schema";

export type Machine = typeof machines.$inferSelect;
export type MachineFields = Omit<Machine, "id" | "active" | "version" | "calibration">;

/** Machines in use, by name. */
export async function listMachines(executor: Executor): Promise<Machine[]> {
  return executor.select().from(machines).where(eq(machines.active, true)).orderBy(machines.name);
}

export async function findMachine(executor: Executor, id: string): Promise<Machine | undefined> {
  const [row] = await executor
    .select()
    .from(machines)
    .where(and(eq(machines.id, id), eq(machines.active, true)));
  return row;
}

/** Every machine, retired ones last, by name. */
export async function listAllMachines(executor: Executor): Promise<Machine[]> {
  return executor.select().from(machines).orderBy(desc(machines.active), asc(machines.name));
}

/** A machine, in use or not. */
export async function findAnyMachine(executor: Executor, id: string): Promise<Machine | undefined> {
  const [row] = await executor.select().from(machines).where(eq(machines.id, id));
  return row;
}

export async function findMachineByName(executor: Executor, name: string): Promise<Machine | undefined> {
  const [row] = await executor.select().from(machines).where(eq(machines.name, name));
  return row;
}

export async function insertMachine(tx: Executor, fields: MachineFields): Promise<Machine> {
  const [row] = await tx.insert(machines).values(fields).returning();
  if (!row) throw new Error("The machine was not stored.");
  return row;
}

/** False when somebody else changed it since it was read at `version`. */
export async function changeMachine(
  tx: Executor,
  { id, version, change }: { id: string; version: number; change: Partial<Machine> },
): Promise<boolean> {
  const changed = await tx
    .update(machines)
    .set({ ...change, version: version + 1 })
    .where(and(eq(machines.id, id), eq(machines.version, version)))
    .returning({ id: machines.id });
  return changed.length === 1;
}

/** Runs on a machine's days that are not finished yet. */
export async function countOpenRuns(executor: Executor, machineId: string): Promise<number> {
  const [row] = await executor
    .select({ found: count() })
    .from(runs)
    .where(and(eq(runs.machineId, machineId), isNull(runs.finishedAt)));
  return row?.found ?? 0;
}
