import type { Executor } from "~/db/client.server";
import { insertAttachments, type KeptFile } from "~/models/attachments.server";
import { recordEvent } from "~/models/events.server";
import { insertMessage, type Message } from "~/models/messages.server";
import type { Order } from "~/models/orders.server";
import { mailMessage } from "./mail-message.server";

export interface WriteMessageOptions {
  readonly order: Order;
  readonly id: string;
  readonly authorId: string;
  readonly audience: Message["audience"];
  readonly body: string;
  readonly partLabel: string | null;
  /** Millimetres of the drawing. */
  readonly spot: { readonly x: number; readonly y: number } | null;
  readonly files: readonly KeptFile[];
  readonly now: Date;
}

/**
 * A message with its files, the event that live pages hear and the mails to the other side, in one transaction.
 * False when a message with this id is there already: then nothing is written.
 */
export async function writeMessage(tx: Executor, options: WriteMessageOptions): Promise<boolean> {
  const { order, id, authorId, audience, body, partLabel, spot, files, now } = options;
  const side = order.builderId === authorId ? "builder" : "shop";
  const message = {
    id,
    orderId: order.id,
    authorId,
    side,
    audience,
    body,
    partLabel,
    spotX: spot?.x ?? null,
    spotY: spot?.y ?? null,
    createdAt: now,
  } as const;
  if (!(await insertMessage(tx, message))) return false;
  await insertAttachments(tx, id, files);
  await recordEvent(tx, { orderId: order.id, kind: "message", audience, data: { messageId: id } });
  if (audience === "both") await mailMessage(tx, { order, side, authorId, now });
  return true;
}
