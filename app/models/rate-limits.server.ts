import { sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { rateLimits } from "~/db/schema";

export type Token = { readonly ok: true } | { readonly ok: false; readonly retryAfterSeconds: number };

/** How a use stands against its limit: `used` counts this one. */
export interface Counted {
  readonly used: number;
  /** Until the window ends and the count begins anew; at least 1. */
  readonly resetSeconds: number;
}

/**
 * Counts one use of `key` in a window of `windowSeconds` that opens with the first use. The count is shared by all
 * processes. Keys begin with what they limit, as in `upload:<person>`.
 */
export async function countUse(
  executor: Executor,
  use: { key: string; windowSeconds: number; now?: Date },
): Promise<Counted> {
  const { key, windowSeconds, now = new Date() } = use;
  const at = now.getTime();
  const windowMs = windowSeconds * 1_000;
  const over = sql`${rateLimits.lastRequest} <= ${at - windowMs}`;
  const [row] = await executor
    .insert(rateLimits)
    .values({ key, count: 1, lastRequest: at })
    .onConflictDoUpdate({
      target: rateLimits.key,
      set: {
        count: sql`case when ${over} then 1 else ${rateLimits.count} + 1 end`,
        lastRequest: sql`case when ${over} then ${at} else ${rateLimits.lastRequest} end`,
      },
    })
    .returning({ count: rateLimits.count, openedAt: rateLimits.lastRequest });
  const openedAt = row?.openedAt ?? at;
  return {
    used: row?.count ?? 1,
    resetSeconds: Math.max(1, Math.ceil((openedAt + windowMs - at) / 1_000)),
  };
}

/** Counts one use of `key`, of which a window allows at most `limit`. */
export async function takeToken(
  executor: Executor,
  key: string,
  limit: number,
  windowSeconds: number,
  now: Date = new Date(),
): Promise<Token> {
  const { used, resetSeconds } = await countUse(executor, { key, windowSeconds, now });
  return used <= limit ? { ok: true } : { ok: false, retryAfterSeconds: resetSeconds };
}
