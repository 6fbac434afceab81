import { and, count, desc, eq, gt, inArray, ne, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { messages, newId, orders, threadReads, users } from "~/db/schema";
import type { EventReader } from "./events.server";
import type { OrderScope } from "./orders.server";

export type Message = typeof messages.$inferSelect;
export type NewMessage = typeof messages.$inferInsert & { readonly id: string };
export type AuthoredMessage = Message & { readonly authorName: string };

/** For a message that no page has named. */
export const newMessageId = (): string => newId();

/** Staff read everything; a builder's queries never meet a staff note. */
const visibleTo = (reader: EventReader) => (reader === "staff" ? undefined : eq(messages.audience, "both"));

/** Writes a message. False when one with this id is there already. */
export async function insertMessage(executor: Executor, message: NewMessage): Promise<boolean> {
  const written = await executor
    .insert(messages)
    .values(message)
    .onConflictDoNothing({ target: messages.id })
    .returning({ id: messages.id });
  return written.length === 1;
}

/** A message of an order as far as the reader may see it. */
export async function findMessage(
  executor: Executor,
  { orderId, messageId, reader }: { orderId: string; messageId: string; reader: EventReader },
): Promise<Message | undefined> {
  const [message] = await executor
    .select()
    .from(messages)
    .where(and(eq(messages.id, messageId), eq(messages.orderId, orderId), visibleTo(reader)));
  return message;
}

const authored = (executor: Executor) =>
  executor
    .select({ message: messages, authorName: users.name })
    .from(messages)
    .innerJoin(users, eq(users.id, messages.authorId));

/** The newest `limit` messages of an order, oldest first, as far as the reader may see them. */
export async function listMessages(
  executor: Executor,
  { orderId, reader, limit }: { orderId: string; reader: EventReader; limit: number },
): Promise<AuthoredMessage[]> {
  const rows = await authored(executor)
    .where(and(eq(messages.orderId, orderId), visibleTo(reader)))
    .orderBy(desc(messages.createdAt), desc(messages.id))
    .limit(limit);
  return rows.map(({ message, authorName }) => ({ ...message, authorName })).reverse();
}

/** What one side wrote to the other after an instant, oldest first: what a mail to the other side tells. */
export async function listMessagesAfter(
  executor: Executor,
  { orderId, side, after, limit }: { orderId: string; side: Message["side"]; after: Date; limit: number },
): Promise<AuthoredMessage[]> {
  const rows = await authored(executor)
    .where(
      and(
        eq(messages.orderId, orderId),
        eq(messages.side, side),
        eq(messages.audience, "both"),
        gt(messages.createdAt, after),
      ),
    )
    .orderBy(desc(messages.createdAt), desc(messages.id))
    .limit(limit);
  return rows.map(({ message, authorName }) => ({ ...message, authorName })).reverse();
}

/** How far a person has read a thread; null when never. */
export async function readUpTo(executor: Executor, orderId: string, userId: string): Promise<Date | null> {
  const [row] = await executor
    .select({ readAt: threadReads.readAt })
    .from(threadReads)
    .where(and(eq(threadReads.orderId, orderId), eq(threadReads.userId, userId)));
  return row?.readAt ?? null;
}

/** Notes how far a person has read; never back again. */
export async function markRead(
  executor: Executor,
  read: { orderId: string; userId: string; readAt: Date },
): Promise<void> {
  await executor
    .insert(threadReads)
    .values(read)
    .onConflictDoUpdate({
      target: [threadReads.orderId, threadReads.userId],
      set: { readAt: sql`max(${threadReads.readAt}, excluded.read_at)` },
    });
}

interface UnreadBy {
  readonly userId: string;
  readonly reader: EventReader;
}

/** Others' messages after what the person has read, or after the person came when nothing was read yet. */
const unreadBy = ({ userId, reader }: UnreadBy) =>
  and(
    ne(messages.authorId, userId),
    visibleTo(reader),
    sql`${messages.createdAt} > coalesce(${threadReads.readAt}, ${users.createdAt})`,
  );

/** How many messages a person has not read, by order; orders without any are left out. */
export async function countUnread(
  executor: Executor,
  { orderIds, ...by }: UnreadBy & { readonly orderIds: readonly string[] },
): Promise<ReadonlyMap<string, number>> {
  if (orderIds.length === 0) return new Map();
  const rows = await executor
    .select({ orderId: messages.orderId, unread: count() })
    .from(messages)
    .innerJoin(users, eq(users.id, by.userId))
    .leftJoin(threadReads, and(eq(threadReads.orderId, messages.orderId), eq(threadReads.userId, by.userId)))
    .where(and(inArray(messages.orderId, [...orderIds]), unreadBy(by)))
    .groupBy(messages.orderId);
  return new Map(rows.map(({ orderId, unread }) => [orderId, unread]));
}

/** Orders of a scope in which there is something that the person has not read. */
export async function listUnreadOrders(
  executor: Executor,
  { userId, scope }: { readonly userId: string; readonly scope: OrderScope },
): Promise<string[]> {
  const rows = await executor
    .selectDistinct({ orderId: messages.orderId })
    .from(messages)
    .innerJoin(orders, eq(orders.id, messages.orderId))
    .innerJoin(users, eq(users.id, userId))
    .leftJoin(threadReads, and(eq(threadReads.orderId, messages.orderId), eq(threadReads.userId, userId)))
    .where(
      and(
        scope.kind === "builder" ? eq(orders.builderId, scope.userId) : undefined,
        unreadBy({ userId, reader: scope.kind }),
      ),
    );
  return rows.map(({ orderId }) => orderId);
}
