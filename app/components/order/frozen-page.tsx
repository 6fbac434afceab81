import type { FrozenView } from "~/routes/builder/frozen-view.server";
import type { OrderView } from "~/routes/builder/order-view.server";
import { Rail, RailSection } from "../rail";
import { Sheet } from "../sheet";
import { Thread } from "../thread/thread";
import { AskReview } from "./ask-review";
import { CancelOrder } from "./cancel-order";
import { Cautions } from "./cautions";
import { placeWords } from "./delivery-panel";
import { FitReport } from "./fit-report";
import { formatThickness } from "./format-thickness";
import { OrderDrawing } from "./order-drawing";
import { OrderHeading } from "./order-heading";
import { OrderHistory } from "./order-history";
import { OrderLayout } from "./order-layout";
import { PartsList } from "./parts-list";
import { PayPanel } from "./pay-panel";
import { ProgressPanel } from "./progress-panel";
import { ReceiptPanel } from "./receipt-panel";
import { StageNotice } from "./stage-notice";
import { useOrderFocus } from "./use-order-focus";

interface FrozenPageProps {
  readonly order: OrderView;
  readonly frozen: FrozenView;
}

/** An order as it was frozen: to be approved and paid, or on its way through the shop. */
export function FrozenPage({ order, frozen }: FrozenPageProps) {
  const focus = useOrderFocus(frozen.parts, frozen.drawings);
  const { quote, parts, stocks } = frozen;
  const paid = frozen.money.length > 0;
  const beforePaying = order.stage === "quoted" || order.stage === "needs-review";
  const counts = {
    kinds: parts.length,
    pieces: parts.reduce((total, part) => total + part.quantity, 0),
  };
  return (
    <>
      <OrderHeading order={order} promised={quote?.promisedFor ?? null} />
      <StageNotice order={order} />
      <OrderLayout
        drawing={
          <OrderDrawing
            orderId={order.id}
            geometryKey={frozen.geometryKey}
            drawings={frozen.drawings}
            parts={parts}
            findings={frozen.findings}
            focus={focus}
          />
        }
        rail={
          <Rail label="The order">
            {paid && order.stage !== "cancelled" && (
              <ProgressPanel
                pieces={frozen.pieces}
                parcels={frozen.parcels}
                pickUp={order.delivery === "pick-up"}
              />
            )}
            {(beforePaying || frozen.findings.length > 0) && (
              <FitReport findings={frozen.findings} focus={focus} answering={beforePaying} />
            )}
            <PartsList
              parts={parts}
              focus={focus}
              note={stocks.length === 1 ? stockWords(stocks[0]) : undefined}
            />
            {quote &&
              (paid ? (
                <ReceiptPanel quote={quote} money={frozen.money} />
              ) : (
                <PayPanel order={order} quote={quote} checkout={frozen.checkout} counts={counts} />
              ))}
          </Rail>
        }
        below={
          <>
            <Thread
              orderId={order.id}
              audience="builder"
              pointing={focus.pointing}
              onOpenSpot={focus.openSpot}
            />
            <div className="grid items-start gap-5 xl:grid-cols-2">
              <Sheet padded>
                <h2 className="mb-2 text-lead font-semibold">What happened</h2>
                <OrderHistory moves={order.moves} />
              </Sheet>
              <Rail label="Terms of the order">
                <RailSection title="Stock">
                  <ul className="space-y-1">
                    {stocks.map((stock) => (
                      <li key={stock.id}>
                        {stockWords(stock)}
                        {stocks.length > 1 && (
                          <span className="measure text-soft"> · {stock.labels.join(" ")}</span>
                        )}
                      </li>
                    ))}
                  </ul>
                </RailSection>
                <RailSection title="Where it goes">
                  <p>
                    {order.delivery === "pick-up"
                      ? `You pick it up: ${order.shop.address.join(", ")}`
                      : order.shipTo && placeWords(order.shipTo)}
                  </p>
                </RailSection>
                <RailSection title="Take care">
                  <Cautions />
                </RailSection>
                {(frozen.mayCancel || frozen.mayAskReview) && (
                  <div className="flex flex-wrap items-center gap-x-6 gap-y-2 px-4 py-3 print:hidden">
                    {frozen.mayAskReview && <AskReview order={order} />}
                    {frozen.mayCancel && <CancelOrder order={order} paid={paid} />}
                  </div>
                )}
              </Rail>
            </div>
          </>
        }
      />
    </>
  );
}

const stockWords = (stock: FrozenView["stocks"][number] | undefined): string | undefined =>
  stock &&
  `${stock.material}${stock.lot ? `, lot ${stock.lot}` : ""}${stock.thickness ? `, measures ${formatThickness(stock.thickness)}` : ""}`;
