import { and, asc, desc, eq, inArray, isNull, lte, or, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { newId, outbox } from "~/db/schema";

export type OutgoingMail = typeof outbox.$inferSelect;

interface NewMail {
  recipient: string;
  /** Name of the document it was made by. */
  template: string;
  subject: string;
  text: string;
  html: string;
  orderId?: string;
  /** The same cause writes one mail: a second one with this key is dropped. */
  dedupeKey?: string;
}

/** Queues a mail in the transaction of its cause. Returns its id, undefined when the same cause wrote one before. */
export async function queueMail(executor: Executor, mail: NewMail): Promise<string | undefined> {
  const { recipient, template, orderId, dedupeKey, ...payload } = mail;
  const [row] = await executor
    .insert(outbox)
    .values({ id: newId(), kind: "mail", recipient, template, orderId, dedupeKey, payload })
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
