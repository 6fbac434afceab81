import { transact } from "~/db/client.server";
import { MESSAGE_LIMITS, mayDo } from "~/domain/orders";
import type { KeptFile } from "~/models/attachments.server";
import { findMessage, type Message } from "~/models/messages.server";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { answering, NO_ORDER, Refused, refuse, type Verdict } from "./verdict";
import { writeMessage } from "./write-message.server";

export interface PostMessageOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** Made by the page with the draft: the same message sent twice is written once. 32 hex digits. */
  readonly messageId: string;
  /** `staff` is a note that never reaches the builder. */
  readonly audience: Message["audience"];
  readonly body: string;
  readonly partLabel?: string | null;
  /** Millimetres of the drawing. */
  readonly spot?: { readonly x: number; readonly y: number } | null;
  readonly files?: readonly KeptFile[];
  readonly now?: Date;
}

/** Writes in an order's thread and mails the other side. */
export async function postMessage(options: PostMessageOptions): Promise<Verdict<{ messageId: string }>> {
  const { actor, orderId, messageId, audience, partLabel = null, spot = null, files = [] } = options;
  const body = options.body.replaceAll("\r\n", "\n").trim();
  if (!mayDo(actor.roles, "order.message")) return refuse("not-allowed", "You cannot write here.");
  if (body === "" && files.length === 0) return refuse("incomplete", "Write something, or attach a file.");
  if (body.length > MESSAGE_LIMITS.characters)
    return refuse(
      "invalid",
      `A message holds ${MESSAGE_LIMITS.characters.toLocaleString("en-US")} characters; this one has ${body.length.toLocaleString("en-US")}. Send it in two.`,
    );
  const scope = scopeOfActor(actor);
  if (audience === "staff" && scope.kind !== "staff")
    return refuse("not-allowed", "Notes for the staff are written by the staff.");
  return answering(() =>
    transact(async (tx) => {
      const order = await findOrder(tx, orderId, scope);
      if (!order) throw new Refused(NO_ORDER);
      const written = await writeMessage(tx, {
        order,
        id: messageId,
        authorId: actor.id,
        audience,
        body,
        partLabel,
        spot,
        files,
        now: options.now ?? new Date(),
      });
      if (written) return { ok: true, messageId } as const;
      const present = await findMessage(tx, { orderId, messageId, reader: scope.kind });
      if (present?.authorId !== actor.id)
        throw new Refused(refuse("invalid", "This message cannot be written. Send it again."));
      return { ok: true, messageId } as const;
    }),
  );
}
