import { Form } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { DateTime } from "~/components/date-time";
import { EmptyState } from "~/components/empty-state";
import { plainField } from "~/components/field";
import { detailInWords } from "~/components/owner/audit-words";
import { PageHeader } from "~/components/page-header";
import { Pagination } from "~/components/pagination";
import { SelectField } from "~/components/select-field";
import { Sheet } from "~/components/sheet";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { auditChoices, pageOfAudit } from "~/models/audit-list.server";
import { currentSettings } from "~/models/settings.server";
import type { Route } from "./+types/audit";
import { auditFilterOf, auditSearchOf } from "./audit-search.server";

const PAGE_SIZE = 50;

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "audit.read");
  const filter = auditFilterOf(args.url.searchParams);
  const { timeZone } = (await currentSettings(db)).shop;
  const { rows, found } = await pageOfAudit(db, auditSearchOf(filter, timeZone, PAGE_SIZE));
  return {
    filter,
    found,
    pages: Math.max(1, Math.ceil(found / PAGE_SIZE)),
    choices: await auditChoices(db),
    rows: rows.map(({ detail, ...row }) => ({ ...row, facts: detailInWords(detail) })),
  };
}

export const meta: Route.MetaFunction = () => [{ title: "Audit · Kerfpost" }];

type Filter = Route.ComponentProps["loaderData"]["filter"];

/** The filters as a query, the page left out where it is the first. */
function queryOf(filter: Filter): string {
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(filter))
    if (value !== undefined && !(name === "page" && value === 1)) query.set(name, String(value));
  return query.size > 0 ? `?${query}` : "";
}

export default function Audit({ loaderData }: Route.ComponentProps) {
  const { filter, found, pages, choices, rows } = loaderData;
  return (
    <>
      <PageHeader
        eyebrow={`${found.toLocaleString("en-US")} ${found === 1 ? "entry" : "entries"}`}
        title="Audit"
        lead="Every move of an order and every change in the office: who, when, from what to what. Nothing here can be changed."
        right={
          <a
            href={`/owner/audit.csv${queryOf({ ...filter, page: 1 })}`}
            className="text-blue underline underline-offset-2"
            download
          >
            Download as CSV
          </a>
        }
      />
      <Form className="grid items-end gap-3 sm:grid-cols-2 lg:grid-cols-6" role="search">
        <SelectField
          field={plainField("person", { value: filter.person ?? "" })}
          label="Who"
          placeholder="everybody"
          choices={[
            ...choices.people.map(({ id, name }) => ({ value: id, label: name })),
            { value: "system", label: "the system" },
          ]}
        />
        <SelectField
          field={plainField("act", { value: filter.act ?? "" })}
          label="What"
          placeholder="everything"
          choices={choices.acts.map((act) => ({ value: act, label: act }))}
        />
        <TextField
          field={plainField("order", { value: filter.order ?? "" })}
          label="Order"
          placeholder="KP-2047"
          measured
        />
        <TextField
          field={plainField("from", { value: filter.from ?? "" })}
          label="From"
          type="date"
          measured
        />
        <TextField field={plainField("to", { value: filter.to ?? "" })} label="To" type="date" measured />
        <Button>Show</Button>
      </Form>
      <Sheet padded>
        {rows.length === 0 ? (
          <EmptyState>Nothing fits.</EmptyState>
        ) : (
          <Table caption="What was done, newest first">
            <TableHead>
              <HeadCell>when</HeadCell>
              <HeadCell>who</HeadCell>
              <HeadCell>what</HeadCell>
              <HeadCell>on</HeadCell>
              <HeadCell>with what</HeadCell>
            </TableHead>
            <tbody>
              {rows.map((row) => (
                <TableRow key={row.id}>
                  <RowHead measured>
                    <span className="whitespace-nowrap">
                      <DateTime at={row.at} show="full" />
                    </span>
                  </RowHead>
                  <Cell>
                    {row.actor ?? (row.actorId === null ? "the system" : "somebody who is gone")}
                    {row.role && <span className="block text-caption text-soft">{row.role}</span>}
                  </Cell>
                  <Cell whole>{row.act}</Cell>
                  <Cell whole>
                    {row.reference ? (
                      <TextLink to={`/shop/orders/${row.subjectId}`}>
                        <span className="measure">{row.reference}</span>
                      </TextLink>
                    ) : (
                      row.subjectKind
                    )}
                  </Cell>
                  <Cell>
                    {row.reason}
                    <span className="block text-caption break-words text-soft">{row.facts.join("; ")}</span>
                  </Cell>
                </TableRow>
              ))}
            </tbody>
          </Table>
        )}
      </Sheet>
      <Pagination
        page={filter.page}
        pages={pages}
        hrefOf={(page) => `/owner/audit${queryOf({ ...filter, page })}`}
      />
    </>
  );
}
