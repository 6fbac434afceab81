import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form } from "react-router";
import { profileSchema } from "~/auth/account-forms";
import { rolesInWords } from "~/auth/areas";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { DefinitionList } from "~/components/definition-list";
import { FormErrors } from "~/components/form-errors";
import { Notice } from "~/components/notice";
import { RadioField } from "~/components/radio-field";
import { useSchemaForm } from "~/components/schema-form";
import { Sheet } from "~/components/sheet";
import { TextField } from "~/components/text-field";
import { db } from "~/db/client.server";
import { changeProfile } from "~/models/accounts.server";
import type { Route } from "./+types/profile";
import { AccountTabs } from "./account-tabs";

const UNITS = [
  { value: "mm", label: "Millimetres", note: "420.0 mm" },
  { value: "in", label: "Inches, with the nearest 1/64", note: "16.535 in · 16 17/32" },
];

export async function loader(args: Route.LoaderArgs) {
  const { name, email, emailVerified, shownUnit, roles } = await requireAct(args, "account.edit");
  return { name, email, emailVerified, shownUnit, roles: rolesInWords(roles) };
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "account.edit");
  const submission = parseWithZod(await args.request.formData(), { schema: profileSchema });
  if (submission.status !== "success")
    return data({ saved: false, result: submission.reply() }, { status: 400 });
  await changeProfile(db, person.id, submission.value);
  return data({ saved: true, result: submission.reply() });
}

export const meta: Route.MetaFunction = () => [{ title: "Account · Kerfpost" }];

export default function Profile({ loaderData, actionData }: Route.ComponentProps) {
  const { name, email, emailVerified, shownUnit, roles } = loaderData;
  const { form, fields, pending } = useSchemaForm({
    id: "profile",
    schema: profileSchema,
    lastResult: actionData?.result,
    values: { name, shownUnit },
  });
  return (
    <>
      <AccountTabs at="/account" />
      <Sheet padded>
        <Form method="post" {...getFormProps(form)} className="max-w-md space-y-4">
          {actionData?.saved && (
            <Notice tone="note" live>
              Saved.
            </Notice>
          )}
          <FormErrors
            errors={form.errors}
            fields={[
              { id: fields.name.id, label: "Name", errors: fields.name.errors },
              { id: fields.shownUnit.id, label: "Lengths are shown in", errors: fields.shownUnit.errors },
            ]}
          />
          <TextField field={fields.name} label="Name" autoComplete="name" />
          <RadioField field={fields.shownUnit} label="Lengths are shown in" choices={UNITS} />
          <DefinitionList
            items={[
              { term: "Mail goes to", value: email, note: emailVerified ? "confirmed" : "not confirmed yet" },
              { term: "Works here as", value: roles, prose: true },
            ]}
          />
          <Button variant="primary" pending={pending}>
            Save
          </Button>
        </Form>
      </Sheet>
    </>
  );
}
