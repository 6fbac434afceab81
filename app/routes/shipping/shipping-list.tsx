import { Form, Link } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { DateTime } from "~/components/date-time";
import { EmptyState } from "~/components/empty-state";
import { ErrorPanel } from "~/components/error-panel";
import { plainField } from "~/components/field";
import { PageHeader } from "~/components/page-header";
import { Pagination } from "~/components/pagination";
import { Sheet } from "~/components/sheet";
import { TabLinks } from "~/components/tab-links";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { TextField } from "~/components/text-field";
import type { Route } from "./+types/shipping-list";
import { shippingList } from "./shipping-view.server";

const VIEWS = ["waiting", "coming", "shipped"] as const;
const VIEW_WORDS = { waiting: "to pack", coming: "coming from the bench", shipped: "handed over" } as const;

/** Whatever cannot be read of an address falls back to what waits to be packed. */
const querySchema = z.object({
  view: z.enum(VIEWS).catch("waiting"),
  words: z.string().trim().min(1).max(80).optional().catch(undefined),
  page: z.coerce.number().int().min(1).catch(1),
});

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "shipping.read");
  const query = querySchema.parse(Object.fromEntries(args.url.searchParams));
  return { query, list: await shippingList(query) };
}

export const meta: Route.MetaFunction = () => [{ title: "Shipping · Kerfpost" }];

export default function ShippingList({ loaderData }: Route.ComponentProps) {
  const { query, list } = loaderData;
  const hrefOf = (change: { view?: string; page?: number }) => {
    const asked = new URLSearchParams();
    const view = change.view ?? query.view;
    if (view !== "waiting") asked.set("view", view);
    if (query.words) asked.set("words", query.words);
    if (change.page && change.page > 1) asked.set("page", String(change.page));
    return asked.size > 0 ? `/shipping?${asked}` : "/shipping";
  };
  return (
    <>
      <PageHeader
        eyebrow={`${list.found} ${list.found === 1 ? "order" : "orders"}`}
        title="Right parts, right box, right label"
      />
      <TabLinks
        label="Orders at the packing bench"
        tabs={VIEWS.map((view) => ({
          to: hrefOf({ view }),
          label: VIEW_WORDS[view],
          active: view === query.view,
          ...(view === query.view ? { count: list.found } : {}),
        }))}
      />
      <Form key={query.view} method="get" className="flex flex-wrap items-end gap-3">
        {query.view !== "waiting" && <input type="hidden" name="view" value={query.view} />}
        <div className="min-w-48 flex-1 sm:max-w-72">
          <TextField
            field={plainField("words", { id: "shipping-search", value: query.words })}
            label="Reference, name or builder"
            labelHidden
            type="search"
            placeholder="Reference, name or builder"
          />
        </div>
        <Button>Find</Button>
      </Form>
      {list.rows.length === 0 ? (
        <EmptyState place>
          {query.words ? "No order here has these words." : "Nothing stands here now."}
        </EmptyState>
      ) : (
        <Sheet padded>
          <Orders rows={list.rows} isShipped={query.view === "shipped"} />
        </Sheet>
      )}
      <Pagination page={query.page} pages={list.pages} hrefOf={(page) => hrefOf({ page })} />
    </>
  );
}

interface OrdersProps {
  readonly rows: Route.ComponentProps["loaderData"]["list"]["rows"];
  readonly isShipped: boolean;
}

function Orders({ rows, isShipped }: OrdersProps) {
  return (
    <Table caption="Orders at the packing bench">
      <TableHead>
        <HeadCell>order</HeadCell>
        <HeadCell>goes to</HeadCell>
        <HeadCell numeric>counted</HeadCell>
        <HeadCell>{isShipped ? "" : "stands"}</HeadCell>
        <HeadCell numeric>{isShipped ? "handed over" : "promised"}</HeadCell>
      </TableHead>
      <tbody>
        {rows.map((row) => (
          <TableRow key={row.id}>
            <RowHead>
              <span className="measure block text-caption text-soft">{row.reference}</span>
              <Link
                to={`/shipping/${row.id}`}
                className="font-semibold text-blue underline underline-offset-2"
              >
                {row.name}
              </Link>
            </RowHead>
            <Cell>
              {row.delivery === "pick-up" ? "pick-up" : row.to}
              <span className="block text-caption text-soft">{row.builder}</span>
            </Cell>
            <Cell numeric>
              <span className={row.ready < row.expected ? "text-amber" : ""}>
                {row.counted} of {row.expected}
              </span>
            </Cell>
            <Cell>
              {row.blocks.length > 0 ? (
                <span className="text-amber">{row.blocks.join(", ")}</span>
              ) : (
                !isShipped && row.stands
              )}
            </Cell>
            <Cell numeric>
              <span className={row.late ? "text-amber" : ""}>
                {row.shippedAt ? (
                  <DateTime at={row.shippedAt} show="day-time" />
                ) : (
                  row.due && <DateTime at={row.due} />
                )}
              </span>
            </Cell>
          </TableRow>
        ))}
      </tbody>
    </Table>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
