import { and, eq, ne } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { accounts, newId, sessions, users } from "~/db/schema";
import type { Role } from "~/domain/orders";
import { grantRole } from "./user-roles.server";

export interface NewAccount {
  readonly name: string;
  /** In small letters. */
  readonly email: string;
  readonly passwordHash: string;
  readonly emailVerified: boolean;
  readonly roles: readonly Role[];
  /** Who gave the roles; null when the person signed up. */
  readonly grantedBy: string | null;
}

/** A person who signs in with a password, with their roles. Undefined when the address has an account already. */
export async function insertAccount(
  tx: Executor,
  { passwordHash, roles, grantedBy, ...person }: NewAccount,
): Promise<string | undefined> {
  const id = newId();
  const [made] = await tx
    .insert(users)
    .values({ id, ...person })
    .onConflictDoNothing({ target: users.email })
    .returning({ id: users.id });
  if (!made) return undefined;
  await tx
    .insert(accounts)
    .values({ userId: id, accountId: id, providerId: "credential", password: passwordHash });
  for (const role of roles) await grantRole(tx, { userId: id, role, grantedBy });
  return id;
}

/** The id behind an e-mail address, in small letters. */
export async function findIdByEmail(executor: Executor, email: string): Promise<string | undefined> {
  const [row] = await executor.select({ id: users.id }).from(users).where(eq(users.email, email));
  return row?.id;
}

export async function changeProfile(
  executor: Executor,
  userId: string,
  change: { name: string; shownUnit: "mm" | "in" },
): Promise<void> {
  await executor
    .update(users)
    .set({ ...change, updatedAt: new Date() })
    .where(eq(users.id, userId));
}

/** A mailed link to this address was opened. */
export async function markVerified(executor: Executor, userId: string): Promise<void> {
  await executor
    .update(users)
    .set({ emailVerified: true, updatedAt: new Date() })
    .where(eq(users.id, userId));
}

/** Ends one session of a person; false when it is not theirs or over. */
export async function endSession(executor: Executor, userId: string, sessionId: string): Promise<boolean> {
  const ended = await executor
    .delete(sessions)
    .where(and(eq(sessions.id, sessionId), eq(sessions.userId, userId)))
    .returning({ id: sessions.id });
  return ended.length === 1;
}

/** Ends all sessions of a person but the one they are in. */
export async function endOtherSessions(executor: Executor, userId: string, keep: string): Promise<void> {
  await executor.delete(sessions).where(and(eq(sessions.userId, userId), ne(sessions.id, keep)));
}
