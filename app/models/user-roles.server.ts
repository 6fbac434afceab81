import { and, count, eq, isNotNull } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { userRoles, users } from "~/db/schema";
import { isRole, type Role, STAFF_ROLES } from "~/domain/orders";

/** A person's roles, unknown ones left out, and how they read lengths. */
export async function listRoles(
  executor: Executor,
  userId: string,
): Promise<{ roles: Role[]; shownUnit: "mm" | "in" }> {
  const rows = await executor
    .select({ role: userRoles.role, shownUnit: users.shownUnit })
    .from(users)
    .leftJoin(userRoles, eq(userRoles.userId, users.id))
    .where(eq(users.id, userId));
  return { roles: rows.map(({ role }) => role).filter(isRole), shownUnit: rows[0]?.shownUnit ?? "mm" };
}

export async function grantRole(
  executor: Executor,
  grant: { userId: string; role: Role; grantedBy: string | null },
): Promise<void> {
  await executor.insert(userRoles).values(grant).onConflictDoNothing();
}

/** False when the person did not have it. */
export async function revokeRole(executor: Executor, userId: string, role: Role): Promise<boolean> {
  const gone = await executor
    .delete(userRoles)
    .where(and(eq(userRoles.userId, userId), eq(userRoles.role, role)))
    .returning({ role: userRoles.role });
  return gone.length > 0;
}

export async function countWithRole(executor: Executor, role: Role): Promise<number> {
  const [row] = await executor.select({ people: count() }).from(userRoles).where(eq(userRoles.role, role));
  return row?.people ?? 0;
}

export interface StaffMember {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
}

/** Everybody with a staff role, by name. */
export async function listStaff(executor: Executor): Promise<StaffMember[]> {
  const rows = await executor
    .select({ id: users.id, name: users.name, email: users.email, role: userRoles.role })
    .from(users)
    .innerJoin(userRoles, eq(userRoles.userId, users.id))
    .where(isNotNull(userRoles.role))
    .orderBy(users.name);
  const people = new Map<string, StaffMember & { roles: Role[] }>();
  for (const { id, name, email, role } of rows) {
    const person = people.get(id) ?? { id, name, email, roles: [] };
    if (isRole(role)) person.roles.push(role);
    people.set(id, person);
  }
  return [...people.values()].filter(({ roles }) => STAFF_ROLES.some((role) => roles.includes(role)));
}
