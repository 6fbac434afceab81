import { Link } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { ActNotice } from "~/components/act-form";
import { ButtonLink } from "~/components/button-link";
import { ErrorPanel } from "~/components/error-panel";
import { Size } from "~/components/measure";
import { PageHeader } from "~/components/page-header";
import { seenAnew } from "~/components/seen-anew";
import { Sheet } from "~/components/sheet";
import { DayRule } from "~/components/shop/day-rule";
import { finishRunSchema, startRunSchema } from "~/components/shop/order-acts";
import { LooseSheetItem, type Places, RunItem } from "~/components/shop/schedule-forms";
import type { MachineDay } from "~/components/shop/schedule-view";
import { shownDay } from "~/domain/scheduling";
import { formatMinutes } from "~/domain/units";
import { finishRun } from "~/flows/finish-run.server";
import { scheduleSheet } from "~/flows/schedule-sheet.server";
import { startRun } from "~/flows/start-run.server";
import { dispatchAct, formAct } from "../dispatch-act.server";
import type { Route } from "./+types/schedule";
import { type ScheduleView, scheduleView } from "./schedule-view.server";

const scheduleSchema = z.object({
  sheetId: z.string(),
  machineId: z.string().min(1, "Choose a router."),
  day: z.iso.date("Choose a day."),
  runVersion: z.coerce.number().int(),
  overbook: z.stringbool().default(false),
});

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "schedule.edit");
  const { searchParams } = args.url;
  const week = z.iso.date().safeParse(searchParams.get("week"));
  return {
    schedule: await scheduleView(week.success ? week.data : null),
    sheet: searchParams.get("sheet"),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "schedule.edit");
  return dispatchAct(await args.request.formData(), {
    schedule: formAct(scheduleSchema, async (place) => {
      const verdict = await scheduleSheet({ actor: person, ...place });
      if (!verdict.ok) return verdict;
      const { run, bookedMinutes, openMinutes } = verdict;
      return {
        ok: true,
        words: `On ${shownDay(run.day)}: ${formatMinutes(bookedMinutes)} booked of ${formatMinutes(openMinutes)}.`,
      };
    }),
    "start-run": formAct(startRunSchema, async ({ runId, runVersion }) => {
      const verdict = await startRun({ actor: person, runId, version: runVersion });
      return verdict.ok ? { ok: true, words: "On the router." } : verdict;
    }),
    "finish-run": formAct(finishRunSchema, async ({ runId, runVersion, minutes }) => {
      const verdict = await finishRun({
        actor: person,
        runId,
        version: runVersion,
        actualMinutes: minutes,
      });
      return verdict.ok
        ? { ok: true, words: `Cut: ${verdict.moved} ${verdict.moved === 1 ? "piece" : "pieces"}.` }
        : verdict;
    }),
  });
}

export const shouldRevalidate = seenAnew;

export const meta: Route.MetaFunction = () => [{ title: "Schedule · Kerfpost" }];

export default function Schedule({ loaderData, actionData }: Route.ComponentProps) {
  const { schedule, sheet } = loaderData;
  const places: Places = {
    machines: schedule.machines.map(({ id, name }) => ({ id, name })),
    days: schedule.days,
  };
  const search = sheet ? `&sheet=${sheet}` : "";
  return (
    <>
      <PageHeader
        eyebrow={schedule.words}
        title="Schedule"
        right={
          <>
            <ButtonLink to={`?week=${schedule.earlier}${search}`} size="small">
              Week before
            </ButtonLink>
            {!schedule.isThisWeek && (
              <ButtonLink to="/shop/schedule" size="small">
                This week
              </ButtonLink>
            )}
            <ButtonLink to={`?week=${schedule.later}${search}`} size="small">
              Week after
            </ButtonLink>
          </>
        }
      />
      <ActNotice reply={actionData} />
      <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <div className="min-w-0 space-y-5">
          {schedule.late.length > 0 && (
            <Sheet padded>
              <h2 className="text-small font-semibold text-amber">Late from before</h2>
              <ul className="mt-1 text-small">
                {schedule.late.map((run) => (
                  <RunItem key={run.id} run={run} places={places} />
                ))}
              </ul>
            </Sheet>
          )}
          {schedule.machines.map((machine) => (
            <MachineWeek key={machine.id} machine={machine} places={places} />
          ))}
        </div>
        <LooseSheets loose={schedule.loose} places={places} sheet={sheet} />
      </div>
    </>
  );
}

interface MachineWeekProps {
  readonly machine: ScheduleView["machines"][number];
  readonly places: Places;
}

function MachineWeek({ machine, places }: MachineWeekProps) {
  return (
    <Sheet>
      <div className="flex flex-wrap items-baseline justify-between gap-4 px-4 py-3">
        <h2 className="text-body font-semibold">Router {machine.name}</h2>
        <p className="measure text-caption text-soft">
          bed <Size width={machine.bed.length} height={machine.bed.width} />
        </p>
      </div>
      <ol>
        {machine.days.length === 0 && (
          <li className="border-t border-line px-4 py-3 text-small text-soft">Closed all week.</li>
        )}
        {machine.days.map((day) => (
          <DayLine key={day.day} day={day} machine={machine.name} places={places} />
        ))}
      </ol>
    </Sheet>
  );
}

interface DayLineProps {
  readonly day: MachineDay;
  readonly machine: string;
  readonly places: Places;
}

function DayLine({ day, machine, places }: DayLineProps) {
  const over = day.bookedMinutes > day.openMinutes;
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-4 gap-y-2 border-t border-line px-4 py-3 text-small md:grid-cols-[6rem_minmax(0,1fr)_10rem]">
      <h3 className={`measure ${day.isToday ? "font-semibold text-blue" : ""}`}>
        {day.words}
        {day.isToday && <span className="block text-caption font-normal">today</span>}
      </h3>
      <p className={`measure text-right md:order-last ${over ? "text-amber" : ""}`}>
        {formatMinutes(day.bookedMinutes)}
        <span className={over ? "" : "text-soft"}> of {formatMinutes(day.openMinutes)}</span>
        {over && <span className="block">over by {formatMinutes(day.bookedMinutes - day.openMinutes)}</span>}
      </p>
      <div className="col-span-2 min-w-0 md:col-span-1">
        <DayRule day={day} machine={machine} />
        {day.runs.length > 0 && (
          <ul className="mt-2">
            {day.runs.map((run) => (
              <RunItem key={run.id} run={run} places={places} />
            ))}
          </ul>
        )}
      </div>
    </li>
  );
}

interface LooseSheetsProps {
  readonly loose: ScheduleView["loose"];
  readonly places: Places;
  readonly sheet: string | null;
}

function LooseSheets({ loose, places, sheet }: LooseSheetsProps) {
  return (
    <Sheet>
      <div className="flex items-baseline justify-between gap-4 px-4 py-3 text-small">
        <h2 className="font-semibold">Not on a day yet</h2>
        <p className="measure text-soft">{loose.length}</p>
      </div>
      {loose.length === 0 ? (
        <p className="border-t border-line px-4 py-3 text-small text-soft">
          Every locked sheet has its day. More come from the <Link to="/shop/nest">nest desk</Link>.
        </p>
      ) : (
        <ul className="divide-y divide-line border-t border-line text-small">
          {loose
            .toSorted((one, other) => Number(other.id === sheet) - Number(one.id === sheet))
            .map((one) => (
              <LooseSheetItem key={one.id} sheet={one} places={places} asked={one.id === sheet} />
            ))}
        </ul>
      )}
    </Sheet>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
