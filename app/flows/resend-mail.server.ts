import { transact } from "~/db/client.server";
import { isSecretMail } from "~/documents/mails/kinds";
import { mayDo } from "~/domain/orders";
import { wakeRunners } from "~/jobs/wake.server";
import { recordAct } from "~/models/audit.server";
import { findMail, queueMail } from "~/models/outbox.server";
import type { Actor } from "./actor";
import { answering, Refused, refuse, type Verdict } from "./verdict";

export interface ResendMailOptions {
  readonly actor: Actor;
  readonly mailId: string;
  /** Made with the form: pressed twice, one mail leaves. */
  readonly requestId: string;
}

/** Says a mail again, to the same address: a new row in the outbox that names the old one. The old one stays as it is. */
export async function resendMail(options: ResendMailOptions): Promise<Verdict<{ mailId: string | null }>> {
  const { actor, mailId, requestId } = options;
  if (!mayDo(actor.roles, "mail.resend")) return refuse("not-allowed", "Only the owner sends a mail again.");
  const verdict = await answering(() =>
    transact(async (tx) => {
      const mail = await findMail(tx, mailId);
      if (!mail) throw new Refused(refuse("not-found", "There is no such mail."));
      if (mail.status === "pending")
        throw new Refused(
          refuse("wrong-stage", "This mail is still on its way; it is tried again by itself."),
        );
      if (isSecretMail(mail.template))
        throw new Refused(
          refuse(
            "not-allowed",
            "The link in this mail is for its moment only. Let the person ask for a new one.",
          ),
        );
      const { recipient, template, orderId, payload } = mail;
      const again = await queueMail(tx, {
        ...payload,
        recipient,
        template,
        orderId,
        resendOf: mail.id,
        dedupeKey: `resend:${mail.id}:${requestId}`,
      });
      if (again)
        await recordAct(tx, {
          actorId: actor.id,
          act: "mail.resend",
          subject: { kind: "mail", id: mail.id },
          detail: { again, recipient, template },
        });
      return { ok: true, mailId: again ?? null } as const;
    }),
  );
  if (verdict.ok) wakeRunners();
  return verdict;
}
