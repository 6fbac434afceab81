import type { Executor } from "~/db/client.server";
import { type MailedMessage, messageMail } from "~/documents/mails/message";
import { listAttachments } from "~/models/attachments.server";
import { type AuthoredMessage, listMessagesAfter, type Message, readUpTo } from "~/models/messages.server";
import type { Order } from "~/models/orders.server";
import { newestOrderMails, withdrawMail } from "~/models/outbox.server";
import { type Addressee, findAddressee, listAddresseesWithRole } from "~/models/people.server";
import { currentSettings } from "~/models/settings.server";
import { environment } from "~/server/environment.server";
import { isMuted, mailPerson } from "./mail-person.server";

/** One mail a thread and person in this time, unless they have read it meanwhile. */
export const GATHER_MS = 5 * 60_000;
/** A mail never tells what is older, nor more than this many messages, which it then says: the thread has them all. */
const OLDEST_MS = 24 * 3_600_000;
const MOST_MESSAGES = 20;
export const MESSAGE_MAIL = "message";

interface MailMessageOptions {
  readonly order: Order;
  readonly side: Message["side"];
  readonly authorId: string;
  readonly now: Date;
}

/** Mails a message that was just written to the other side: the builder, or every operator and owner. */
export async function mailMessage(tx: Executor, options: MailMessageOptions): Promise<void> {
  const { order, side, authorId } = options;
  const people = side === "shop" ? await builderOf(tx, order) : await deskOf(tx);
  for (const person of people)
    if (person.id !== authorId && !isMuted(person, MESSAGE_MAIL)) await mailThread(tx, person, options);
}

const builderOf = async (tx: Executor, { builderId }: Order): Promise<Addressee[]> => {
  const builder = await findAddressee(tx, builderId);
  return builder ? [builder] : [];
};

/** Those who answer builders, each once whatever hats they wear. */
async function deskOf(tx: Executor): Promise<Addressee[]> {
  const people = new Map<string, Addressee>();
  for (const role of ["operator", "owner"] as const)
    for (const person of await listAddresseesWithRole(tx, role)) people.set(person.id, person);
  return [...people.values()];
}

/**
 * The first message is mailed at once. What comes soon after it waits, in one mail, for the five minutes to end; the
 * waiting mail is written anew with every further message, and taken back when the thread is read.
 */
async function mailThread(tx: Executor, person: Addressee, options: MailMessageOptions): Promise<void> {
  const { order, side, now } = options;
  const [newest, older] = await newestOrderMails(tx, {
    orderId: order.id,
    recipient: person.email,
    template: MESSAGE_MAIL,
  });
  const withdrawn = newest && (await withdrawMail(tx, newest.id, now)) ? newest : undefined;
  const last = withdrawn ? older : newest;
  const readAt = await readUpTo(tx, order.id, person.id);
  const told = Math.max(readAt?.getTime() ?? 0, last?.createdAt.getTime() ?? 0, now.getTime() - OLDEST_MS);
  const fresh = await listMessagesAfter(tx, {
    orderId: order.id,
    side,
    after: new Date(told),
    limit: MOST_MESSAGES + 1,
  });
  if (fresh.length === 0) return;
  const messages = await withFiles(tx, fresh.slice(-MOST_MESSAGES));
  const { shop } = await currentSettings(tx);
  const page = side === "shop" ? "orders" : "shop/orders";
  await mailPerson(tx, {
    person,
    template: MESSAGE_MAIL,
    orderId: order.id,
    notBefore: withdrawn?.nextAttemptAt ?? notBefore(last?.createdAt, readAt, now),
    now,
    make: (unsubscribe) =>
      messageMail({
        shopName: shop.name,
        recipientName: person.name,
        reference: order.reference,
        orderName: order.name,
        url: `${environment.APP_URL}/${page}/${order.id}#thread`,
        timeZone: shop.timeZone,
        unsubscribe,
        messages,
        earlier: fresh.length > MOST_MESSAGES,
      }),
  });
}

function notBefore(lastAt: Date | undefined, readAt: Date | null, now: Date): Date {
  if (!lastAt || (readAt && readAt >= lastAt)) return now;
  return new Date(Math.max(now.getTime(), lastAt.getTime() + GATHER_MS));
}

async function withFiles(tx: Executor, fresh: readonly AuthoredMessage[]): Promise<MailedMessage[]> {
  const files = await listAttachments(
    tx,
    fresh.map(({ id }) => id),
  );
  return fresh.map(({ id, authorName, createdAt, body, partLabel, spotX, spotY }) => ({
    authorName,
    writtenAt: createdAt,
    body,
    partLabel,
    spot: spotX === null || spotY === null ? null : { x: spotX, y: spotY },
    files: (files.get(id) ?? []).map(({ fileName }) => fileName),
  }));
}
