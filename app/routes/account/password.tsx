import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form } from "react-router";
import { changePasswordSchema } from "~/auth/account-forms";
import { tooMany } from "~/auth/attempts.server";
import { auth } from "~/auth/auth.server";
import { requireAct } from "~/auth/guards.server";
import { PASSWORD_MIN } from "~/auth/password-rules";
import { isRefusal } from "~/auth/sign-in.server";
import { Button } from "~/components/button";
import { FormErrors } from "~/components/form-errors";
import { Notice } from "~/components/notice";
import { useSchemaForm } from "~/components/schema-form";
import { Sheet } from "~/components/sheet";
import { TextField } from "~/components/text-field";
import type { Route } from "./+types/password";
import { AccountTabs } from "./account-tabs";

const HIDDEN = ["current" as const, "password" as const];

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "account.edit");
  return null;
}

export async function action(args: Route.ActionArgs) {
  const { request } = args;
  const person = await requireAct(args, "account.edit");
  const submission = parseWithZod(await request.formData(), { schema: changePasswordSchema });
  if (submission.status !== "success")
    return data({ saved: false, result: submission.reply({ hideFields: HIDDEN }) }, { status: 400 });
  const wait = await tooMany("change-password", request, person.id);
  if (wait)
    return data(
      { saved: false, result: submission.reply({ formErrors: [wait], hideFields: HIDDEN }) },
      { status: 429 },
    );
  const { current, password } = submission.value;
  try {
    const { headers } = await auth().api.changePassword({
      body: { currentPassword: current, newPassword: password, revokeOtherSessions: true },
      headers: request.headers,
      returnHeaders: true,
    });
    return data({ saved: true, result: submission.reply({ resetForm: true }) }, { headers });
  } catch (error) {
    if (!isRefusal(error)) throw error;
    const fieldErrors = { current: ["This is not the password now."] };
    return data(
      { saved: false, result: submission.reply({ fieldErrors, hideFields: HIDDEN }) },
      { status: 400 },
    );
  }
}

export const meta: Route.MetaFunction = () => [{ title: "Password · Kerfpost" }];

export default function Password({ actionData }: Route.ComponentProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "password",
    schema: changePasswordSchema,
    lastResult: actionData?.result,
  });
  return (
    <>
      <AccountTabs at="/account/password" />
      <Sheet padded>
        <Form method="post" {...getFormProps(form)} className="max-w-md space-y-4">
          {actionData?.saved && (
            <Notice tone="note" live>
              The new password holds. Every other place is signed out.
            </Notice>
          )}
          <FormErrors
            errors={form.errors}
            fields={[
              { id: fields.current.id, label: "Password now", errors: fields.current.errors },
              { id: fields.password.id, label: "New password", errors: fields.password.errors },
            ]}
          />
          <TextField
            field={fields.current}
            label="Password now"
            type="password"
            autoComplete="current-password"
          />
          <TextField
            field={fields.password}
            label="New password"
            hint={`At least ${PASSWORD_MIN} letters.`}
            type="password"
            autoComplete="new-password"
          />
          <Button variant="primary" pending={pending}>
            Change the password
          </Button>
        </Form>
      </Sheet>
    </>
  );
}
