import { FormProvider, getFormProps, useField } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { FormErrors } from "~/components/form-errors";
import { Size } from "~/components/measure";
import { Notice } from "~/components/notice";
import { allErrors } from "~/components/owner/all-errors";
import { FormPart } from "~/components/owner/form-part";
import { machineOf, machineSchema, WEEKDAYS, weekInWords } from "~/components/owner/machine-forms";
import { NumberRows } from "~/components/owner/number-rows";
import { RetireForm } from "~/components/owner/retire-form";
import { WeekStrip } from "~/components/owner/week-strip";
import { PageHeader } from "~/components/page-header";
import { useSchemaForm } from "~/components/schema-form";
import { Sheet } from "~/components/sheet";
import { TextAreaField } from "~/components/text-area-field";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { saveMachine } from "~/flows/save-machine.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { listAllMachines } from "~/models/machines.server";
import type { Route } from "./+types/machines";
import { retireAct } from "./retire-act.server";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "machine.edit");
  const machines = await listAllMachines(db);
  const changing = args.url.searchParams.get("change");
  return { machines, changed: machines.find(({ id }) => id === changing) ?? null };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "machine.edit");
  const sent = await args.request.formData();
  const retired = await retireAct(actor, "machine", sent);
  if (retired && !retired.ok)
    return data({ words: retired.words, result: null }, { status: REFUSAL_STATUS[retired.reason] });
  if (retired) throw redirect("/owner/machines");
  const submission = parseWithZod(sent, { schema: machineSchema });
  if (submission.status !== "success")
    return data({ words: null, result: submission.reply() }, { status: 400 });
  const { version = 0 } = submission.value;
  const id = args.url.searchParams.get("change");
  const saved = await saveMachine({
    actor,
    machine: id === null ? null : { id, version },
    fields: machineOf(submission.value),
  });
  if (!saved.ok)
    return data(
      { words: null, result: submission.reply({ formErrors: [saved.words] }) },
      { status: REFUSAL_STATUS[saved.reason] },
    );
  throw redirect("/owner/machines");
}

export const meta: Route.MetaFunction = () => [{ title: "Machines · Kerfpost" }];

type Machine = Route.ComponentProps["loaderData"]["machines"][number];

export default function Machines({ loaderData, actionData }: Route.ComponentProps) {
  const { machines, changed } = loaderData;
  return (
    <>
      <PageHeader
        title="Machines"
        lead="Dates are promised from the hours that stand here, less what is planned on them already."
      />
      {actionData?.words && <Notice live>{actionData.words}</Notice>}
      {machines.map((machine) => (
        <MachineSheet key={machine.id} machine={machine} />
      ))}
      <Sheet padded>
        <MachineForm key={changed?.id ?? machines.length} changed={changed} lastResult={actionData?.result} />
      </Sheet>
    </>
  );
}

function MachineSheet({ machine }: { readonly machine: Machine }) {
  const { id, name, calendar, calibration, active } = machine;
  return (
    <Sheet padded>
      <div className="flex flex-wrap items-start justify-between gap-x-8 gap-y-3">
        <div className="min-w-0">
          <h2 className="text-lead font-semibold">
            <TextLink to={`/owner/machines?change=${id}#machine`}>{name}</TextLink>
            {!active && <span className="text-body font-normal text-soft"> retired</span>}
          </h2>
          <p className="flex flex-wrap gap-x-4 gap-y-1 text-small text-soft">
            <span>
              bed <Size width={machine.bedLength} height={machine.bedWidth} />
            </span>
            <span>
              rapids <span className="measure">{machine.rapid.toLocaleString("en-US")}</span> mm/min
            </span>
            <span>
              <span className="measure">{machine.acceleration.toLocaleString("en-US")}</span> mm/s²
            </span>
            <span>
              tool change <span className="measure">{machine.toolChangeMinutes}</span> min
            </span>
            <span>
              a sheet on and off <span className="measure">{machine.sheetHandlingMinutes}</span> min
            </span>
            <span>
              takes <span className="measure">{calibration.toFixed(2)}</span> of the estimate
            </span>
          </p>
        </div>
        <RetireForm thing={machine} question="No sheet is planned on it any more." size="small" />
      </div>
      <WeekStrip calendar={calendar} />
      {calendar.closed.length > 0 && (
        <p className="mt-2 text-caption text-soft">
          closed <span className="measure">{calendar.closed.join(", ")}</span>
        </p>
      )}
    </Sheet>
  );
}

const MEASURES = [
  { path: "bedLength", label: "Bed, length", unit: "mm" },
  { path: "bedWidth", label: "Bed, width", unit: "mm" },
  { path: "rapid", label: "Rapids", unit: "mm/min" },
  { path: "acceleration", label: "Acceleration", unit: "mm/s²" },
  { path: "toolChangeMinutes", label: "A tool change", unit: "min" },
  { path: "sheetHandlingMinutes", label: "A sheet on and off", unit: "min" },
] as const;

const LABELS = new Map<string, string>([
  ...MEASURES.map(({ path, label }) => [path, label] as const),
  ...WEEKDAYS.map(([weekday, name]) => [`week[${weekday}]`, name] as const),
  ["name", "Name"],
  ["closed", "Closed days"],
]);

interface MachineFormProps {
  readonly changed: Machine | null;
  readonly lastResult: NonNullable<Route.ComponentProps["actionData"]>["result"] | undefined;
}

function MachineForm({ changed, lastResult }: MachineFormProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "machine",
    schema: machineSchema,
    lastResult,
    values: changed
      ? { ...changed, week: weekInWords(changed.calendar), closed: changed.calendar.closed.join("\n") }
      : { week: ["", "", "", "", "", "", ""], closed: "" },
  });
  return (
    <FormProvider context={form.context}>
      <Form method="post" {...getFormProps(form)}>
        <h2 className="mb-4 text-lead font-semibold">
          {changed ? `Change ${changed.name}` : "Another machine"}
        </h2>
        <FormErrors errors={form.errors} fields={allErrors(form, (name) => LABELS.get(name) ?? name)} />
        {changed && <input type="hidden" name="version" value={changed.version} />}
        <FormPart title="The machine">
          <div className="max-w-sm">
            <TextField field={fields.name} label="Name" />
          </div>
          <NumberRows rows={MEASURES} />
        </FormPart>
        <FormPart title="Its week" note="Shifts as 08:00-12:00, 12:30-16:30. An empty day is closed.">
          <div className="grid items-end gap-4 sm:grid-cols-2 lg:grid-cols-4">
            {WEEKDAYS.map(([weekday, name]) => (
              <DayField key={weekday} weekday={weekday} name={name} />
            ))}
          </div>
          <div className="max-w-sm">
            <TextAreaField
              field={fields.closed}
              label="Closed days"
              hint="One a line: 2026-12-25. The shop's holidays stand in the settings."
            />
          </div>
        </FormPart>
        <div className="flex flex-wrap gap-2">
          <Button variant="primary" pending={pending}>
            {changed ? "Save" : "Add the machine"}
          </Button>
          {changed && <ButtonLink to="/owner/machines">Leave it</ButtonLink>}
        </div>
      </Form>
    </FormProvider>
  );
}

function DayField({ weekday, name }: { readonly weekday: number; readonly name: string }) {
  const [field] = useField<string>(`week[${weekday}]`);
  return <TextField field={field} label={name} measured />;
}
