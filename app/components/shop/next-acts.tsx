import { Link } from "react-router";
import { formatMinutes } from "~/domain/units";
import type { StaffOrderView } from "~/routes/shop/order-view.server";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { ButtonLink } from "../button-link";
import { CheckboxField } from "../checkbox-field";
import { plainField } from "../field";
import { RailSection } from "../rail";
import { MoveAct, movedBy, ReasonedAct } from "./act-parts";
import { SheetRun } from "./sheet-run";

const count = (number: number, noun: string): string => `${number} ${noun}${number === 1 ? "" : "s"}`;

/** What comes next on an order, as the acts that do it. */
export function NextActs({ order }: { readonly order: StaffOrderView }) {
  const { acts, stage } = order;
  const good = order.pieces.filter(({ state }) => state === "good");
  const at = (where: string) => good.filter((piece) => piece.stage === where);
  const live = stage !== "on-hold" && stage !== "cancelled";
  const openSheets = order.sheets.filter(({ status }) => status === "planned" || status === "cutting");
  const toCut = openSheets.length > 0 && at("nested").length > 0;
  return (
    <RailSection title="Next" note={nextNote(order)}>
      <div className="space-y-3">
        {stage === "needs-review" && (
          <>
            <MoveAct
              order={order}
              intent="accept-review"
              state={acts["accept-review"]}
              label="Accept as quoted"
            />
            <ReasonedAct
              order={order}
              intent="send-back"
              state={acts["send-back"]}
              label="Send back"
              question="The order goes back to draft; the builder is told why and changes it."
              ask="What has to change"
              confirm="Send it back"
            />
          </>
        )}
        {stage === "paid" && <MoveAct order={order} intent="receive" state={acts.receive} label="Receive" />}
        {stage === "on-hold" && (
          <>
            <p className="text-amber">{order.holdReason}</p>
            <MoveAct
              order={order}
              intent="release"
              state={acts.release}
              label={`Release to ${order.heldFrom ?? "where it stood"}`}
            />
          </>
        )}
        {live && at("received").length > 0 && acts.nest && <NestLinks order={order} />}
        {live && toCut && (
          <ul className="divide-y divide-line">
            {openSheets.map((sheet) => (
              <SheetRun key={sheet.sheetId} sheet={sheet} mayRun={order.mayRun} />
            ))}
          </ul>
        )}
        {live && at("nested").length > 0 && acts.cut?.may && (
          <MoveAct
            order={order}
            intent="cut-all"
            state={acts.cut}
            primary={false}
            label={`Mark ${count(at("nested").length, "piece")} cut without a run`}
          />
        )}
        {live && at("cut").length > 0 && <TabsOff order={order} />}
        {stage === "tabs-removed" && <ToShipping order={order} />}
      </div>
    </RailSection>
  );
}

function nextNote({ stage, frozen }: StaffOrderView): string | undefined {
  if (stage === "shipped") return "nothing: it is shipped";
  if (stage === "cancelled") return "nothing: it is cancelled";
  if (stage === "draft" || stage === "quoted") return "waits for its builder";
  return frozen?.quote ? `${formatMinutes(frozen.quote.machineMinutes)} on the router` : undefined;
}

/** One link for each stock that pieces wait on. */
function NestLinks({ order }: { readonly order: StaffOrderView }) {
  const waiting = (groupId: string) =>
    order.pieces.filter(
      (piece) => piece.stockGroupId === groupId && piece.stage === "received" && piece.state === "good",
    ).length;
  return order.stocks
    .filter(({ id }) => waiting(id) > 0)
    .map((stock) => (
      <ButtonLink
        key={stock.id}
        wide
        variant="primary"
        to={`/shop/nest?${new URLSearchParams({ stock: `${stock.materialId}.${stock.lotId ?? ""}`, order: order.id })}`}
      >
        {`Nest ${count(waiting(stock.id), "piece")} of ${stock.material}`}
      </ButtonLink>
    ));
}

function TabsOff({ order }: { readonly order: StaffOrderView }) {
  const cut = order.pieces.filter(({ stage, state }) => stage === "cut" && state === "good");
  const state = order.acts["remove-tabs"];
  return (
    <>
      <MoveAct
        order={order}
        intent="tabs-all"
        state={state}
        label={`Tabs off: all ${count(cut.length, "piece")} good`}
      />
      {state?.may && (
        <ButtonLink wide to={`/shop/bench/orders/${order.id}`}>
          Piece by piece at the bench
        </ButtonLink>
      )}
      {state?.may && cut.length > 1 && (
        <details>
          <summary className="text-blue">Only some of them</summary>
          <ActForm intent="tabs-some" fields={movedBy(order)} label="Tabs off some pieces">
            <div className="my-2 grid max-h-72 grid-cols-2 gap-x-4 overflow-y-auto">
              {cut.map((piece) => (
                <CheckboxField
                  key={piece.id}
                  field={plainField("piece", { id: `tabs-${piece.id}` })}
                  value={piece.id}
                  label={
                    <span className="measure">
                      {piece.label} {piece.number}/{piece.of}
                    </span>
                  }
                />
              ))}
            </div>
            <Button>Tabs off the ticked</Button>
          </ActForm>
        </details>
      )}
    </>
  );
}

function ToShipping({ order }: { readonly order: StaffOrderView }) {
  if (order.mayShip)
    return (
      <ButtonLink to={`/shipping/${order.id}`} variant={order.acts.ship?.may ? "primary" : "plain"} wide>
        {order.delivery === "pick-up" ? "Hand over" : "Pack and ship"}
      </ButtonLink>
    );
  return (
    <p>
      The clerk packs it now. <Link to={`/shipping/${order.id}`}>What goes in which parcel</Link>
    </p>
  );
}
