import { sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { rateLimits } from "~/db/schema";

export type Token = { readonly ok: true } | { readonly ok: false; readonly retryAfterSeconds: number };

/**
 * Counts one use of `key`: at most `limit` in a window of `windowSeconds` that opens with the first use. The count
 * is shared by all processes. Keys begin with what they limit, as in `upload:<person>`.
 */
export async function takeToken(
  executor: Executor,
  key: string,
  limit: number,
  windowSeconds: number,
  now: Date = new Date(),
): Promise<Token> {
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
  if (!row || row.count <= limit) return { ok: true };
  return { ok: false, retryAfterSeconds: Math.max(1, Math.ceil((row.openedAt + windowMs - at) / 1_000)) };
}
