import { and, desc, eq, gt, isNull } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { invitations, newId, users } from "~/db/schema";
import type { Role } from "~/domain/orders";

export interface Invitation {
  readonly id: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly invitedBy: string;
  /** Name of who invited. */
  readonly inviter: string;
  readonly expiresAt: Date;
}

const open = (now: Date) =>
  and(isNull(invitations.acceptedAt), isNull(invitations.revokedAt), gt(invitations.expiresAt, now));

const invitation = {
  id: invitations.id,
  email: invitations.email,
  roles: invitations.roles,
  invitedBy: invitations.invitedBy,
  inviter: users.name,
  expiresAt: invitations.expiresAt,
};

export async function insertInvitation(
  tx: Executor,
  given: { email: string; roles: readonly Role[]; tokenHash: string; invitedBy: string; expiresAt: Date },
): Promise<string> {
  const id = newId();
  await tx.insert(invitations).values({ id, ...given, roles: [...given.roles] });
  return id;
}

/** The invitation of a mailed token while it can be accepted: open, not called back, in its time. */
export async function findOpenInvitation(
  executor: Executor,
  tokenHash: string,
  now: Date,
): Promise<Invitation | undefined> {
  const [row] = await executor
    .select(invitation)
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .where(and(eq(invitations.tokenHash, tokenHash), open(now)));
  return row;
}

/** Invitations that can still be accepted, newest first. */
export async function listOpenInvitations(executor: Executor, now: Date): Promise<Invitation[]> {
  return executor
    .select(invitation)
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .where(open(now))
    .orderBy(desc(invitations.createdAt));
}

/** False when it was accepted, called back or ran out meanwhile. */
export async function markAccepted(tx: Executor, id: string, now: Date): Promise<boolean> {
  const marked = await tx
    .update(invitations)
    .set({ acceptedAt: now })
    .where(and(eq(invitations.id, id), open(now)))
    .returning({ id: invitations.id });
  return marked.length === 1;
}

/** Calls back what is still open, one invitation or all to one address. Returns how many. */
export async function revokeInvitations(
  tx: Executor,
  which: { readonly id: string } | { readonly email: string },
  now: Date,
): Promise<number> {
  const chosen = "id" in which ? eq(invitations.id, which.id) : eq(invitations.email, which.email);
  const revoked = await tx
    .update(invitations)
    .set({ revokedAt: now })
    .where(and(chosen, open(now)))
    .returning({ id: invitations.id });
  return revoked.length;
}
