import { and, asc, eq, inArray, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { attachments, messages } from "~/db/schema";
import type { EventReader } from "./events.server";

export type Attachment = typeof attachments.$inferSelect;
/** A file that is in storage already, to be hung on a message. */
export type KeptFile = Pick<Attachment, "fileName" | "contentType" | "size" | "sha256">;

/** Where an attachment's bytes lie in object storage. */
export const attachmentKey = (sha256: string): string => `attachments/${sha256}`;

export async function insertAttachments(
  executor: Executor,
  messageId: string,
  files: readonly KeptFile[],
): Promise<void> {
  if (files.length === 0) return;
  await executor.insert(attachments).values(files.map((file) => ({ ...file, messageId })));
}

/** The attachments of messages, by message, in the order they were hung on. */
export async function listAttachments(
  executor: Executor,
  messageIds: readonly string[],
): Promise<ReadonlyMap<string, Attachment[]>> {
  const byMessage = new Map<string, Attachment[]>();
  if (messageIds.length === 0) return byMessage;
  const rows = await executor
    .select()
    .from(attachments)
    .where(inArray(attachments.messageId, [...messageIds]))
    .orderBy(asc(attachments.createdAt), sql`rowid`);
  for (const row of rows) byMessage.set(row.messageId, [...(byMessage.get(row.messageId) ?? []), row]);
  return byMessage;
}

/** An attachment of an order as far as the reader may see the message it hangs on. */
export async function findAttachment(
  executor: Executor,
  { orderId, attachmentId, reader }: { orderId: string; attachmentId: string; reader: EventReader },
): Promise<Attachment | undefined> {
  const [row] = await executor
    .select({ attachment: attachments })
    .from(attachments)
    .innerJoin(messages, eq(messages.id, attachments.messageId))
    .where(
      and(
        eq(attachments.id, attachmentId),
        eq(messages.orderId, orderId),
        reader === "staff" ? undefined : eq(messages.audience, "both"),
      ),
    );
  return row?.attachment;
}
