import { and, asc, desc, eq, gt } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { events } from "~/db/schema";

export type OrderEvent = Pick<typeof events.$inferSelect, "id" | "orderId" | "kind" | "data" | "createdAt">;
export type EventKind = OrderEvent["kind"];
/** Builders see what is for both; staff see everything. */
export type EventReader = "builder" | "staff";

interface NewEvent {
  orderId: string;
  kind: EventKind;
  /** `staff` keeps it from the builder; `both` if not given. */
  audience?: "both" | "staff";
  data?: Record<string, unknown>;
}

/** Tells live pages of the order; write it in the transaction of what it tells. */
export async function recordEvent(executor: Executor, event: NewEvent): Promise<void> {
  await executor.insert(events).values(event);
}

/** Events of an order with an id above `after`, oldest first, as far as the reader may see them. */
export async function eventsAfter(
  executor: Executor,
  orderId: string,
  after: number,
  reader: EventReader,
  limit = 100,
): Promise<OrderEvent[]> {
  return executor
    .select({
      id: events.id,
      orderId: events.orderId,
      kind: events.kind,
      data: events.data,
      createdAt: events.createdAt,
    })
    .from(events)
    .where(and(eq(events.orderId, orderId), gt(events.id, after), visibleTo(reader)))
    .orderBy(asc(events.id))
    .limit(limit);
}

/** The id of the order's newest event, 0 when there is none: where a page that was just rendered goes on from. */
export async function newestEventId(executor: Executor, orderId: string): Promise<number> {
  const [newest] = await executor
    .select({ id: events.id })
    .from(events)
    .where(eq(events.orderId, orderId))
    .orderBy(desc(events.id))
    .limit(1);
  return newest?.id ?? 0;
}

const visibleTo = (reader: EventReader) => (reader === "staff" ? undefined : eq(events.audience, "both"));
