import { useState } from "react";
import type { Interpretation } from "~/domain/orders";
import type { DraftView } from "~/routes/builder/draft-view.server";
import type { OrderView } from "~/routes/builder/order-view.server";
import { Rail } from "../rail";
import { Sheet } from "../sheet";
import { Thread } from "../thread/thread";
import { AddDrawings } from "./add-drawings";
import { CancelOrder } from "./cancel-order";
import { ChoicesPanel } from "./choices-panel";
import { DeliveryPanel } from "./delivery-panel";
import { FileSheet } from "./file-sheet";
import { FirstQuestions } from "./first-questions";
import { FitReport } from "./fit-report";
import { formatThickness } from "./format-thickness";
import { OrderDrawing } from "./order-drawing";
import { OrderHeading } from "./order-heading";
import { OrderLayout } from "./order-layout";
import { PartChoice } from "./part-choice";
import { PartsList } from "./parts-list";
import { PricePanel } from "./price-panel";
import { QuoteAct } from "./quote-act";
import { UndoChoice } from "./undo-choice";
import { useOrderFocus } from "./use-order-focus";
import { usePrice } from "./use-price";

interface DraftPageProps {
  readonly order: OrderView;
  readonly draft: DraftView;
}

/** An order that is still being made: drawing, questions, fit, parts, price, and everything that changes them. */
export function DraftPage({ order, draft }: DraftPageProps) {
  const focus = useOrderFocus(draft.parts, draft.drawings);
  const [ahead, setAhead] = useState<{ readonly after: number; readonly content: Interpretation } | null>(
    null,
  );
  const content = ahead?.after === draft.after ? ahead.content : draft.content;
  const { price, stale } = usePrice({
    orderId: order.id,
    version: order.version,
    content,
    delivery: draft.supposed,
    first: draft.price,
    saved: draft.content,
  });
  const chosen = draft.parts.find(({ label }) => label === focus.selected);
  const files = draft.files;
  return (
    <>
      <OrderHeading order={order} promised={price.ok ? price.promisedFor : null} />
      <OrderLayout
        drawing={
          <OrderDrawing
            orderId={order.id}
            geometryKey={draft.geometryKey}
            drawings={draft.drawings}
            parts={draft.parts}
            findings={draft.findings}
            focus={focus}
          />
        }
        rail={
          <>
            <Rail label="The order">
              <div id="questions" className="scroll-mt-4 empty:hidden print:hidden">
                <FirstQuestions
                  key={`${draft.unitQuestion?.shas.join(" ")}`}
                  question={draft.unitQuestion}
                  files={files}
                  stocks={draft.stocks}
                  after={draft.after}
                />
              </div>
              {draft.parts.length > 0 && (
                <FitReport findings={draft.findings} focus={focus} waitsFor={fitWaitsFor(draft)} />
              )}
              {draft.parts.length > 0 && (
                <PartsList parts={draft.parts} focus={focus} note={stockNote(draft)}>
                  {chosen && <PartChoice part={chosen} after={draft.after} />}
                </PartsList>
              )}
              <DeliveryPanel
                delivery={draft.delivery}
                shipTo={draft.shipTo}
                addresses={draft.addresses}
                shopAddress={order.shop.address}
                version={order.version}
              />
              <PricePanel price={price} stale={stale} supposing={supposing(draft)}>
                <QuoteAct
                  version={order.version}
                  requestId={order.requestId}
                  files={files}
                  findings={draft.findings}
                  delivered={draft.delivery !== null}
                  saving={JSON.stringify(content) !== JSON.stringify(draft.content)}
                />
              </PricePanel>
            </Rail>
            <Sheet padded>
              <h2 className="mb-3 text-lead font-semibold">Choices</h2>
              <ChoicesPanel
                saved={draft.content}
                files={files}
                after={draft.after}
                onAhead={(next) => setAhead({ after: draft.after, content: next })}
              />
            </Sheet>
            <CancelOrder order={order} />
          </>
        }
        below={
          <>
            <Sheet>
              <div id="files" className="scroll-mt-4 divide-y divide-line">
                <div className="flex flex-wrap items-center justify-between gap-3 px-4 py-3 sm:px-6">
                  <h2 className="text-lead font-semibold">Drawings</h2>
                  <UndoChoice after={draft.after} />
                </div>
                {files.map((file) => (
                  <FileSheet
                    key={file.drawingId}
                    orderId={order.id}
                    version={order.version}
                    after={draft.after}
                    file={file}
                    stocks={draft.stocks}
                    alone={files.length === 1}
                  />
                ))}
                <AddDrawings orderId={order.id} upload={order.upload} />
              </div>
            </Sheet>
            <Thread
              orderId={order.id}
              audience="builder"
              pointing={focus.pointing}
              onOpenSpot={focus.openSpot}
            />
          </>
        }
      />
    </>
  );
}

function fitWaitsFor({ files }: DraftView): string | null {
  const without = files.filter(({ kinds, materialId }) => kinds > 0 && materialId === null);
  return without.length > 0 ? "Choose the stock: the fit is checked against its measured thickness." : null;
}

/** The stock of all the parts, where they have one in common. */
function stockNote({ files, stocks }: DraftView): string | undefined {
  const ids = new Set(files.filter(({ kinds }) => kinds > 0).map(({ materialId }) => materialId));
  const stock = ids.size === 1 ? stocks.find(({ id }) => ids.has(id)) : undefined;
  return stock && `${stock.name}${stock.measured ? `, measures ${formatThickness(stock.measured)}` : ""}`;
}

function supposing({ delivery, supposed }: DraftView): string | null {
  if (delivery !== null) return null;
  return supposed.delivery === "pick-up"
    ? "as picked up at the shop; freight comes with an address"
    : `as shipped to ${supposed.region}, until you say where it goes`;
}
