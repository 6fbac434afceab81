import { and, asc, count, desc, eq, gte, inArray, isNull, lte, notExists, or, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/sqlite-core";
import type { Executor } from "~/db/client.server";
import { newId, orders, outbox } from "~/db/schema";

export type OutgoingMail = typeof outbox.$inferSelect;

interface NewMail {
  recipient: string;
  /** Name of the document it was made by. */
  template: string;
  subject: string;
  text: string;
  html: string;
  orderId?: string | null;
  /** The same cause writes one mail: a second one with this key is dropped. */
  dedupeKey?: string;
  /** Where the recipient turns this kind off; mail programs offer it beside the mail. */
  unsubscribeUrl?: string | undefined;
  /** Not before; at once if not given. */
  notBefore?: Date;
  /** The mail that this one says again. */
  resendOf?: string;
  now?: Date;
}

/** Queues a mail in the transaction of its cause. Returns its id, undefined when the same cause wrote one before. */
export async function queueMail(executor: Executor, mail: NewMail): Promise<string | undefined> {
  const { recipient, template, orderId, dedupeKey, notBefore, resendOf, now = new Date(), ...payload } = mail;
  const [row] = await executor
    .insert(outbox)
    .values({
      id: newId(),
      kind: "mail",
      recipient,
      template,
      orderId,
      dedupeKey,
      resendOf,
      payload,
      createdAt: now,
      nextAttemptAt: notBefore ?? now,
    })
    .onConflictDoNothing({ target: outbox.dedupeKey })
    .returning({ id: outbox.id });
  return row?.id;
}

/** The newest mail of a template to an address, sent or not. */
export async function newestMailTo(
  executor: Executor,
  recipient: string,
  template: string,
): Promise<OutgoingMail | undefined> {
  const [mail] = await executor
    .select()
    .from(outbox)
    .where(and(eq(outbox.recipient, recipient), eq(outbox.template, template)))
    .orderBy(desc(outbox.createdAt))
    .limit(1);
  return mail;
}

/** Takes mails that are due, oldest first, for `leaseMs`; another runner gets them only after that. */
export async function leaseMails(
  executor: Executor,
  { now, leaseMs, limit }: { now: Date; leaseMs: number; limit: number },
): Promise<OutgoingMail[]> {
  const due = executor
    .select({ id: outbox.id })
    .from(outbox)
    .where(
      and(
        eq(outbox.status, "pending"),
        lte(outbox.nextAttemptAt, now),
        or(isNull(outbox.leasedUntil), lte(outbox.leasedUntil, now)),
      ),
    )
    .orderBy(asc(outbox.nextAttemptAt))
    .limit(limit);
  const rows = await due;
  if (rows.length === 0) return [];
  return executor
    .update(outbox)
    .set({ leasedUntil: new Date(now.getTime() + leaseMs), attempts: sql`${outbox.attempts} + 1` })
    .where(inArray(outbox.id, due))
    .returning();
}

/** What became of a sending: sent, to be tried again at a time, or given up with what the mail host said. */
export type MailOutcome =
  | { status: "sent" }
  | { status: "pending"; nextAttemptAt: Date; error: string }
  | { status: "failed" | "bounced"; error: string };

export async function settleMail(
  executor: Executor,
  id: string,
  outcome: MailOutcome,
  now: Date,
): Promise<void> {
  await executor
    .update(outbox)
    .set({
      status: outcome.status,
      leasedUntil: null,
      ...(outcome.status === "sent" ? { sentAt: now } : { lastError: outcome.error }),
      ...(outcome.status === "pending" ? { nextAttemptAt: outcome.nextAttemptAt } : {}),
    })
    .where(eq(outbox.id, id));
}

/** The newest mails of a kind about an order to an address, newest first. */
export async function newestOrderMails(
  executor: Executor,
  { orderId, recipient, template }: { orderId: string; recipient: string; template: string },
): Promise<OutgoingMail[]> {
  return executor
    .select()
    .from(outbox)
    .where(and(eq(outbox.orderId, orderId), eq(outbox.recipient, recipient), eq(outbox.template, template)))
    .orderBy(desc(outbox.createdAt), sql`rowid desc`)
    .limit(2);
}

/** Takes back a mail that has not left. False when it has, or is leaving at this moment. */
export async function withdrawMail(executor: Executor, id: string, now: Date): Promise<boolean> {
  const gone = await executor
    .delete(outbox)
    .where(
      and(
        eq(outbox.id, id),
        eq(outbox.status, "pending"),
        or(isNull(outbox.leasedUntil), lte(outbox.leasedUntil, now)),
      ),
    )
    .returning({ id: outbox.id });
  return gone.length === 1;
}

export async function findMail(executor: Executor, id: string): Promise<OutgoingMail | undefined> {
  const [mail] = await executor.select().from(outbox).where(eq(outbox.id, id));
  return mail;
}

export type MailStatus = OutgoingMail["status"];

export interface MailFilter {
  readonly status?: MailStatus | undefined;
  readonly template?: string | undefined;
  /** Part of an address, of a subject, or of an order's reference. */
  readonly text?: string | undefined;
}

export type ListedMail = Omit<OutgoingMail, "payload"> & {
  readonly subject: string;
  readonly reference: string | null;
};

const subject = sql<string>`json_extract(${outbox.payload}, '$.subject')`;
/** Text to be found as it is typed: the pattern's own signs are plain letters. */
const containing = (text: string) => `%${text.replace(/[\\%_]/g, "\\$&")}%`;

function fitting({ status, template, text }: MailFilter) {
  const pattern = text ? containing(text) : undefined;
  return and(
    status ? eq(outbox.status, status) : undefined,
    template ? eq(outbox.template, template) : undefined,
    pattern
      ? sql`(${outbox.recipient} like ${pattern} escape '\\' or ${subject} like ${pattern} escape '\\' or ${orders.reference} like ${pattern} escape '\\')`
      : undefined,
  );
}

/** Mails that fit, newest first, without their words; `page` from 1. */
export async function listMails(
  executor: Executor,
  filter: MailFilter,
  { page, size }: { page: number; size: number },
): Promise<{ mails: ListedMail[]; total: number }> {
  const rows = await executor
    .select({ mail: outbox, subject, reference: orders.reference })
    .from(outbox)
    .leftJoin(orders, eq(orders.id, outbox.orderId))
    .where(fitting(filter))
    .orderBy(desc(outbox.createdAt), sql`${outbox}.rowid desc`)
    .limit(size)
    .offset((page - 1) * size);
  const [counted] = await executor
    .select({ mails: count() })
    .from(outbox)
    .leftJoin(orders, eq(orders.id, outbox.orderId))
    .where(fitting(filter));
  return {
    mails: rows.map(({ mail: { payload, ...mail }, ...more }) => ({ ...mail, ...more })),
    total: counted?.mails ?? 0,
  };
}

/** How many mails there are in each status. */
export async function countMails(executor: Executor): Promise<Readonly<Record<MailStatus, number>>> {
  const rows = await executor
    .select({ status: outbox.status, mails: count() })
    .from(outbox)
    .groupBy(outbox.status);
  const counts = { pending: 0, sent: 0, failed: 0, bounced: 0 };
  for (const { status, mails } of rows) counts[status] = mails;
  return counts;
}

/** Kinds that there are mails of, by name. */
export async function listMailKinds(executor: Executor): Promise<string[]> {
  const rows = await executor
    .selectDistinct({ template: outbox.template })
    .from(outbox)
    .orderBy(outbox.template);
  return rows.map(({ template }) => template);
}

/** Mails that did not arrive and were not said again since. */
const troubled = (executor: Executor) => {
  const again = alias(outbox, "again");
  return and(
    inArray(outbox.status, ["failed", "bounced"]),
    notExists(
      executor
        .select({ id: again.id })
        .from(again)
        .where(and(eq(again.resendOf, outbox.id), inArray(again.status, ["pending", "sent"]))),
    ),
  );
};

export type TroubledMail = Pick<
  ListedMail,
  "id" | "recipient" | "status" | "subject" | "lastError" | "createdAt"
>;

/** An order's mails that did not arrive, newest first; with `recipient` only those to one address. */
export async function listTroubledMails(
  executor: Executor,
  orderId: string,
  recipient?: string,
): Promise<TroubledMail[]> {
  return executor
    .select({
      id: outbox.id,
      recipient: outbox.recipient,
      status: outbox.status,
      subject,
      lastError: outbox.lastError,
      createdAt: outbox.createdAt,
    })
    .from(outbox)
    .where(
      and(
        eq(outbox.orderId, orderId),
        recipient ? eq(outbox.recipient, recipient) : undefined,
        troubled(executor),
      ),
    )
    .orderBy(desc(outbox.createdAt))
    .limit(20);
}

/** How many mails since an instant did not arrive and wait for the owner. */
export async function countTroubledMails(executor: Executor, since: Date): Promise<number> {
  const [row] = await executor
    .select({ mails: count() })
    .from(outbox)
    .where(and(gte(outbox.createdAt, since), troubled(executor)));
  return row?.mails ?? 0;
}
