import { Form, Link, useSearchParams } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { DateTime } from "~/components/date-time";
import { silhouetteOf } from "~/components/drawing-viewer/view-geometry-of";
import { EmptyState } from "~/components/empty-state";
import { ErrorPanel } from "~/components/error-panel";
import { plainField } from "~/components/field";
import { Money } from "~/components/money";
import { isLate, placeOnLine } from "~/components/order/order-rule";
import { waitsFor } from "~/components/order/waits-for";
import { PageHeader } from "~/components/page-header";
import { Pagination } from "~/components/pagination";
import { Sheet } from "~/components/sheet";
import { Silhouette } from "~/components/silhouette";
import { SteelRule } from "~/components/steel-rule";
import { TabLinks } from "~/components/tab-links";
import { TextField } from "~/components/text-field";
import { Unread } from "~/components/thread/unread";
import { db } from "~/db/client.server";
import { MAIN_LINE, type Stage } from "~/domain/orders";
import { findLargestPart } from "~/flows/find-largest-part.server";
import { openAsks } from "~/flows/order-facts.server";
import { listFindings } from "~/models/findings.server";
import { countUnread } from "~/models/messages.server";
import { countByStage, type ListedOrder, pageOfOrders } from "~/models/order-list.server";
import { currentSettings } from "~/models/settings.server";
import type { Route } from "./+types/orders";

const PAGE_SIZE = 25;

/** Stages that a builder tells apart in a list. */
const GROUPS = {
  open: { label: "Yours to finish", stages: ["draft", "quoted", "needs-review"] },
  shop: { label: "In the shop", stages: ["paid", "received", "nested", "cut", "tabs-removed", "on-hold"] },
  shipped: { label: "Shipped", stages: ["shipped"] },
  cancelled: { label: "Cancelled", stages: ["cancelled"] },
} as const satisfies Record<string, { label: string; stages: readonly Stage[] }>;
type Group = keyof typeof GROUPS;
const GROUP_NAMES = Object.keys(GROUPS) as readonly Group[];

export async function loader(args: Route.LoaderArgs) {
  const person = await requireAct(args, "order.create");
  const scope = { kind: "builder", userId: person.id } as const;
  const search = new URL(args.request.url).searchParams;
  const group = GROUP_NAMES.find((name) => name === search.get("show")) ?? null;
  const words = search.get("q")?.slice(0, 80) ?? "";
  const asked = { words, size: PAGE_SIZE, stages: group ? GROUPS[group].stages : undefined };
  const wanted = Math.max(1, Math.trunc(Number(search.get("page"))) || 1);
  const counts = await countByStage(db, scope);
  let found = await pageOfOrders(db, scope, { ...asked, page: wanted });
  const pages = Math.max(1, Math.ceil(found.found / PAGE_SIZE));
  const page = Math.min(wanted, pages);
  if (page !== wanted) found = await pageOfOrders(db, scope, { ...asked, page });
  const now = new Date();
  const unread = await countUnread(db, {
    userId: person.id,
    reader: "builder",
    orderIds: found.rows.map(({ id }) => id),
  });
  const total = [...counts.values()].reduce((sum, count) => sum + count, 0);
  return {
    group,
    words,
    page,
    pages,
    total,
    counts: GROUP_NAMES.map((name) => ({
      name,
      count: GROUPS[name].stages.reduce((sum, stage) => sum + (counts.get(stage) ?? 0), 0),
    })),
    upload: total === 0 ? (await currentSettings(db)).upload : null,
    orders: await Promise.all(found.rows.map((order) => listed(order, now, unread.get(order.id) ?? 0))),
  };
}

async function listed(order: ListedOrder, now: Date, unread: number) {
  const part = await findLargestPart(order).catch(() => null);
  const { quote, promisedFor, shippedAt, paidAt } = order;
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    stage: order.stage,
    questions:
      order.stage === "needs-review" && order.revisionId !== null
        ? openAsks(await listFindings(db, order.revisionId)).length
        : 0,
    heldFrom: order.heldFrom,
    holdReason: order.holdReason,
    shape: part && silhouetteOf(part),
    total: quote?.total ?? null,
    currency: quote?.currency ?? "usd",
    expired: quote !== null && paidAt === null && (quote.status === "expired" || quote.expiresAt <= now),
    promisedFor: promisedFor?.toISOString() ?? null,
    shippedAt: shippedAt?.toISOString() ?? null,
    updatedAt: order.updatedAt.toISOString(),
    now: now.toISOString(),
    unread,
  };
}
type Row = Awaited<ReturnType<typeof listed>>;

