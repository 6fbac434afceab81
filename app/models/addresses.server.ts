import { and, asc, eq, isNull } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { addresses, newId } from "~/db/schema";
import type { ShipTo } from "~/domain/orders";

export interface Address {
  readonly id: string;
  readonly shipTo: ShipTo;
}

type Row = typeof addresses.$inferSelect;

const asShipTo = ({ company, line2, phone, ...row }: Row): ShipTo => ({
  recipient: row.recipient,
  line1: row.line1,
  city: row.city,
  region: row.region,
  postcode: row.postcode,
  country: "US",
  residential: row.residential,
  ...(company ? { company } : {}),
  ...(line2 ? { line2 } : {}),
  ...(phone ? { phone } : {}),
});

/** A person's address book, oldest first. */
export async function listAddresses(executor: Executor, userId: string): Promise<Address[]> {
  const rows = await executor
    .select()
    .from(addresses)
    .where(and(eq(addresses.userId, userId), isNull(addresses.removedAt)))
    .orderBy(asc(addresses.createdAt), asc(addresses.id));
  return rows.map((row) => ({ id: row.id, shipTo: asShipTo(row) }));
}

/** Undefined also when it is somebody else's. */
export async function findAddress(
  executor: Executor,
  userId: string,
  id: string,
): Promise<Address | undefined> {
  return (await listAddresses(executor, userId)).find((address) => address.id === id);
}

export async function addAddress(executor: Executor, userId: string, shipTo: ShipTo): Promise<Address> {
  const id = newId();
  await executor.insert(addresses).values({ id, userId, ...shipTo });
  return { id, shipTo };
}

/** Orders keep their own copy. False when there is no such address of that person's. */
export async function changeAddress(
  executor: Executor,
  userId: string,
  { id, shipTo }: Address,
): Promise<boolean> {
  const { company = null, line2 = null, phone = null, ...rest } = shipTo;
  const changed = await executor
    .update(addresses)
    .set({ ...rest, company, line2, phone })
    .where(and(eq(addresses.id, id), eq(addresses.userId, userId), isNull(addresses.removedAt)))
    .returning({ id: addresses.id });
  return changed.length === 1;
}

export async function removeAddress(
  executor: Executor,
  userId: string,
  id: string,
  now: Date,
): Promise<boolean> {
  const removed = await executor
    .update(addresses)
    .set({ removedAt: now })
    .where(and(eq(addresses.id, id), eq(addresses.userId, userId), isNull(addresses.removedAt)))
    .returning({ id: addresses.id });
  return removed.length === 1;
}
