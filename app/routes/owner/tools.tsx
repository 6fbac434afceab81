import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { FormErrors } from "~/components/form-errors";
import { Notice } from "~/components/notice";
import { allErrors } from "~/components/owner/all-errors";
import { TOOL_KINDS, toolSchema } from "~/components/owner/machine-forms";
import { RetireForm } from "~/components/owner/retire-form";
import { PageHeader } from "~/components/page-header";
import { useSchemaForm } from "~/components/schema-form";
import { SelectField } from "~/components/select-field";
import { Sheet } from "~/components/sheet";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { dayOf, instantAt, shownDay } from "~/domain/scheduling";
import { saveTool } from "~/flows/save-tool.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { currentSettings } from "~/models/settings.server";
import { listTools } from "~/models/tools.server";
import type { Route } from "./+types/tools";
import { retireAct } from "./retire-act.server";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "machine.edit");
  const { timeZone } = (await currentSettings(db)).shop;
  const tools = (await listTools(db)).map(({ measuredAt, ...tool }) => ({
    ...tool,
    measuredOn: dayOf(measuredAt, timeZone),
  }));
  const changing = args.url.searchParams.get("change");
  return {
    tools,
    changed: tools.find(({ id }) => id === changing) ?? null,
    today: dayOf(new Date(), timeZone),
  };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "machine.edit");
  const sent = await args.request.formData();
  const retired = await retireAct(actor, "tool", sent);
  if (retired && !retired.ok)
    return data({ words: retired.words, result: null }, { status: REFUSAL_STATUS[retired.reason] });
  if (retired) throw redirect("/owner/tools");
  const submission = parseWithZod(sent, { schema: toolSchema });
  if (submission.status !== "success")
    return data({ words: null, result: submission.reply() }, { status: 400 });
  const { timeZone } = (await currentSettings(db)).shop;
  const { version = 0, measuredOn, ...fields } = submission.value;
  const id = args.url.searchParams.get("change");
  const saved = await saveTool({
    actor,
    tool: id === null ? null : { id, version },
    /* Noon: the day stays the same day in every zone it is shown in. */
    fields: { ...fields, measuredAt: instantAt(measuredOn, "12:00", timeZone) },
  });
  if (!saved.ok)
    return data(
      { words: null, result: submission.reply({ formErrors: [saved.words] }) },
      { status: REFUSAL_STATUS[saved.reason] },
    );
  throw redirect("/owner/tools");
}

export const meta: Route.MetaFunction = () => [{ title: "Tools · Kerfpost" }];

type Data = Route.ComponentProps["loaderData"];

export default function Tools({ loaderData, actionData }: Route.ComponentProps) {
  const { tools, changed, today } = loaderData;
  return (
    <>
      <PageHeader
        title="Tools"
        lead="Written as they stand in the changer. A sharpened cutter is thinner than its box says: what was measured counts."
      />
      {actionData?.words && <Notice live>{actionData.words}</Notice>}
      <Sheet padded>
        <Table caption="Tools in the changer">
          <TableHead>
            <HeadCell>no.</HeadCell>
            <HeadCell>name</HeadCell>
            <HeadCell numeric>nominal mm</HeadCell>
            <HeadCell numeric>measured mm</HeadCell>
            <HeadCell>on</HeadCell>
            <HeadCell numeric>flutes</HeadCell>
            <HeadCell numeric>feed mm/min</HeadCell>
            <HeadCell numeric>plunge mm/min</HeadCell>
            <HeadCell numeric>rpm</HeadCell>
            <HeadCell numeric>a pass mm</HeadCell>
            <HeadCell />
          </TableHead>
          <tbody>
            {tools.map((tool) => (
              <TableRow key={tool.id} selected={tool.id === changed?.id}>
                <RowHead measured>T{tool.number}</RowHead>
                <Cell>
                  <TextLink to={`/owner/tools?change=${tool.id}#tool`}>{tool.name}</TextLink>
                  <span className="block text-caption text-soft">
                    {tool.kind}
                    {!tool.active && ", retired"}
                  </span>
                </Cell>
                <Cell numeric>{tool.nominalDiameter.toFixed(3)}</Cell>
                <Cell numeric>{tool.measuredDiameter.toFixed(2)}</Cell>
                <Cell whole>{shownDay(tool.measuredOn)}</Cell>
                <Cell numeric>{tool.flutes}</Cell>
                <Cell numeric>{tool.feed.toLocaleString("en-US")}</Cell>
                <Cell numeric>{tool.plunge.toLocaleString("en-US")}</Cell>
                <Cell numeric>{tool.rpm.toLocaleString("en-US")}</Cell>
                <Cell numeric>{tool.maxPassDepth}</Cell>
                <Cell>
                  <RetireForm
                    thing={tool}
                    question="It stays on record and can be put in use again."
                    size="small"
                  />
                </Cell>
              </TableRow>
            ))}
          </tbody>
        </Table>
      </Sheet>
      <Sheet padded>
        <ToolForm
          key={changed?.id ?? tools.length}
          changed={changed}
          today={today}
          lastResult={actionData?.result}
        />
      </Sheet>
    </>
  );
}

interface ToolFormProps {
  readonly changed: Data["changed"];
  readonly today: string;
  readonly lastResult: NonNullable<Route.ComponentProps["actionData"]>["result"] | undefined;
}

function ToolForm({ changed, today, lastResult }: ToolFormProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "tool",
    schema: toolSchema,
    lastResult,
    values: changed ?? { measuredOn: today },
  });
  const number = { type: "number", step: "any", measured: true } as const;
  return (
    <Form method="post" {...getFormProps(form)} className="space-y-4">
      <h2 className="text-lead font-semibold">{changed ? `Change T${changed.number}` : "Another tool"}</h2>
      <FormErrors errors={form.errors} fields={allErrors(form, (name) => name)} />
      {changed && <input type="hidden" name="version" value={changed.version} />}
      <div className="grid items-end gap-4 sm:grid-cols-2 lg:grid-cols-4">
        <TextField field={fields.number} label="Number in the changer" {...number} />
        <TextField field={fields.name} label="Name" />
        <SelectField
          field={fields.kind}
          label="Kind"
          placeholder="Choose"
          choices={TOOL_KINDS.map((kind) => ({ value: kind, label: kind }))}
        />
        <TextField field={fields.flutes} label="Flutes" {...number} />
        <TextField field={fields.nominalDiameter} label="Nominal diameter" unit="mm" {...number} />
        <TextField field={fields.measuredDiameter} label="Measured diameter" unit="mm" {...number} />
        <TextField field={fields.measuredOn} label="Measured on" type="date" measured />
        <TextField field={fields.maxPassDepth} label="Deepest pass" unit="mm" {...number} />
        <TextField field={fields.feed} label="Feed" unit="mm/min" {...number} />
        <TextField field={fields.plunge} label="Plunge" unit="mm/min" {...number} />
        <TextField field={fields.rpm} label="Spindle" unit="rpm" {...number} />
      </div>
      <div className="flex flex-wrap gap-2">
        <Button variant="primary" pending={pending}>
          {changed ? "Save" : "Add the tool"}
        </Button>
        {changed && <ButtonLink to="/owner/tools">Leave it</ButtonLink>}
      </div>
    </Form>
  );
}
