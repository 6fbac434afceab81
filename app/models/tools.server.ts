import { and, asc, desc, eq } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { tools } from "~/db/schema";

export type Tool = typeof tools.$inferSelect;
export type ToolFields = Omit<Tool, "id" | "active" | "version">;

/** Every tool, retired ones last, by its number in the changer. */
export async function listTools(executor: Executor): Promise<Tool[]> {
  return executor.select().from(tools).orderBy(desc(tools.active), asc(tools.number));
}

export async function findTool(executor: Executor, id: string): Promise<Tool | undefined> {
  const [row] = await executor.select().from(tools).where(eq(tools.id, id));
  return row;
}

export async function findToolByNumber(executor: Executor, number: number): Promise<Tool | undefined> {
  const [row] = await executor.select().from(tools).where(eq(tools.number, number));
  return row;
}

export async function insertTool(tx: Executor, fields: ToolFields): Promise<Tool> {
  const [row] = await tx.insert(tools).values(fields).returning();
  if (!row) throw new Error("The tool was not stored.");
  return row;
}

/** False when somebody else changed it since it was read at `version`. */
export async function changeTool(
  tx: Executor,
  { id, version, change }: { id: string; version: number; change: Partial<Tool> },
): Promise<boolean> {
  const changed = await tx
    .update(tools)
    .set({ ...change, version: version + 1 })
    .where(and(eq(tools.id, id), eq(tools.version, version)))
    .returning({ id: tools.id });
  return changed.length === 1;
}
