import { Link } from "react-router";
import { shownDay } from "~/domain/scheduling";
import { formatMinutes } from "~/domain/units";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { CheckboxField } from "../checkbox-field";
import { plainField } from "../field";
import { SelectField } from "../select-field";
import type { LooseSheet, OnSheet, ScheduledRun } from "./schedule-view";
import { RunActs } from "./sheet-run";

export interface Places {
  readonly machines: readonly { readonly id: string; readonly name: string }[];
  readonly days: readonly { readonly day: string; readonly words: string }[];
}

interface PlaceFormProps {
  readonly sheetId: string;
  /** Of the run it has; 0 when it has none. */
  readonly runVersion: number;
  readonly places: Places;
  readonly at?: { readonly machineId: string; readonly day: string };
}

/** Puts a sheet on a machine's day, or moves it there. */
export function PlaceForm({ sheetId, runVersion, places, at }: PlaceFormProps) {
  const isMove = at !== undefined;
  if (places.days.length === 0)
    return <p className="text-caption text-soft">This week is over; show a later one to schedule.</p>;
  return (
    <ActForm intent="schedule" fields={{ key: sheetId, sheetId, runVersion }}>
      {(pending) => (
        <div className="space-y-2">
          <div className="grid grid-cols-2 gap-2">
            <SelectField
              field={plainField("machineId", {
                id: `machine-${sheetId}`,
                value: at?.machineId ?? places.machines[0]?.id,
                required: true,
              })}
              label="Router"
              choices={places.machines.map(({ id, name }) => ({ value: id, label: name }))}
            />
            <SelectField
              field={plainField("day", {
                id: `day-${sheetId}`,
                value: places.days.some(({ day }) => day === at?.day) ? at?.day : places.days[0]?.day,
                required: true,
              })}
              label="Day"
              choices={places.days.map(({ day, words }) => ({ value: day, label: words }))}
            />
          </div>
          <CheckboxField
            field={plainField("overbook", { id: `overbook-${sheetId}` })}
            label="Even if the day is full"
          />
          <Button size="small" variant={isMove ? "plain" : "chosen"} pending={pending}>
            {isMove ? "Move it" : "Put it on"}
          </Button>
        </div>
      )}
    </ActForm>
  );
}

const OrdersOnSheet = ({ orders }: { readonly orders: readonly OnSheet[] }) =>
  orders.map(({ id, reference, name, pieces }) => (
    <p key={id} className="text-caption text-soft">
      <Link to={`/shop/orders/${id}`} className="measure text-blue underline underline-offset-2">
        {reference}
      </Link>{" "}
      {name}, {pieces} {pieces === 1 ? "piece" : "pieces"}
    </p>
  ));

/** A sheet of a locked nest that is on no machine's day yet. */
export function LooseSheetItem({
  sheet,
  places,
  asked,
}: {
  readonly sheet: LooseSheet;
  readonly places: Places;
  readonly asked: boolean;
}) {
  return (
    <li
      className={`space-y-2 border-l-4 px-4 py-3 ${asked ? "border-l-blue bg-blue-wash" : "border-l-transparent"}`}
    >
      <p className="flex items-baseline justify-between gap-3">
        <Link
          to={`/shop/nest/${sheet.nestId}`}
          className="measure font-semibold text-blue underline underline-offset-2"
        >
          {sheet.label}
        </Link>
        <span className="measure">{formatMinutes(sheet.minutes)}</span>
      </p>
      <p>
        {sheet.material}
        {sheet.due && (
          <>
            , due <span className="measure">{shownDay(sheet.due)}</span>
          </>
        )}
      </p>
      <OrdersOnSheet orders={sheet.orders} />
      <PlaceForm sheetId={sheet.id} runVersion={0} places={places} />
    </li>
  );
}

/** A run under its day: what lies on it, its acts, and how it is moved. */
export function RunItem({ run, places }: { readonly run: ScheduledRun; readonly places: Places }) {
  const late = run.overdue || run.tooLateFor.length > 0;
  return (
    <li className="border-t border-dashed border-line first:border-t-0">
      <details>
        <summary className="flex flex-wrap items-baseline justify-between gap-x-4 py-1.5">
          <span>
            <span className="measure font-semibold">{run.label}</span> {run.material}
            <span className="text-soft">
              {" "}
              {run.orders.map(({ reference }) => reference).join(", ")}
              {run.finishedAt ? ", cut" : run.startedAt ? ", being cut" : ""}
            </span>
            {late && <span className="text-amber"> {lateWords(run)}</span>}
          </span>
          <span className="measure">
            {run.actualMinutes === null
              ? formatMinutes(run.plannedMinutes)
              : `${formatMinutes(run.actualMinutes)} of ${formatMinutes(run.plannedMinutes)}`}
          </span>
        </summary>
        <div className="space-y-3 border-l-4 border-line py-2 pl-4">
          <OrdersOnSheet orders={run.orders} />
          <Link to={`/shop/nest/${run.nestId}`} className="text-blue underline underline-offset-2">
            The sheet
          </Link>
          <RunActs run={run} />
          {!run.startedAt && (
            <div className="max-w-md">
              <PlaceForm sheetId={run.sheetId} runVersion={run.version} places={places} at={run} />
            </div>
          )}
        </div>
      </details>
    </li>
  );
}

const lateWords = ({ overdue, day, tooLateFor }: ScheduledRun): string =>
  overdue ? `late: was for ${shownDay(day)}` : `after the day of ${tooLateFor.join(", ")}`;
