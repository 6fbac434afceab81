import type { ReactNode } from "react";
import { requireAct } from "~/auth/guards.server";
import { EmptyState } from "~/components/empty-state";
import { Money } from "~/components/money";
import { BarTable } from "~/components/owner/bar-table";
import { HeaderFact, PageHeader } from "~/components/page-header";
import { Sheet } from "~/components/sheet";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { STAGES } from "~/domain/orders";
import { minutesByMachine, onTimeShare, shownDay } from "~/domain/scheduling";
import { formatMinutes } from "~/domain/units";
import { countRemakes, listFinishedRuns, listShippedDates, sumRefunds } from "~/models/figures.server";
import { countByStage } from "~/models/order-list.server";
import { currentSettings } from "~/models/settings.server";
import type { Route } from "./+types/figures";

/** Runs that are shown one by one. */
const SHOWN_RUNS = 20;

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "figures.read");
  const { timeZone } = (await currentSettings(db)).shop;
  const counted = await countByStage(db, { kind: "staff" });
  const runs = await listFinishedRuns(db);
  return {
    stages: STAGES.map((stage) => ({ stage, found: counted.get(stage) ?? 0 })),
    onTime: onTimeShare(await listShippedDates(db), timeZone),
    machines: minutesByMachine(runs),
    runs: runs.slice(0, SHOWN_RUNS),
    remakes: await countRemakes(db),
    refunds: await sumRefunds(db),
  };
}

export const meta: Route.MetaFunction = () => [{ title: "Figures · Kerfpost" }];

const inPercent = (share: number): string => `${Math.round(share * 100)} %`;
const deviation = (ratio: number | null): string => (ratio === null ? "—" : inPercent(ratio));

export default function Figures({ loaderData }: Route.ComponentProps) {
  const { stages, onTime, machines, runs, remakes, refunds } = loaderData;
  const orders = stages.reduce((sum, { found }) => sum + found, 0);
  const planned = machines.reduce((sum, machine) => sum + machine.planned, 0);
  const actual = machines.reduce((sum, machine) => sum + machine.actual, 0);
  return (
    <>
      <PageHeader
        title="Figures"
        lead="Counted from what was recorded: moves, finished runs, days promised and kept."
        right={
          <div className="flex flex-wrap gap-8">
            <HeaderFact label="orders">{orders}</HeaderFact>
            <HeaderFact label="left in time">
              {onTime.shipped === 0 ? "—" : `${inPercent(onTime.onTime / onTime.shipped)}`}
            </HeaderFact>
            <HeaderFact label="minutes, actual of planned">
              {deviation(planned > 0 ? actual / planned : null)}
            </HeaderFact>
          </div>
        }
      />
      <div className="grid items-start gap-5 lg:grid-cols-2">
        <Figure title="Orders by stage">
          <BarTable
            caption="Orders by stage"
            heads={["orders"]}
            rows={stages.map(({ stage, found }) => ({
              key: stage,
              name: stage,
              bars: [found],
              numbers: [found],
            }))}
          />
        </Figure>
        <div className="min-w-0 space-y-5">
          <Figure title="Left the shop by the day promised">
            {onTime.shipped === 0 ? (
              <EmptyState>Nothing has shipped yet.</EmptyState>
            ) : (
              <BarTable
                caption="Shipped orders"
                heads={["orders"]}
                rows={[
                  { key: "in-time", name: "in time", bars: [onTime.onTime], numbers: [onTime.onTime] },
                  {
                    key: "late",
                    name: "late",
                    bars: [onTime.shipped - onTime.onTime],
                    numbers: [onTime.shipped - onTime.onTime],
                  },
                ]}
              />
            )}
          </Figure>
          <Figure title="Minutes by machine" note="light: planned, dark: actual">
            {machines.length === 0 ? (
              <EmptyState>No run is finished yet.</EmptyState>
            ) : (
              <BarTable
                caption="Planned and actual minutes by machine"
                heads={["runs", "planned", "actual", "of planned"]}
                rows={machines.map(({ machine, runs: count, planned: plan, actual: took, ratio }) => ({
                  key: machine,
                  name: machine,
                  bars: [plan, took],
                  numbers: [count, formatMinutes(plan), formatMinutes(took), deviation(ratio)],
                }))}
              />
            )}
          </Figure>
        </div>
        <Figure title="Pieces cut again, by cause">
          {remakes.length === 0 ? (
            <EmptyState>No piece was cut again.</EmptyState>
          ) : (
            <BarTable
              caption="Pieces cut again, by cause"
              heads={["pays", "pieces"]}
              rows={remakes.map(({ cause, payer, found }) => ({
                key: `${cause} ${payer}`,
                name: cause ?? "no cause given",
                bars: [found],
                numbers: [payer ?? "—", found],
              }))}
            />
          )}
        </Figure>
        <Figure title="Money given back, by reason">
          {refunds.length === 0 ? (
            <EmptyState>No money went back.</EmptyState>
          ) : (
            <BarTable
              caption="Money given back, by reason"
              heads={["refunds", "amount"]}
              rows={refunds.map(({ reason, found, amount }) => ({
                key: reason,
                name: reason,
                bars: [amount],
                numbers: [found, <Money key="amount" cents={amount} />],
              }))}
            />
          )}
        </Figure>
      </div>
      {runs.length > 0 && (
        <Figure title={`The last ${runs.length} runs`} note="light: planned, dark: actual">
          <BarTable
            caption="Planned and actual minutes of the last runs"
            heads={["day", "machine", "planned", "actual", "of planned"]}
            rows={runs.map((run) => ({
              key: run.id,
              name: (
                <TextLink to={`/shop/nest/${run.nestId}`}>
                  <span className="measure whitespace-nowrap">
                    N-{run.nest} sheet {run.sheet}
                  </span>
                </TextLink>
              ),
              bars: [run.plannedMinutes, run.actualMinutes],
              numbers: [
                shownDay(run.day),
                run.machine,
                formatMinutes(run.plannedMinutes),
                formatMinutes(run.actualMinutes),
                deviation(run.plannedMinutes > 0 ? run.actualMinutes / run.plannedMinutes : null),
              ],
            }))}
          />
        </Figure>
      )}
    </>
  );
}

interface FigureProps {
  readonly title: string;
  readonly note?: string;
  readonly children: ReactNode;
}

function Figure({ title, note, children }: FigureProps) {
  return (
    <Sheet padded>
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-x-4">
        <h2 className="text-body font-semibold">{title}</h2>
        {note && <p className="text-caption text-soft">{note}</p>}
      </div>
      {children}
    </Sheet>
  );
}
