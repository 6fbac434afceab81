import type { Person } from "~/auth/session.server";
import { THREAD_PAGE, type ThreadAudience, type ThreadData } from "~/components/thread/thread-data";
import { db } from "~/db/client.server";
import { listAttachments } from "~/models/attachments.server";
import { newestEventId } from "~/models/events.server";
import { countUnread, listMessages, readUpTo } from "~/models/messages.server";
import type { Order, OrderScope } from "~/models/orders.server";
import { listTroubledMails } from "~/models/outbox.server";

export interface ThreadViewOptions {
  readonly order: Order;
  readonly person: Person;
  readonly scope: OrderScope;
  readonly audience: ThreadAudience;
  readonly limit?: number;
}

/** The thread of an order as this person may see it, on this side's page. */
export async function threadView(options: ThreadViewOptions): Promise<ThreadData> {
  const { order, person, scope, audience, limit = THREAD_PAGE } = options;
  const reader = scope.kind === "staff" && audience === "staff" ? "staff" : "builder";
  // Asked for first: an event between the two reads is then heard again rather than missed.
  const newestEvent = await newestEventId(db, order.id);
  const found = await listMessages(db, { orderId: order.id, reader, limit: limit + 1 });
  const shown = found.slice(-limit);
  const files = await listAttachments(
    db,
    shown.map(({ id }) => id),
  );
  const unread = await countUnread(db, { userId: person.id, reader, orderIds: [order.id] });
  const undelivered = await listTroubledMails(db, order.id, reader === "staff" ? undefined : person.email);
  return {
    messages: shown.map((message) => ({
      id: message.id,
      side: message.side,
      audience: message.audience,
      author: message.authorName,
      mine: message.authorId === person.id,
      body: message.body,
      partLabel: message.partLabel,
      spot: message.spotX === null || message.spotY === null ? null : { x: message.spotX, y: message.spotY },
      createdAt: message.createdAt.toISOString(),
      attachments: (files.get(message.id) ?? []).map(({ id, fileName, contentType, size }) => ({
        id,
        fileName,
        contentType,
        size,
        href: `/api/orders/${order.id}/attachments/${id}`,
      })),
    })),
    earlier: found.length > limit,
    unread: unread.get(order.id) ?? 0,
    readAt: (await readUpTo(db, order.id, person.id))?.toISOString() ?? null,
    newestEvent,
    undelivered: undelivered.map(({ id, subject, recipient, lastError, createdAt }) => ({
      id,
      subject,
      recipient,
      error: lastError ?? "",
      createdAt: createdAt.toISOString(),
    })),
  };
}
