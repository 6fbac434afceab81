import { Form } from "react-router";
import { Button } from "../button";
import { DateTime } from "../date-time";
import { TextLink } from "../text-link";

export interface MailRow {
  readonly id: string;
  readonly recipient: string;
  readonly template: string;
  readonly subject: string;
  readonly reference: string | null;
  readonly orderId: string | null;
  readonly status: "pending" | "sent" | "failed" | "bounced";
  readonly attempts: number;
  readonly nextAttemptAt: Date | string;
  readonly error: string | null;
  readonly sentAt: Date | string | null;
  readonly createdAt: Date | string;
  readonly resendOf: string | null;
  readonly mayResend: boolean;
}

interface MailListProps {
  readonly mails: readonly MailRow[];
  /** Of this page's forms: a press that is sent twice sends one mail. */
  readonly requestId: string;
  readonly openHref: (id: string) => string;
}

/** Mails with what became of them, newest first, and the act of sending one again. */
export function MailList({ mails, requestId, openHref }: MailListProps) {
  return (
    <ul className="divide-y divide-line text-small">
      {mails.map((mail) => (
        <li
          key={mail.id}
          className="grid gap-x-6 gap-y-1 px-4 py-3 sm:px-6 lg:grid-cols-[8.5rem_minmax(0,1.2fr)_5rem_minmax(0,1fr)_7rem] lg:items-baseline"
        >
          <span className="text-soft">
            <DateTime at={mail.createdAt} show="day-time" />
          </span>
          <div className="min-w-0">
            <TextLink to={openHref(mail.id)}>{mail.subject}</TextLink>
            <p className="text-caption text-soft">
              <span className="measure break-all">{mail.recipient}</span> · {mail.template}
              {mail.resendOf && (
                <>
                  {" · "}
                  <TextLink to={openHref(mail.resendOf)}>sent again</TextLink>
                </>
              )}
            </p>
          </div>
          <div className="empty:hidden lg:empty:block">
            {mail.orderId && mail.reference ? (
              <TextLink to={`/shop/orders/${mail.orderId}`}>
                <span className="measure">{mail.reference}</span>
              </TextLink>
            ) : null}
          </div>
          <div className="min-w-0 break-words">
            <Outcome mail={mail} />
          </div>
          <div className="empty:hidden lg:text-right lg:empty:block">
            {mail.mayResend && (
              <Form method="post" action="/owner/mail">
                <input type="hidden" name="requestId" value={requestId} />
                <Button name="mail" value={mail.id} size="small" aria-label={`Send again: ${mail.subject}`}>
                  Send again
                </Button>
              </Form>
            )}
          </div>
        </li>
      ))}
    </ul>
  );
}

const tries = (attempts: number): string => (attempts === 1 ? "1 try" : `${attempts} tries`);

function Outcome({ mail }: { readonly mail: MailRow }) {
  const { status, error, sentAt, nextAttemptAt, attempts } = mail;
  if (status === "sent")
    return (
      <>
        sent {sentAt && <DateTime at={sentAt} show="day-time" />}
        {attempts > 1 && <span className="text-soft"> after {tries(attempts)}</span>}
        {error && <span className="block text-caption text-soft">before that: {error}</span>}
      </>
    );
  if (status === "pending")
    return (
      <>
        {attempts > 0 ? `${tries(attempts)}, the next` : "leaves"}{" "}
        <DateTime at={nextAttemptAt} show="day-time" />
        {error && <span className="block text-caption text-amber">{error}</span>}
      </>
    );
  return (
    <>
      <span className="font-semibold text-amber">
        {status === "bounced" ? "bounced" : `given up after ${tries(attempts)}`}
      </span>
      {error && <span className="block text-caption text-amber">{error}</span>}
    </>
  );
}
