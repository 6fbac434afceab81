import { PageHeader } from "~/components/page-header";
import { Sheet } from "~/components/sheet";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { TextLink } from "~/components/text-link";
import { apiDocument } from "~/documents/api/document";
import { apiGuide, type GuideEntry, type GuideField } from "~/documents/api/guide";
import { PROBLEM_KINDS, problemAnchor } from "~/documents/api/problem";
import { API_RATES } from "~/documents/api/rates";
import { API_SCOPE_WORDS, API_SCOPES } from "~/domain/orders";
import { environment } from "~/server/environment.server";
import type { Route } from "./+types/api-guide";

export function loader(_: Route.LoaderArgs) {
  const site = new URL(environment.APP_URL).origin;
  return {
    site,
    entries: apiGuide(apiDocument(site), site),
    scopes: API_SCOPES.map((scope) => ({ scope, opens: API_SCOPE_WORDS[scope].opens })),
    problems: Object.entries(PROBLEM_KINDS).map(([status, kind]) => ({
      status,
      anchor: problemAnchor(kind),
      title: kind.title,
      detail: kind.detail,
    })),
    rates: API_RATES,
  };
}

export const meta: Route.MetaFunction = () => [{ title: "API · Kerfpost" }];

export default function ApiGuide({ loaderData }: Route.ComponentProps) {
  const { site, entries, scopes, problems, rates } = loaderData;
  return (
    <div className="mx-auto w-full max-w-3xl space-y-5">
      <PageHeader
        title="API"
        lead="Orders and where they stand, for programs. Everything here reads; drawing, approving and paying stay on the pages."
      />
      <Sheet padded>
        <div className="max-w-prose space-y-6">
          <section className="space-y-3">
            <h2 className="text-lead font-semibold">Keys</h2>
            <p>
              Make a key on <TextLink to="/account/keys">your account</TextLink>, and send it with every
              request. It reads what you may read, as far as it was made for it:
            </p>
            <dl className="space-y-1">
              {scopes.map(({ scope, opens }) => (
                <div key={scope} className="sm:grid sm:grid-cols-[9rem_1fr]">
                  <dt className="measure text-small">{scope}</dt>
                  <dd className="text-small text-soft">{opens}</dd>
                </div>
              ))}
            </dl>
            <Line>{`export KERFPOST_KEY=kp_...\ncurl -H "Authorization: Bearer $KERFPOST_KEY" ${site}/api/orders`}</Line>
          </section>
          <section className="space-y-3">
            <h2 className="text-lead font-semibold">How it speaks</h2>
            <p>
              Lengths are millimetres, weights kilograms, money integer cents, instants UTC. A key may ask{" "}
              {rates.key} times a minute; every answer says in RateLimit-Limit, RateLimit-Remaining and
              RateLimit-Reset how it stands.
            </p>
            <p>
              The same as a document for machines, OpenAPI 3.1:{" "}
              <a className="text-blue underline" href="/api/openapi.json">
                /api/openapi.json
              </a>
            </p>
          </section>
        </div>
      </Sheet>
      {entries.map((entry) => (
        <Entry key={entry.id} entry={entry} />
      ))}
      <Sheet padded>
        <section className="space-y-4">
          <h2 className="text-lead font-semibold">Problems</h2>
          <p className="max-w-prose">
            What is not done is answered as application/problem+json (RFC 9457): type, title, status, detail
            and instance.
          </p>
          <ul className="space-y-3">
            {problems.map(({ status, anchor, title, detail }) => (
              <li key={status} id={anchor} className="sm:grid sm:grid-cols-[3rem_1fr]">
                <span className="measure">{status}</span>
                <span>
                  <span className="font-medium">{title}</span>
                  <span className="block text-small text-soft">{detail}</span>
                </span>
              </li>
            ))}
          </ul>
        </section>
      </Sheet>
    </div>
  );
}

function Entry({ entry }: { readonly entry: GuideEntry }) {
  const { id, path, summary, description, parameters, fields, curl } = entry;
  return (
    <Sheet padded>
      <section id={id} aria-labelledby={`${id}-head`} className="space-y-4">
        <div>
          <h2 id={`${id}-head`} className="text-lead font-semibold">
            {summary}
          </h2>
          <p className="measure text-small break-words text-soft">GET {path}</p>
        </div>
        <p className="max-w-prose">{description}</p>
        <Line>{curl}</Line>
        {parameters.length > 0 && <Fields caption="Parameters" fields={parameters} />}
        {fields.length > 0 && <Fields caption="Members of the answer" fields={fields} />}
      </section>
    </Sheet>
  );
}

function Fields({ caption, fields }: { readonly caption: string; readonly fields: readonly GuideField[] }) {
  return (
    <Table caption={caption} captionShown>
      <TableHead>
        <HeadCell>Name</HeadCell>
        <HeadCell>What it is</HeadCell>
      </TableHead>
      <tbody>
        {fields.map(({ name, type, words }) => (
          <TableRow key={name}>
            <RowHead measured>{name}</RowHead>
            <Cell>
              <span className="text-soft">{type}</span>
              {words && <span className="block">{words}</span>}
            </Cell>
          </TableRow>
        ))}
      </tbody>
    </Table>
  );
}

/** What is typed in a terminal. */
function Line({ children }: { readonly children: string }) {
  return (
    <pre className="measure bg-grain px-3 py-2 text-small break-all whitespace-pre-wrap">{children}</pre>
  );
}
