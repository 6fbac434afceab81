import { data, Form, redirect } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { EmptyState } from "~/components/empty-state";
import { plainField } from "~/components/field";
import { MailDetail } from "~/components/mail/mail-detail";
import { MailList } from "~/components/mail/mail-list";
import { Notice } from "~/components/notice";
import { PageHeader } from "~/components/page-header";
import { Pagination } from "~/components/pagination";
import { SelectField } from "~/components/select-field";
import { Sheet } from "~/components/sheet";
import { TabLinks } from "~/components/tab-links";
import { TextField } from "~/components/text-field";
import { db } from "~/db/client.server";
import { isSecretMail } from "~/documents/mails/kinds";
import { resendMail } from "~/flows/resend-mail.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { countMails, findMail, listMailKinds, listMails } from "~/models/outbox.server";
import type { Route } from "./+types/mail";

const PAGE_SIZE = 25;
const STATUSES = ["pending", "sent", "failed", "bounced"] as const;

const filterSchema = z.object({
  status: z.enum(STATUSES).optional().catch(undefined),
  kind: z.string().max(40).optional().catch(undefined),
  q: z.string().trim().max(100).optional().catch(undefined),
  page: z.coerce.number().int().min(1).max(100_000).catch(1),
  mail: z.string().max(64).optional().catch(undefined),
});

const resendSchema = z.object({ mail: z.string().min(1).max(64), requestId: z.string().min(1).max(64) });

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "mail.resend");
  const given = new URL(args.request.url).searchParams;
  const filter = filterSchema.parse(Object.fromEntries([...given].filter(([, value]) => value !== "")));
  const { mails, total } = await listMails(
    db,
    { status: filter.status, template: filter.kind, text: filter.q },
    { page: filter.page, size: PAGE_SIZE },
  );
  const opened = filter.mail ? await findMail(db, filter.mail) : undefined;
  return {
    filter,
    counts: await countMails(db),
    kinds: await listMailKinds(db),
    pages: Math.ceil(total / PAGE_SIZE),
    total,
    requestId: crypto.randomUUID(),
    mails: mails.map(
      ({
        id,
        recipient,
        template,
        subject,
        reference,
        orderId,
        status,
        attempts,
        nextAttemptAt,
        ...mail
      }) => ({
        id,
        recipient,
        template,
        subject,
        reference,
        orderId,
        status,
        attempts,
        nextAttemptAt,
        error: mail.lastError,
        sentAt: mail.sentAt,
        createdAt: mail.createdAt,
        resendOf: mail.resendOf,
        mayResend: status !== "pending" && !isSecretMail(template),
      }),
    ),
    opened: opened
      ? {
          subject: opened.payload.subject,
          recipient: opened.recipient,
          createdAt: opened.createdAt,
          text: isSecretMail(opened.template) ? null : opened.payload.text,
        }
      : null,
  };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "mail.resend");
  const sent = resendSchema.safeParse(Object.fromEntries(await args.request.formData()));
  if (!sent.success) throw data({ words: "Say which mail." }, { status: 400 });
  const { mail: mailId, requestId } = sent.data;
  const verdict = await resendMail({ actor, mailId, requestId });
  if (!verdict.ok) return data({ words: verdict.words }, { status: REFUSAL_STATUS[verdict.reason] });
  throw redirect("/owner/mail");
}

export const meta: Route.MetaFunction = () => [{ title: "Mail · Kerfpost" }];

type Filter = Route.ComponentProps["loaderData"]["filter"];

/** The list's address with some of its filters changed. */
function hrefOf(filter: Filter, change: Partial<Filter>): string {
  const merged = { ...filter, mail: undefined, ...change };
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(merged))
    if (value !== undefined && !(name === "page" && value === 1)) query.set(name, String(value));
  return `/owner/mail${query.size > 0 ? `?${query}` : ""}`;
}

export default function Mail({ loaderData, actionData }: Route.ComponentProps) {
  const { filter, counts, kinds, mails, pages, opened, requestId } = loaderData;
  const filtered = filter.status ?? filter.kind ?? filter.q;
  return (
    <>
      <PageHeader
        title="Mail that leaves the shop"
        lead="Written with what causes it, sent a moment later, tried again for about two days when the mail host does not answer."
      />
      {actionData?.words && <Notice live>{actionData.words}</Notice>}
      <TabLinks
        label="Status"
        tabs={[
          { to: hrefOf(filter, { status: undefined, page: 1 }), label: "all", active: !filter.status },
          ...STATUSES.map((status) => ({
            to: hrefOf(filter, { status, page: 1 }),
            label: status,
            count: counts[status],
            active: filter.status === status,
            warn: status === "bounced" || status === "failed",
          })),
        ]}
      />
      <Form className="flex flex-wrap items-end gap-3" role="search">
        {filter.status && <input type="hidden" name="status" value={filter.status} />}
        <div className="w-full sm:w-72">
          <TextField
            field={plainField("q", { value: filter.q ?? "" })}
            label="Address, subject or order"
            type="search"
          />
        </div>
        <div className="w-full sm:w-48">
          <SelectField
            field={plainField("kind", { value: filter.kind ?? "" })}
            label="Kind"
            placeholder="every kind"
            choices={kinds.map((kind) => ({ value: kind, label: kind }))}
          />
        </div>
        <Button variant="plain">Search</Button>
      </Form>
      {opened && <MailDetail mail={opened} closeHref={hrefOf(filter, {})} />}
      <Sheet label="Mails">
        {mails.length === 0 ? (
          <EmptyState>
            {filtered ? "No mail fits." : "No mail yet. The first one is written when somebody signs up."}
          </EmptyState>
        ) : (
          <MailList mails={mails} requestId={requestId} openHref={(id) => hrefOf(filter, { mail: id })} />
        )}
      </Sheet>
      <Pagination page={filter.page} pages={pages} hrefOf={(page) => hrefOf(filter, { page })} />
    </>
  );
}
