import type { Readable } from "node:stream";
import { db } from "~/db/client.server";
import { attachmentKey, findAttachment } from "~/models/attachments.server";
import type { EventReader } from "~/models/events.server";
import { storage } from "~/services/clients.server";

interface OpenedAttachment {
  readonly fileName: string;
  /** As its bytes said when it was kept. */
  readonly contentType: string;
  /** Bytes. */
  readonly size: number;
  /** To be read or destroyed by the caller. */
  readonly body: Readable;
}

/** An attachment's bytes, if the reader may see the message it hangs on. */
export async function openAttachment(options: {
  readonly orderId: string;
  readonly attachmentId: string;
  readonly reader: EventReader;
}): Promise<OpenedAttachment | undefined> {
  const attachment = await findAttachment(db, options);
  const stored = attachment && (await storage.getStream(attachmentKey(attachment.sha256)));
  if (!attachment || !stored) return undefined;
  const { fileName, contentType } = attachment;
  return { fileName, contentType, size: stored.size, body: stored.body };
}
