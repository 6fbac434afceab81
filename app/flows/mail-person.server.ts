import { unsubscribeUrl } from "~/auth/unsubscribe-token.server";
import type { Executor } from "~/db/client.server";
import { isOptionalMail, OPTIONAL_MAILS } from "~/documents/mails/kinds";
import type { Mail, Unsubscribe } from "~/documents/mails/layout";
import { queueMail } from "~/models/outbox.server";
import type { Addressee } from "~/models/people.server";

export interface MailPersonOptions {
  readonly person: Addressee;
  /** What kind of mail it is: a person may turn off the optional ones. */
  readonly template: string;
  readonly orderId: string;
  readonly dedupeKey?: string | undefined;
  readonly notBefore?: Date | undefined;
  readonly now?: Date | undefined;
  /** Null when there is nothing to say. */
  readonly make: (unsubscribe: Unsubscribe | undefined) => Mail | null;
}

/**
 * Writes a mail to a person into the outbox, in the transaction of its cause, unless they turned its kind off. An
 * optional kind carries the way to turn it off.
 */
export async function mailPerson(tx: Executor, options: MailPersonOptions): Promise<void> {
  const { person, template, orderId, dedupeKey, notBefore, now, make } = options;
  if (isMuted(person, template)) return;
  const unsubscribe = isOptionalMail(template)
    ? {
        what: OPTIONAL_MAILS[template].label.toLowerCase(),
        url: unsubscribeUrl({ userId: person.id, kind: template }),
      }
    : undefined;
  const mail = make(unsubscribe);
  if (!mail) return;
  await queueMail(tx, {
    ...mail,
    recipient: person.email,
    template,
    orderId,
    unsubscribeUrl: unsubscribe?.url,
    ...(dedupeKey ? { dedupeKey } : {}),
    ...(notBefore ? { notBefore } : {}),
    ...(now ? { now } : {}),
  });
}

/** Only an optional kind can be turned off: a necessary one is sent whatever the list holds. */
export const isMuted = (person: Addressee, template: string): boolean =>
  isOptionalMail(template) && person.mutedMails.includes(template);
