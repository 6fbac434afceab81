import { db } from "~/db/client.server";
import { leaseMails, type MailOutcome, type OutgoingMail, settleMail } from "~/models/outbox.server";
import { mail } from "~/services/clients.server";
import type { SendResult } from "~/services/mail.server";

/** Longer than every time-out of the mail client together: a mail is not sent twice by two runners at work. */
const LEASE_MS = 120_000;
const FIRST_BACKOFF_MS = 30_000;
const LONGEST_BACKOFF_MS = 6 * 3_600_000;
/** Over about two days, as RFC 5321 4.5.4.1 has senders give up after four to five days at the latest. */
const MOST_ATTEMPTS = 16;
/** The domain part of Message-IDs; the outbox id before it is unique by itself. */
const MESSAGE_ID_DOMAIN = "mail.kerfpost.invalid";

/** RFC 3834, 5: absence notices are not sent to what a machine wrote. */
const NO_AUTOMATIC_ANSWER = { "Auto-Submitted": "auto-generated" };
/** RFC 2369 and RFC 8058: a mail program offers the link, and takes it by one POST without asking the person in. */
const unsubscribing = (url: string) => ({
  "List-Unsubscribe": `<${url}>`,
  "List-Unsubscribe-Post": "List-Unsubscribe=One-Click",
});

/**
 * Sends the mail that is due first. False when none is due. A mail leaves at least once: its Message-ID is the same
 * at every attempt, so that a second copy can be told.
 */
export async function sendNextMail(now: () => Date = () => new Date()): Promise<boolean> {
  const [leased] = await leaseMails(db, { now: now(), leaseMs: LEASE_MS, limit: 1 });
  if (!leased) return false;
  const { subject, text, html, unsubscribeUrl } = leased.payload;
  const messageId = `<${leased.id}@${MESSAGE_ID_DOMAIN}>`;
  const sent = await mail.send({
    to: leased.recipient,
    subject,
    text,
    html,
    messageId,
    headers: { ...NO_AUTOMATIC_ANSWER, ...(unsubscribeUrl ? unsubscribing(unsubscribeUrl) : {}) },
  });
  await settleMail(db, leased.id, outcomeOf(leased, sent, now()), now());
  return true;
}

/** Sends everything that is due, one after the other: what commands and tests use instead of a runner. */
export async function sendDueMails(now?: () => Date): Promise<number> {
  let sent = 0;
  while (await sendNextMail(now)) sent += 1;
  return sent;
}

function outcomeOf(leased: OutgoingMail, sent: SendResult, now: Date): MailOutcome {
  if (sent.ok) return { status: "sent" };
  if (sent.reason === "permanent") return { status: "bounced", error: sent.message };
  if (leased.attempts >= MOST_ATTEMPTS) return { status: "failed", error: sent.message };
  const backoff = Math.min(FIRST_BACKOFF_MS * 2 ** (leased.attempts - 1), LONGEST_BACKOFF_MS);
  return { status: "pending", nextAttemptAt: new Date(now.getTime() + backoff), error: sent.message };
}
