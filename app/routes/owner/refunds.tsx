import { Link } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { DateTime } from "~/components/date-time";
import { EmptyState } from "~/components/empty-state";
import { ErrorPanel } from "~/components/error-panel";
import { Money } from "~/components/money";
import { HeaderFact, PageHeader } from "~/components/page-header";
import { Pagination } from "~/components/pagination";
import { Sheet } from "~/components/sheet";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { db } from "~/db/client.server";
import { findNames } from "~/models/people.server";
import { ledgerTotals, listOverpaid, pageOfRefunds } from "~/models/refund-list.server";
import type { Route } from "./+types/refunds";

const PAGE_SIZE = 25;
/** More than a shop lets stand. */
const MOST_OVERPAID = 50;

const pageSchema = z.coerce.number().int().min(1).catch(1);

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "refund.make");
  const page = pageSchema.parse(args.url.searchParams.get("page"));
  const { rows, found } = await pageOfRefunds(db, { page, size: PAGE_SIZE });
  const names = await findNames(
    db,
    rows.map(({ askedBy }) => askedBy),
  );
  return {
    page,
    pages: Math.max(1, Math.ceil(found / PAGE_SIZE)),
    found,
    totals: await ledgerTotals(db),
    overpaid: await listOverpaid(db, MOST_OVERPAID),
    refunds: rows.map(
      ({ id, orderId, reference, orderName, builder, amount, reason, status, askedBy, createdAt }) => ({
        id,
        orderId,
        reference,
        orderName,
        builder,
        amount,
        reason,
        status,
        by: names.get(askedBy) ?? "the payment service",
        at: createdAt.toISOString(),
      }),
    ),
  };
}

export const meta: Route.MetaFunction = () => [{ title: "Refunds · Kerfpost" }];

const STATUS_WORDS = { asked: "asked for, not answered yet", done: "given back", failed: "failed" } as const;

export default function Refunds({ loaderData }: Route.ComponentProps) {
  const { refunds, overpaid, page, pages, found, totals } = loaderData;
  return (
    <>
      <PageHeader
        eyebrow={`${found} ${found === 1 ? "refund" : "refunds"}`}
        title="Refunds"
        lead="Money goes back from an order's own page, whole or in part, to the card it came from."
        right={
          <div className="flex gap-6">
            <HeaderFact label="came in">
              <Money cents={totals.paid} />
            </HeaderFact>
            <HeaderFact label="went back">
              <Money cents={totals.refunded} />
            </HeaderFact>
          </div>
        }
      />
      {overpaid.length > 0 && <Overpaid orders={overpaid} />}
      {refunds.length === 0 ? (
        <EmptyState place>No money has gone back yet.</EmptyState>
      ) : (
        <Sheet padded>
          <Table caption="Refunds, newest first" captionShown>
            <TableHead>
              <HeadCell>order</HeadCell>
              <HeadCell>why</HeadCell>
              <HeadCell>stands</HeadCell>
              <HeadCell numeric>when</HeadCell>
              <HeadCell numeric>amount</HeadCell>
            </TableHead>
            <tbody>
              {refunds.map((refund) => (
                <TableRow key={refund.id}>
                  <RowHead>
                    <OrderLink {...refund} name={refund.orderName} />
                    <span className="block text-caption text-soft">{refund.builder}</span>
                  </RowHead>
                  <Cell>
                    {refund.reason}
                    <span className="block text-caption text-soft">{refund.by}</span>
                  </Cell>
                  <Cell>
                    <span className={refund.status === "done" ? "" : "text-amber"}>
                      {STATUS_WORDS[refund.status]}
                    </span>
                  </Cell>
                  <Cell numeric>
                    <DateTime at={refund.at} show="day-time" />
                  </Cell>
                  <Cell numeric>
                    <Money cents={refund.amount} />
                  </Cell>
                </TableRow>
              ))}
            </tbody>
          </Table>
        </Sheet>
      )}
      <Pagination page={page} pages={pages} hrefOf={(to) => (to > 1 ? `?page=${to}` : "/owner/refunds")} />
    </>
  );
}

function OrderLink({
  orderId,
  reference,
  name,
}: {
  readonly orderId: string;
  readonly reference: string;
  readonly name: string;
}) {
  return (
    <Link to={`/shop/orders/${orderId}`} className="text-blue underline underline-offset-2">
      <span className="measure">{reference}</span> {name}
    </Link>
  );
}

/** Money that is the builders': cancelled orders that were paid, payments that came too late. */
function Overpaid({ orders }: { readonly orders: Route.ComponentProps["loaderData"]["overpaid"] }) {
  return (
    <Sheet padded>
      <Table caption="To give back" captionShown>
        <TableHead>
          <HeadCell>order</HeadCell>
          <HeadCell>stands</HeadCell>
          <HeadCell numeric>paid beyond what is owed</HeadCell>
        </TableHead>
        <tbody>
          {orders.map((order) => (
            <TableRow key={order.orderId}>
              <RowHead>
                <OrderLink {...order} />
              </RowHead>
              <Cell>{order.stage}</Cell>
              <Cell numeric>
                <span className="text-amber">
                  <Money cents={order.over} currency={order.currency} />
                </span>
              </Cell>
            </TableRow>
          ))}
        </tbody>
      </Table>
    </Sheet>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
