import { useCallback, useRef } from "react";
import { Form, useSubmit } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { ActNotice } from "~/components/act-form";
import { Button } from "~/components/button";
import { EmptyState } from "~/components/empty-state";
import { ErrorPanel } from "~/components/error-panel";
import { plainField } from "~/components/field";
import { PageHeader } from "~/components/page-header";
import { Pagination } from "~/components/pagination";
import { seenAnew } from "~/components/seen-anew";
import { SelectField } from "~/components/select-field";
import { KeysDialog } from "~/components/shop/keys-dialog";
import { QueueDays } from "~/components/shop/queue-days";
import { useRowKeys } from "~/components/shop/row-keys";
import { TabLinks } from "~/components/tab-links";
import { TextField } from "~/components/text-field";
import { mayDo } from "~/domain/orders";
import { formatMinutes } from "~/domain/units";
import { receiveOrder } from "~/flows/receive-order.server";
import { dispatchAct, formAct } from "../dispatch-act.server";
import type { Route } from "./+types/queue";
import { queueView } from "./queue-view.server";

const VIEW_NAMES = [
  "owed",
  "received",
  "nested",
  "cut",
  "tabs-removed",
  "shipped",
  "answer",
  "unread",
] as const;
const SEARCH_ID = "queue-search";

/** Whatever cannot be read of an address falls back to the whole queue. */
const querySchema = z.object({
  view: z.enum(VIEW_NAMES).catch("owed"),
  material: z.string().min(1).optional().catch(undefined),
  words: z.string().trim().min(1).max(80).optional().catch(undefined),
  page: z.coerce.number().int().min(1).catch(1),
});

const receiveSchema = z.object({
  orderId: z.string(),
  version: z.coerce.number().int(),
  requestId: z.string().min(8).max(100),
});

export async function loader(args: Route.LoaderArgs) {
  const person = await requireAct(args, "queue.read");
  const query = querySchema.parse(Object.fromEntries(args.url.searchParams));
  return {
    query,
    mayReceive: mayDo(person.roles, "order.receive"),
    queue: await queueView(query, person.id),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "order.receive");
  return dispatchAct(await args.request.formData(), {
    receive: formAct(receiveSchema, async (move) => {
      const verdict = await receiveOrder({ actor: person, ...move });
      return verdict.ok ? { ok: true, words: `${verdict.order.reference} is received.` } : verdict;
    }),
  });
}

export const shouldRevalidate = seenAnew;

export const meta: Route.MetaFunction = () => [{ title: "Queue · Kerfpost" }];

const TAB_WORDS: Readonly<Record<(typeof VIEW_NAMES)[number], string>> = {
  owed: "all",
  received: "received",
  nested: "nested",
  cut: "cut",
  "tabs-removed": "tabs-removed",
  shipped: "shipped this week",
  answer: "needs an answer",
  unread: "unread messages",
};

export default function Queue({ loaderData, actionData }: Route.ComponentProps) {
  const { query, queue, mayReceive } = loaderData;
  const dialog = useRef<HTMLDialogElement>(null);
  const showKeys = useCallback(() => dialog.current?.showModal(), []);
  useRowKeys({ searchId: SEARCH_ID, onHelp: showKeys });
  const hrefOf = (change: Readonly<Record<string, string | undefined>>) => {
    const all = { view: query.view, material: query.material, words: query.words, ...change };
    const kept = Object.entries(all).filter((entry): entry is [string, string] => Boolean(entry[1]));
    const asked = new URLSearchParams(kept.filter(([name, value]) => name !== "view" || value !== "owed"));
    return asked.size > 0 ? `/shop?${asked}` : "/shop";
  };
  return (
    <>
      <PageHeader
        eyebrow={[
          queue.today,
          ...queue.machines.map(
            ({ name, booked, open }) =>
              `router ${name} ${open === 0 ? "closed" : `${formatMinutes(booked)} booked of ${formatMinutes(open)}`}`,
          ),
        ].join(" · ")}
        title="What the shop owes this week"
      />
      <ActNotice reply={actionData} />
      <TabLinks
        label="Stages"
        tabs={VIEW_NAMES.map((view) => ({
          to: hrefOf({ view }),
          label: TAB_WORDS[view],
          count: queue.counts[view],
          active: view === query.view,
          warn: view === "answer" || view === "unread",
          apart: view === "answer",
        }))}
      />
      <Filters query={query} materials={queue.materials} onKeys={showKeys} />
      {queue.items.length === 0 ? (
        <EmptyState place>
          {query.words || query.material
            ? "No order here has this stock and these words."
            : "Nothing stands here now."}
        </EmptyState>
      ) : (
        <QueueDays items={queue.items} requestId={mayReceive ? queue.requestId : null} />
      )}
      <Pagination
        page={query.page}
        pages={queue.pages}
        hrefOf={(page) => hrefOf({ page: page > 1 ? String(page) : undefined })}
      />
      <KeysDialog dialog={dialog} />
    </>
  );
}

interface FiltersProps {
  readonly query: Route.ComponentProps["loaderData"]["query"];
  readonly materials: readonly { readonly id: string; readonly name: string }[];
  readonly onKeys: () => void;
}

function Filters({ query, materials, onKeys }: FiltersProps) {
  const submit = useSubmit();
  return (
    <Form
      key={`${query.view} ${query.material} ${query.words}`}
      method="get"
      className="flex flex-wrap items-end gap-3"
    >
      {query.view !== "owed" && <input type="hidden" name="view" value={query.view} />}
      <div className="min-w-48 flex-1 sm:max-w-72">
        <TextField
          field={plainField("words", { id: SEARCH_ID, value: query.words })}
          label="Reference, name or builder"
          labelHidden
          type="search"
          placeholder="Reference, name or builder"
        />
      </div>
      <div className="min-w-40 sm:w-56">
        <SelectField
          field={plainField("material", { id: "queue-material", value: query.material })}
          label="Stock"
          labelHidden
          placeholder="Every stock"
          choices={materials.map(({ id, name }) => ({ value: id, label: name }))}
          onChange={(event) => submit(event.currentTarget.form)}
        />
      </div>
      <Button>Find</Button>
      <span className="hidden sm:ml-auto md:block">
        <Button type="button" variant="quiet" size="small" onClick={onKeys}>
          Keys: ?
        </Button>
      </span>
    </Form>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
