import { and, count, desc, eq, isNull, lt, or } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { apiKeys, users } from "~/db/schema";
import { type ApiScope, isApiScope } from "~/domain/orders";

/** A key as its person sees it; the key itself is kept nowhere, only its hash. */
export interface ApiKey {
  readonly id: string;
  readonly name: string;
  /** Its first characters. */
  readonly prefix: string;
  readonly scopes: readonly ApiScope[];
  readonly createdAt: Date;
  readonly lastUsedAt: Date | null;
  readonly revokedAt: Date | null;
}

interface NewApiKey {
  readonly userId: string;
  readonly name: string;
  readonly prefix: string;
  /** SHA-256 in hex. */
  readonly keyHash: string;
  readonly scopes: readonly ApiScope[];
}

export async function insertApiKey(tx: Executor, { scopes, ...key }: NewApiKey): Promise<string> {
  const [row] = await tx
    .insert(apiKeys)
    .values({ ...key, scopes: [...scopes] })
    .returning({ id: apiKeys.id });
  if (!row) throw new Error("The key was not stored.");
  return row.id;
}

/** A person's keys, the newest first, revoked ones too. */
export async function listApiKeys(executor: Executor, userId: string): Promise<ApiKey[]> {
  const rows = await executor
    .select({
      id: apiKeys.id,
      name: apiKeys.name,
      prefix: apiKeys.prefix,
      scopes: apiKeys.scopes,
      createdAt: apiKeys.createdAt,
      lastUsedAt: apiKeys.lastUsedAt,
      revokedAt: apiKeys.revokedAt,
    })
    .from(apiKeys)
    .where(eq(apiKeys.userId, userId))
    .orderBy(desc(apiKeys.createdAt), desc(apiKeys.id));
  return rows.map((row) => ({ ...row, scopes: row.scopes.filter(isApiScope) }));
}

export async function countLiveApiKeys(executor: Executor, userId: string): Promise<number> {
  const [row] = await executor
    .select({ live: count() })
    .from(apiKeys)
    .where(and(eq(apiKeys.userId, userId), isNull(apiKeys.revokedAt)));
  return row?.live ?? 0;
}

/** The key with this hash and whose it is; undefined when there is none or it was revoked. */
export async function findLiveApiKey(executor: Executor, keyHash: string) {
  const [row] = await executor
    .select({ key: apiKeys, person: users })
    .from(apiKeys)
    .innerJoin(users, eq(users.id, apiKeys.userId))
    .where(and(eq(apiKeys.keyHash, keyHash), isNull(apiKeys.revokedAt)));
  if (!row) return undefined;
  const { id, name, email, emailVerified, shownUnit } = row.person;
  return {
    keyId: row.key.id,
    scopes: row.key.scopes.filter(isApiScope),
    owner: { id, name, email, emailVerified, shownUnit },
  };
}

/** Notes that a key was used, unless that was noted at or after `notSince`. */
export async function noteApiKeyUse(
  executor: Executor,
  use: { keyId: string; at: Date; notSince: Date },
): Promise<void> {
  await executor
    .update(apiKeys)
    .set({ lastUsedAt: use.at })
    .where(
      and(eq(apiKeys.id, use.keyId), or(isNull(apiKeys.lastUsedAt), lt(apiKeys.lastUsedAt, use.notSince))),
    );
}

/** The revoked key's name; undefined when the person has no such live key. */
export async function revokeApiKey(
  tx: Executor,
  { userId, keyId, at }: { userId: string; keyId: string; at: Date },
): Promise<string | undefined> {
  const [row] = await tx
    .update(apiKeys)
    .set({ revokedAt: at })
    .where(and(eq(apiKeys.id, keyId), eq(apiKeys.userId, userId), isNull(apiKeys.revokedAt)))
    .returning({ name: apiKeys.name });
  return row?.name;
}
