import { and, eq, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { settings } from "~/db/schema";
import type { ShopSettings } from "~/domain/orders";

export interface CurrentSettings {
  readonly content: ShopSettings;
  readonly version: number;
}

/** The owner's settings, undefined while the shop is not set up. */
export async function findSettings(executor: Executor): Promise<CurrentSettings | undefined> {
  const [row] = await executor
    .select({ content: settings.content, version: settings.version })
    .from(settings);
  return row;
}

/** The owner's settings. Throws while the shop is not set up. */
export async function currentSettings(executor: Executor): Promise<ShopSettings> {
  const found = await findSettings(executor);
  if (!found) throw new Error("The shop is not set up: there are no settings.");
  return found.content;
}

/** Writes the first settings. */
export async function insertSettings(executor: Executor, content: ShopSettings): Promise<void> {
  await executor.insert(settings).values({ content });
}

/** Changes the settings that were read at `version`. False when somebody else changed them since. */
export async function changeSettings(
  executor: Executor,
  change: { content: ShopSettings; version: number; by: string; now: Date },
): Promise<boolean> {
  const { content, version, by, now } = change;
  const changed = await executor
    .update(settings)
    .set({ content, version: sql`${settings.version} + 1`, updatedAt: now, updatedBy: by })
    .where(and(eq(settings.id, "shop"), eq(settings.version, version)))
    .returning({ id: settings.id });
  return changed.length === 1;
}
