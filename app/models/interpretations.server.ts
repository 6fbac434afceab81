import { and, desc, eq, inArray, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { interpretations, newId, rememberedLayers } from "~/db/schema";
import type { FileInterpretation, Interpretation } from "~/domain/orders";

export type InterpretationRow = typeof interpretations.$inferSelect;
export type LayerChoice = FileInterpretation["layers"][number];

/** The interpretation in force until the order is quoted. */
export async function findNewestInterpretation(
  executor: Executor,
  orderId: string,
): Promise<InterpretationRow | undefined> {
  const [row] = await executor
    .select()
    .from(interpretations)
    .where(eq(interpretations.orderId, orderId))
    .orderBy(desc(interpretations.number))
    .limit(1);
  return row;
}

export async function findInterpretation(
  executor: Executor,
  id: string,
): Promise<InterpretationRow | undefined> {
  const [row] = await executor.select().from(interpretations).where(eq(interpretations.id, id));
  return row;
}

/** One of an order's history, by its number. */
export async function findInterpretationNumbered(
  executor: Executor,
  orderId: string,
  number: number,
): Promise<InterpretationRow | undefined> {
  const [row] = await executor
    .select()
    .from(interpretations)
    .where(and(eq(interpretations.orderId, orderId), eq(interpretations.number, number)));
  return row;
}

/** Adds number `after` + 1 to the history. Undefined when somebody else has added it first. */
export async function addInterpretation(
  executor: Executor,
  added: { orderId: string; after: number; content: Interpretation; createdBy: string | null },
): Promise<InterpretationRow | undefined> {
  const { orderId, after, content, createdBy } = added;
  const newest = await findNewestInterpretation(executor, orderId);
  if ((newest?.number ?? 0) !== after) return undefined;
  const [row] = await executor
    .insert(interpretations)
    .values({ id: newId(), orderId, number: after + 1, content, createdBy })
    .onConflictDoNothing({ target: [interpretations.orderId, interpretations.number] })
    .returning();
  return row;
}

/** Notes where the parts found under an interpretation lie. */
export async function setGeometryKey(executor: Executor, id: string, geometryKey: string): Promise<void> {
  await executor.update(interpretations).set({ geometryKey }).where(eq(interpretations.id, id));
}

/** What this person settled for layers of these names before. */
export async function recallLayers(
  executor: Executor,
  userId: string,
  layers: readonly string[],
): Promise<LayerChoice[]> {
  if (layers.length === 0) return [];
  const rows = await executor
    .select({ rule: rememberedLayers.rule })
    .from(rememberedLayers)
    .where(and(eq(rememberedLayers.userId, userId), inArray(rememberedLayers.layer, [...new Set(layers)])));
  return rows.map(({ rule }) => rule);
}

/** Keeps the person's choices by layer name; the latest choice counts. */
export async function rememberLayers(
  executor: Executor,
  userId: string,
  rules: readonly LayerChoice[],
  now: Date,
): Promise<void> {
  const byLayer = new Map(rules.map((rule) => [rule.layer, rule]));
  if (byLayer.size === 0) return;
  await executor
    .insert(rememberedLayers)
    .values([...byLayer.values()].map((rule) => ({ userId, layer: rule.layer, rule, updatedAt: now })))
    .onConflictDoUpdate({
      target: [rememberedLayers.userId, rememberedLayers.layer],
      set: { rule: sql`excluded.rule`, updatedAt: now, confirmed: true },
    });
}
