import { Link } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { ActForm, ActNotice } from "~/components/act-form";
import { Button } from "~/components/button";
import { DateTime } from "~/components/date-time";
import { DefinitionList } from "~/components/definition-list";
import { EmptyState } from "~/components/empty-state";
import { ErrorPanel } from "~/components/error-panel";
import { Notice } from "~/components/notice";
import { PageHeader } from "~/components/page-header";
import { Rail, RailSection } from "~/components/rail";
import { seenAnew } from "~/components/seen-anew";
import { Sheet } from "~/components/sheet";
import { SheetViewer } from "~/components/sheet-viewer/sheet-viewer";
import { NestOrdersList } from "~/components/shop/nest-orders-list";
import { NestPoolRail } from "~/components/shop/nest-pool";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { formatMinutes } from "~/domain/units";
import { nestOrders } from "~/flows/nest-orders.server";
import { dispatchAct, formAct } from "../dispatch-act.server";
import type { Route } from "./+types/nest-desk";
import { type NestProposalView, nestList, nestPool, nestProposal, readStock } from "./nest-view.server";

const lockSchema = z.object({
  materialId: z.string(),
  requestId: z.uuid(),
  /** Each order with the version that was seen: `id:version`. */
  order: z.array(z.string().regex(/^[^:]+:\d+$/)).min(1, "Choose at least one order."),
});

export async function loader(args: Route.LoaderArgs) {
  const person = await requireAct(args, "nest.edit");
  const { searchParams } = args.url;
  const stock = readStock(searchParams.get("stock"));
  const chosen = searchParams.getAll("order");
  return {
    pool: await nestPool(),
    stock: searchParams.get("stock"),
    chosen,
    proposal: stock && chosen.length > 0 ? await nestProposal(person, stock, chosen) : null,
    nothingChosen: stock !== null && chosen.length === 0,
    nests: await nestList(),
    requestId: crypto.randomUUID(),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "nest.edit");
  return dispatchAct(await args.request.formData(), {
    lock: formAct(lockSchema, async ({ materialId, requestId, order }) => {
      const versions = Object.fromEntries(
        order.map((one) => {
          const [id = "", version] = one.split(":");
          return [id, Number(version)];
        }),
      );
      const verdict = await nestOrders({
        actor: person,
        materialId,
        orderIds: Object.keys(versions),
        versions,
        requestId,
      });
      return verdict.ok ? { ok: true, leadsTo: `/shop/nest/${verdict.nest.id}` } : verdict;
    }),
  });
}

export const shouldRevalidate = seenAnew;

export const meta: Route.MetaFunction = () => [{ title: "Nest desk · Kerfpost" }];

export default function NestDesk({ loaderData, actionData }: Route.ComponentProps) {
  const { pool, stock, chosen, proposal, nests, requestId, nothingChosen } = loaderData;
  const laid = proposal?.ok ? proposal : null;
  const waiting = pool.reduce((total, { pieces }) => total + pieces, 0);
  return (
    <>
      <PageHeader
        eyebrow={
          laid
            ? [
                laid.stock.name,
                laid.stock.lot && `lot ${laid.stock.lot}`,
                `${laid.stock.sheet.length} × ${laid.stock.sheet.width}`,
              ]
                .filter(Boolean)
                .join(" · ")
            : `${waiting} ${waiting === 1 ? "piece waits" : "pieces wait"} on ${pool.length} ${pool.length === 1 ? "stock" : "stocks"}`
        }
        title={
          laid
            ? `${laid.sheets.length} ${laid.sheets.length === 1 ? "sheet" : "sheets"}, not locked yet`
            : "Nest desk"
        }
      />
      <ActNotice reply={actionData} />
      {proposal && !proposal.ok && <Notice title="No nest">{proposal.words}</Notice>}
      {nothingChosen && <Notice>Tick at least one order of the stock.</Notice>}
      <div className="grid items-start gap-5 lg:grid-cols-[15rem_minmax(0,1fr)] xl:grid-cols-[15rem_minmax(0,1fr)_20rem]">
        <NestPoolRail pool={pool} stock={stock} chosen={chosen} />
        {laid ? (
          <>
            <div className="min-w-0 space-y-5">
              {laid.sheets.map((sheet, index) => (
                <Sheet key={sheetKey(sheet)} label={`Sheet ${index + 1} of ${laid.sheets.length}`}>
                  <h2 className="border-b border-line px-4 py-2 text-small font-semibold">
                    Sheet {index + 1} of {laid.sheets.length}
                  </h2>
                  <SheetViewer sheet={sheet} label={`Sheet ${index + 1} of ${laid.sheets.length}`} />
                </Sheet>
              ))}
            </div>
            <div className="lg:col-start-2 xl:col-start-auto">
              <ProposalRail proposal={laid} requestId={requestId} />
            </div>
          </>
        ) : (
          <div className="min-w-0 space-y-5 xl:col-span-2">
            {pool.length > 0 && (
              <EmptyState place>
                Choose orders on one stock at the left and lay them out: the sheets appear here.
              </EmptyState>
            )}
            <NestTable nests={nests} />
          </div>
        )}
      </div>
    </>
  );
}

const sheetKey = (sheet: NestProposalView["sheets"][number]): string => sheet.parts[0]?.id ?? "empty";

function ProposalRail({
  proposal,
  requestId,
}: {
  readonly proposal: NestProposalView;
  readonly requestId: string;
}) {
  const { sheets, orders, areaBound, minutes, materialId } = proposal;
  return (
    <Rail label="This nest">
      <NestOrdersList orders={orders} />
      <RailSection
        title="Sheets"
        note={<span className="text-price text-ink">{sheets.length}</span>}
        measured
      >
        <DefinitionList
          items={[
            { term: "Area bound", value: String(areaBound), note: "no nest of these boxes needs fewer" },
            { term: "Router", value: formatMinutes(minutes) },
          ]}
        />
        <div className="mt-3">
          <ActForm intent="lock" fields={{ materialId, requestId }}>
            {(pending) => (
              <>
                {orders.map(({ id, version }) => (
                  <input key={id} type="hidden" name="order" value={`${id}:${version}`} />
                ))}
                <Button variant="primary" size="large" wide pending={pending}>
                  Lock {sheets.length} {sheets.length === 1 ? "sheet" : "sheets"}
                </Button>
              </>
            )}
          </ActForm>
        </div>
      </RailSection>
    </Rail>
  );
}

function NestTable({ nests }: { readonly nests: Route.ComponentProps["loaderData"]["nests"] }) {
  if (nests.length === 0) return null;
  return (
    <Sheet padded>
      <Table caption="Nests" captionShown>
        <TableHead>
          <HeadCell>nest</HeadCell>
          <HeadCell>stock</HeadCell>
          <HeadCell>stands</HeadCell>
          <HeadCell numeric>sheets</HeadCell>
          <HeadCell numeric>pieces</HeadCell>
          <HeadCell numeric>locked</HeadCell>
        </TableHead>
        <tbody>
          {nests.map((nest) => (
            <TableRow key={nest.id}>
              <RowHead measured>
                <Link to={`/shop/nest/${nest.id}`} className="text-blue underline underline-offset-2">
                  N-{nest.number}
                </Link>
              </RowHead>
              <Cell>{nest.material}</Cell>
              <Cell>{nest.status}</Cell>
              <Cell numeric>{nest.sheets}</Cell>
              <Cell numeric>{nest.pieces}</Cell>
              <Cell numeric>{nest.lockedAt && <DateTime at={nest.lockedAt} show="day-time" />}</Cell>
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
