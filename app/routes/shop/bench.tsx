import { Link, redirect, useNavigate } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { DateTime } from "~/components/date-time";
import { EmptyState } from "~/components/empty-state";
import { ErrorPanel } from "~/components/error-panel";
import { PageHeader } from "~/components/page-header";
import { Sheet } from "~/components/sheet";
import { ScanField } from "~/components/shipping/scan-field";
import { db } from "~/db/client.server";
import { findPieceByCode } from "~/models/pieces.server";
import type { Route } from "./+types/bench";
import { benchList } from "./bench-view.server";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "queue.read");
  const scanned = args.url.searchParams.get("scan")?.trim();
  const piece = scanned ? await findPieceByCode(db, scanned) : undefined;
  if (piece) throw redirect(`/shop/bench/orders/${piece.orderId}`);
  return { ...(await benchList()), unknown: scanned ?? null };
}

export const meta: Route.MetaFunction = () => [{ title: "Bench · Kerfpost" }];

export default function Bench({ loaderData }: Route.ComponentProps) {
  const { sheets, orders, unknown } = loaderData;
  const navigate = useNavigate();
  const scan = (typed: string): string => {
    const order = orders.find(({ reference }) => reference.toUpperCase() === typed.trim().toUpperCase());
    void navigate(
      order ? `/shop/bench/orders/${order.id}` : `/shop/bench?${new URLSearchParams({ scan: typed.trim() })}`,
    );
    return typed;
  };
  return (
    <>
      <PageHeader
        eyebrow={`${sheets.length} ${sheets.length === 1 ? "sheet" : "sheets"} with tabs on`}
        title="Tabs off"
      />
      <Sheet label="Scan" padded>
        <ScanField
          size="floor"
          label="Scan any part's label"
          hint="Or type an order's reference, like KP-2047"
          onScan={scan}
        />
        {unknown && <p className="text-floor text-amber">No piece has the code {unknown}.</p>}
      </Sheet>
      {sheets.length === 0 ? (
        <EmptyState place>Nothing lies at the bench: no cut piece has its tabs on.</EmptyState>
      ) : (
        <div className="grid gap-5 lg:grid-cols-2">
          <Sheet label="By sheet">
            <h2 className="border-b border-line px-5 py-3 text-floor font-semibold">By sheet</h2>
            <ul className="divide-y divide-line">
              {sheets.map(({ id, nest, number, material, waiting, orders: on }) => (
                <li key={id}>
                  <Row
                    to={`/shop/bench/sheets/${id}`}
                    name={`Nest ${nest}, sheet ${number}`}
                    facts={`${material} · ${on.join(", ")}`}
                    waiting={waiting}
                  />
                </li>
              ))}
            </ul>
          </Sheet>
          <Sheet label="By order">
            <h2 className="border-b border-line px-5 py-3 text-floor font-semibold">By order</h2>
            <ul className="divide-y divide-line">
              {orders.map(({ id, reference, name, promisedFor, waiting }) => (
                <li key={id}>
                  <Row
                    to={`/shop/bench/orders/${id}`}
                    name={`${reference} ${name}`}
                    facts={promisedFor ? <DateTime at={promisedFor} /> : ""}
                    waiting={waiting}
                  />
                </li>
              ))}
            </ul>
          </Sheet>
        </div>
      )}
    </>
  );
}

interface RowProps {
  readonly to: string;
  readonly name: string;
  readonly facts: React.ReactNode;
  readonly waiting: number;
}

function Row({ to, name, facts, waiting }: RowProps) {
  return (
    <Link
      to={to}
      className="flex min-h-14 items-center justify-between gap-4 px-5 py-3 text-floor hover:bg-blue-wash"
    >
      <span className="min-w-0 break-words">
        <span className="font-semibold text-blue">{name}</span>
        <span className="block">{facts}</span>
      </span>
      <span className="measure shrink-0">{waiting}</span>
    </Link>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
