import { Form } from "react-router";
import { Button } from "../button";
import { DateTime } from "../date-time";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "../table";
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

interface MailTableProps {
  readonly mails: readonly MailRow[];
  /** Of this page's forms: a press that is sent twice sends one mail. */
  readonly requestId: string;
  readonly openHref: (id: string) => string;
}

/** Mails with what became of them, and the act of sending one again. */
export function MailTable({ mails, requestId, openHref }: MailTableProps) {
  return (
    <div className="px-4 py-2">
      <Table caption="Mails, newest first">
        <TableHead>
          <HeadCell>written</HeadCell>
          <HeadCell>mail</HeadCell>
          <HeadCell>order</HeadCell>
          <HeadCell>what became of it</HeadCell>
          <HeadCell numeric>tries</HeadCell>
          <HeadCell>
            <span className="sr-only">act</span>
          </HeadCell>
        </TableHead>
        <tbody>
          {mails.map((mail) => (
            <TableRow key={mail.id}>
              <Cell whole>
                <DateTime at={mail.createdAt} show="day-time" />
              </Cell>
              <RowHead>
                <TextLink to={openHref(mail.id)} preventScrollReset={false}>
                  {mail.subject}
                </TextLink>
                <span className="block text-caption text-soft">
                  <span className="measure break-all">{mail.recipient}</span> · {mail.template}
                  {mail.resendOf && (
                    <>
                      {" · "}
                      <TextLink to={openHref(mail.resendOf)}>sent again</TextLink>
                    </>
                  )}
                </span>
              </RowHead>
              <Cell whole>
                {mail.orderId && mail.reference ? (
                  <TextLink to={`/shop/orders/${mail.orderId}`}>
                    <span className="measure">{mail.reference}</span>
                  </TextLink>
                ) : null}
              </Cell>
              <Cell>
                <Outcome mail={mail} />
              </Cell>
              <Cell numeric>{mail.attempts}</Cell>
              <Cell whole>
                {mail.mayResend && (
                  <Form method="post" action="/owner/mail">
                    <input type="hidden" name="requestId" value={requestId} />
                    <Button
                      name="mail"
                      value={mail.id}
                      size="small"
                      aria-label={`Send again: ${mail.subject}`}
                    >
                      Send again
                    </Button>
                  </Form>
                )}
              </Cell>
            </TableRow>
          ))}
        </tbody>
      </Table>
    </div>
  );
}

function Outcome({ mail }: { readonly mail: MailRow }) {
  const { status, error, sentAt, nextAttemptAt, attempts } = mail;
  if (status === "sent")
    return (
      <>
        sent {sentAt && <DateTime at={sentAt} show="day-time" />}
        {error && <span className="block text-caption text-soft">before that: {error}</span>}
      </>
    );
  if (status === "pending")
    return (
      <>
        {attempts > 0 ? "next try" : "leaves"} <DateTime at={nextAttemptAt} show="day-time" />
        {error && <span className="block text-caption text-amber">{error}</span>}
      </>
    );
  return (
    <>
      <span className="font-semibold text-amber">{status === "bounced" ? "bounced" : "given up"}</span>
      {error && <span className="block text-caption text-amber">{error}</span>}
    </>
  );
}
