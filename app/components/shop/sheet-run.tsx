import { Link } from "react-router";
import { shownDay } from "~/domain/scheduling";
import { formatMinutes } from "~/domain/units";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { plainField } from "../field";
import { TextField } from "../text-field";

interface SheetRunProps {
  readonly sheet: {
    readonly sheetId: string;
    readonly nestId: string;
    readonly nestNumber: number;
    readonly number: number;
    readonly estimatedMinutes: number;
    readonly run: RunFacts | null;
  };
  readonly mayRun: boolean;
}

export interface RunFacts {
  readonly id: string;
  readonly version: number;
  readonly machine: string;
  readonly day: string;
  readonly plannedMinutes: number;
  readonly startedAt: string | null;
  readonly finishedAt: string | null;
}

/** A sheet of the order with its turn on the router: where it lies, and its start and finish. */
export function SheetRun({ sheet, mayRun }: SheetRunProps) {
  const { run } = sheet;
  return (
    <li className="space-y-2 py-2 first:pt-0">
      <p className="flex flex-wrap items-baseline justify-between gap-x-4">
        <Link to={`/shop/nest/${sheet.nestId}`} className="measure text-blue underline underline-offset-2">
          N-{sheet.nestNumber} sheet {sheet.number}
        </Link>
        <span className="measure">{formatMinutes(run?.plannedMinutes ?? sheet.estimatedMinutes)}</span>
      </p>
      {run ? (
        <>
          <p className="text-soft">
            router {run.machine}, <span className="measure">{shownDay(run.day)}</span>
            {run.startedAt && !run.finishedAt ? ", being cut" : ""}
          </p>
          {mayRun && <RunActs run={run} />}
        </>
      ) : (
        <p className="text-amber">
          Not on a machine's day yet.{" "}
          {mayRun && <Link to={`/shop/schedule?sheet=${sheet.sheetId}`}>Schedule it</Link>}
        </p>
      )}
    </li>
  );
}

/** Start a run, or finish it with the minutes it took. */
export function RunActs({ run }: { readonly run: RunFacts }) {
  if (run.finishedAt) return null;
  const fields = { key: run.id, runId: run.id, runVersion: run.version };
  if (!run.startedAt)
    return (
      <ActForm intent="start-run" fields={fields}>
        {(pending) => (
          <Button size="small" pending={pending}>
            Start cutting
          </Button>
        )}
      </ActForm>
    );
  return (
    <ActForm intent="finish-run" fields={fields}>
      {(pending) => (
        <div className="flex flex-wrap items-end gap-2">
          <div className="w-32">
            <TextField
              field={plainField("minutes", { id: `minutes-${run.id}` })}
              label="It took"
              type="number"
              min={0}
              step="any"
              measured
              unit="min"
              placeholder={String(Math.round(run.plannedMinutes))}
            />
          </div>
          <Button pending={pending}>Finish</Button>
        </div>
      )}
    </ActForm>
  );
}
