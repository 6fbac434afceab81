import { transact } from "~/db/client.server";
import { findMessage, markRead } from "~/models/messages.server";
import { findOrder } from "~/models/orders.server";
import { newestOrderMails, withdrawMail } from "~/models/outbox.server";
import { findAddressee } from "~/models/people.server";
import { type Actor, scopeOfActor } from "./actor";
import { MESSAGE_MAIL } from "./mail-message.server";
import { answering, NO_ORDER, Refused, refuse, type Verdict } from "./verdict";

export interface MarkReadOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** The newest message that was on the page. */
  readonly messageId: string;
  readonly now?: Date;
}

/** A person has read a thread up to a message; a mail that waits to tell of it is taken back. */
export async function markThreadRead(options: MarkReadOptions): Promise<Verdict> {
  const { actor, orderId, messageId, now = new Date() } = options;
  const scope = scopeOfActor(actor);
  return answering(() =>
    transact(async (tx) => {
      const order = await findOrder(tx, orderId, scope);
      if (!order) throw new Refused(NO_ORDER);
      const message = await findMessage(tx, { orderId, messageId, reader: scope.kind });
      if (!message) throw new Refused(refuse("not-found", "There is no such message in this order."));
      await markRead(tx, { orderId, userId: actor.id, readAt: message.createdAt });
      const person = await findAddressee(tx, actor.id);
      const [waiting] = person
        ? await newestOrderMails(tx, { orderId, recipient: person.email, template: MESSAGE_MAIL })
        : [];
      if (waiting && waiting.createdAt <= message.createdAt) await withdrawMail(tx, waiting.id, now);
      return { ok: true } as const;
    }),
  );
}
