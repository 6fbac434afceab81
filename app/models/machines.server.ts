import { and, eq } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { machines } from "~/db/schema";

export type Machine = typeof machines.$inferSelect;

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
