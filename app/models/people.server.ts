import { and, eq, inArray } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { userRoles, users } from "~/db/schema";
import type { Role } from "~/domain/orders";

/** Whom a mail goes to, and what of a person an order's price depends on. */
export type Addressee = Pick<
  typeof users.$inferSelect,
  "id" | "name" | "email" | "shownUnit" | "taxExempt" | "mutedMails"
>;

const addressee = {
  id: users.id,
  name: users.name,
  email: users.email,
  shownUnit: users.shownUnit,
  taxExempt: users.taxExempt,
  mutedMails: users.mutedMails,
};

export async function findAddressee(executor: Executor, userId: string): Promise<Addressee | undefined> {
  const [row] = await executor.select(addressee).from(users).where(eq(users.id, userId));
  return row;
}

export async function listAddresseesWithRole(executor: Executor, role: Role): Promise<Addressee[]> {
  return executor
    .select(addressee)
    .from(users)
    .innerJoin(userRoles, and(eq(userRoles.userId, users.id), eq(userRoles.role, role)))
    .orderBy(users.createdAt);
}

/** How a person reads lengths. */
export async function setShownUnit(
  executor: Executor,
  userId: string,
  shownUnit: "mm" | "in",
): Promise<void> {
  await executor.update(users).set({ shownUnit, updatedAt: new Date() }).where(eq(users.id, userId));
}

/** A valid certificate is on file: this person's orders carry no sales tax. */
export async function markTaxExempt(executor: Executor, userId: string): Promise<void> {
  await executor.update(users).set({ taxExempt: true, updatedAt: new Date() }).where(eq(users.id, userId));
}

/** The kinds of mail a person has turned off. */
export async function setMutedMails(executor: Executor, userId: string, mutedMails: string[]): Promise<void> {
  await executor.update(users).set({ mutedMails, updatedAt: new Date() }).where(eq(users.id, userId));
}

/** The names of some people by their ids. */
export async function findNames(executor: Executor, ids: readonly string[]): Promise<Map<string, string>> {
  if (ids.length === 0) return new Map();
  const rows = await executor
    .select({ id: users.id, name: users.name })
    .from(users)
    .where(inArray(users.id, [...new Set(ids)]));
  return new Map(rows.map(({ id, name }) => [id, name]));
}
