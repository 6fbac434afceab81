import { requireOrder } from "~/auth/guards.server";
import { ActNotice } from "~/components/act-form";
import { Beside } from "~/components/beside";
import { DateTime } from "~/components/date-time";
import { dateWords } from "~/components/date-words";
import { ErrorPanel } from "~/components/error-panel";
import { Money } from "~/components/money";
import { FitReport } from "~/components/order/fit-report";
import { OrderDrawing } from "~/components/order/order-drawing";
import { isLate, ruleOf } from "~/components/order/order-rule";
import { PartsList } from "~/components/order/parts-list";
import { PriceLines } from "~/components/order/price-lines";
import { useOrderFocus } from "~/components/order/use-order-focus";
import { HeaderFact, PageHeader } from "~/components/page-header";
import { Rail, RailSection } from "~/components/rail";
import { seenAnew } from "~/components/seen-anew";
import { ExceptionActs } from "~/components/shop/exception-acts";
import { NextActs } from "~/components/shop/next-acts";
import { BuilderFacts, StockFacts } from "~/components/shop/order-facts";
import { moveWords, OrderHistory } from "~/components/shop/order-history";
import { PaymentsLedger } from "~/components/shop/payments-ledger";
import { PiecesTable } from "~/components/shop/pieces-table";
import { useShopZone } from "~/components/shop-zone";
import { SteelRule } from "~/components/steel-rule";
import { TextLink } from "~/components/text-link";
import { Thread } from "~/components/thread/thread";
import type { Route } from "./+types/order";
import { actOnStaffOrder } from "./order-acts.server";
import { type StaffOrderView, staffOrderView } from "./order-view.server";

export async function loader(args: Route.LoaderArgs) {
  const { person, order } = await requireOrder(args, "queue.read", args.params.orderId);
  return staffOrderView(order, person);
}

export async function action(args: Route.ActionArgs) {
  const { person, order } = await requireOrder(args, "queue.read", args.params.orderId);
  return actOnStaffOrder(await args.request.formData(), { person, orderId: order.id });
}

export const shouldRevalidate = seenAnew;

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.reference ?? "Order"} · Kerfpost` },
];

const NO_FROZEN = { drawings: [], parts: [], findings: [], geometryKey: null };

export default function StaffOrder({ loaderData: order, actionData }: Route.ComponentProps) {
  const { drawings, parts, findings, geometryKey } = order.frozen ?? NO_FROZEN;
  const focus = useOrderFocus(parts, drawings);
  const [last] = order.moves;
  return (
    <>
      <Heading order={order} />
      <ActNotice
        reply={actionData}
        meanwhile={
          last && (
            <>
              Last: {moveWords(last)}, <DateTime at={last.at} show="day-time" />.
            </>
          )
        }
      />
      <Beside
        main={
          <div className="space-y-5">
            <OrderDrawing
              orderId={order.id}
              geometryKey={geometryKey}
              drawings={drawings}
              parts={parts}
              findings={findings}
              focus={focus}
            />
            <PiecesTable pieces={order.pieces} />
            <Thread
              orderId={order.id}
              audience="staff"
              pointing={focus.pointing}
              onOpenSpot={focus.openSpot}
            />
          </div>
        }
        rail={
          <>
            <div id="acts" tabIndex={-1} className="scroll-mt-4 outline-none">
              <Rail label="Acts">
                <NextActs order={order} />
                <ExceptionActs order={order} />
              </Rail>
            </div>
            <Rail label="The order">
              <StockFacts stocks={order.stocks} />
              {parts.length > 0 && <PartsList parts={parts} focus={focus} />}
              {order.frozen && <FitReport findings={findings} focus={focus} />}
              <BuilderFacts order={order} />
              <Quote order={order} />
              <PaymentsLedger order={order} />
              <OrderHistory moves={order.moves} />
            </Rail>
          </>
        }
      />
    </>
  );
}

function Heading({ order }: { readonly order: StaffOrderView }) {
  const zone = useShopZone();
  const { stages, at, late } = ruleOf(order.rule, zone);
  const due = order.rule.shippedAt ?? order.rule.promisedFor;
  const between = ["on-hold", "needs-review", "cancelled"].includes(order.stage);
  return (
    <>
      <PageHeader
        eyebrow={
          <>
            <TextLink to="/shop">Queue</TextLink> · {order.reference}
            {order.frozen && ` · rev ${order.frozen.revision}`}
            {order.trial && " · trial"}
            {order.builder && ` · ${order.builder.name}`}
          </>
        }
        title={order.name}
        right={
          <div className="flex flex-wrap items-end gap-x-6 gap-y-2">
            {between && (
              <HeaderFact label="stands" late>
                {order.stage}
              </HeaderFact>
            )}
            {due && order.stage !== "cancelled" && (
              <HeaderFact
                label={order.rule.shippedAt ? "shipped" : order.delivery === "pick-up" ? "ready" : "ships"}
                late={isLate(order.rule)}
              >
                {dateWords(new Date(due), zone)}
              </HeaderFact>
            )}
            <a
              href="#acts"
              className="text-small text-blue underline underline-offset-2 lg:hidden print:hidden"
            >
              What to do
            </a>
          </div>
        }
      />
      {order.stage !== "cancelled" && <SteelRule stages={stages} at={at} late={late} />}
    </>
  );
}

function Quote({ order }: { readonly order: StaffOrderView }) {
  const quote = order.frozen?.quote;
  if (!quote) return null;
  return (
    <RailSection
      title={`Quote ${quote.number}`}
      note={<Money cents={quote.total} currency={quote.currency} />}
    >
      <PriceLines lines={quote.lines} currency={quote.currency} />
      <p className="mt-2 text-caption text-soft">
        {quote.approvedAt ? (
          <>
            Part list and sizes approved by the builder <DateTime at={quote.approvedAt} show="day-time" />.
          </>
        ) : (
          "The builder has not approved the part list and sizes."
        )}
      </p>
    </RailSection>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