export default function Orders({ loaderData }: Route.ComponentProps) {
  const { orders, group, words, page, pages, total, counts } = loaderData;
  const [search] = useSearchParams();
  const hrefWith = (changed: Record<string, string | null>): string => {
    const next = new URLSearchParams(search);
    for (const [name, value] of Object.entries(changed))
      if (value === null) next.delete(name);
      else next.set(name, value);
    return next.size > 0 ? `/orders?${next}` : "/orders";
  };
  if (total === 0) return <NoOrders />;
  return (
    <>
      <PageHeader
        title="Orders"
        right={
          <ButtonLink to="/orders/new" variant="primary">
            New drawing
          </ButtonLink>
        }
      />
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
        <TabLinks
          label="Stages"
          tabs={[
            { to: hrefWith({ show: null, page: null }), label: "All", count: total, active: group === null },
            ...counts.map(({ name, count }) => ({
              to: hrefWith({ show: name, page: null }),
              label: GROUPS[name].label,
              count,
              active: group === name,
            })),
          ]}
        />
        <Form role="search" className="flex items-end gap-2">
          {group && <input type="hidden" name="show" value={group} />}
          <TextField
            key={words}
            field={plainField("q", { id: "order-search", value: words })}
            label="Name or number"
            labelHidden
            type="search"
            placeholder="Name or number"
          />
          <Button size="normal">Find</Button>
        </Form>
      </div>
      {orders.length === 0 ? (
        <EmptyState>
          {words ? `No order has “${words}” in its name or number.` : "Nothing stands here."}
        </EmptyState>
      ) : (
        <Sheet label="Orders">
          <ul className="divide-y divide-line">
            {orders.map((order) => (
              <OrderRow key={order.id} order={order} />
            ))}
          </ul>
        </Sheet>
      )}
      <Pagination
        page={page}
        pages={pages}
        hrefOf={(to) => hrefWith({ page: to === 1 ? null : String(to) })}
      />
    </>
  );
}

const RULE = MAIN_LINE.map((name) => ({ name }));

function OrderRow({ order }: { readonly order: Row }) {
  const waits = waitsFor(order);
  const date = order.shippedAt ?? order.promisedFor;
  const late = isLate(order);
  return (
    <li>
      <Link
        to={`/orders/${order.id}`}
        className="grid grid-cols-[5.25rem_minmax(0,1fr)_auto] items-center gap-x-5 gap-y-2 px-4 py-3.5 hover:bg-grain/55 sm:px-6 lg:grid-cols-[5.25rem_minmax(0,1.2fr)_minmax(12rem,1fr)_minmax(0,1fr)_8rem]"
      >
        <span className="row-span-2 lg:row-span-1">
          <Silhouette shape={order.shape} />
        </span>
        <span className="min-w-0">
          <span className="measure block text-small text-soft">{order.reference}</span>
          <span className="block text-body font-semibold break-words">{order.name}</span>
        </span>
        <span className="col-span-2 col-start-2 row-start-2 lg:col-span-1 lg:col-start-3 lg:row-start-1">
          <SteelRule
            stages={RULE}
            at={placeOnLine({ stage: order.stage, heldFrom: order.heldFrom, further: 0 })}
            late={late}
            size="row"
          />
        </span>
        <span
          className={`col-span-2 col-start-2 text-small lg:col-span-1 lg:col-start-4 ${waits.yours ? "text-amber" : "text-ink"}`}
        >
          {waits.words}
          <span className="block">
            <Unread count={order.unread} />
          </span>
        </span>
        <span className="col-start-3 row-start-1 text-right lg:col-start-5">
          <span className="block">
            {order.total === null ? (
              <span className="text-small text-soft">no quote yet</span>
            ) : (
              <Money cents={order.total} currency={order.currency} />
            )}
          </span>
          <span className={`block text-small ${late ? "text-amber" : "text-soft"}`}>
            <DateTime at={date ?? order.updatedAt} />
          </span>
        </span>
      </Link>
    </li>
  );
}

/** As large as the sheet: the first drawing is dropped on the page it is sent from. */
function NoOrders() {
  return (
    <>
      <PageHeader title="Orders" />
      <div className="grid min-h-[60dvh]">
        <EmptyState
          place
          title="Nothing here yet"
          action={
            <ButtonLink to="/orders/new" variant="primary" size="large">
              Send a drawing
            </ButtonLink>
          }
        >
          Drop a DXF of your parts on the next page, and within seconds you see every part, its price and its
          date.
        </EmptyState>
      </div>
    </>
  );
}

export const meta: Route.MetaFunction = () => [{ title: "Orders · Kerfpost" }];

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
