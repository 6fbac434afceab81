import { transact } from "~/db/client.server";
import { OPTIONAL_MAIL_KINDS, type OptionalMail } from "~/documents/mails/kinds";
import { findAddressee, setMutedMails } from "~/models/people.server";
import { answering, Refused, refuse, type Verdict } from "./verdict";

const NOBODY = refuse("not-found", "There is no such person.");

/** Which optional mails a person gets, whatever they got before. The necessary ones are not a choice. */
export const setMailChoices = (options: {
  readonly userId: string;
  readonly wanted: readonly OptionalMail[];
}): Promise<Verdict> =>
  changeMuted(options.userId, () => OPTIONAL_MAIL_KINDS.filter((kind) => !options.wanted.includes(kind)));

/** Turns one kind off, the others staying as they are: what the link in a mail does. */
export const turnOffMail = (options: {
  readonly userId: string;
  readonly kind: OptionalMail;
}): Promise<Verdict> => changeMuted(options.userId, (muted) => [...new Set([...muted, options.kind])]);

const changeMuted = (userId: string, change: (muted: readonly string[]) => string[]): Promise<Verdict> =>
  answering(() =>
    transact(async (tx) => {
      const person = await findAddressee(tx, userId);
      if (!person) throw new Refused(NOBODY);
      await setMutedMails(tx, userId, change(person.mutedMails));
      return { ok: true } as const;
    }),
  );
