import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form } from "react-router";
import { forgotPasswordSchema } from "~/auth/account-forms";
import { tooMany } from "~/auth/attempts.server";
import { auth } from "~/auth/auth.server";
import { Button } from "~/components/button";
import { FormErrors } from "~/components/form-errors";
import { FormPage } from "~/components/form-page";
import { Notice } from "~/components/notice";
import { useSchemaForm } from "~/components/schema-form";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import type { Route } from "./+types/forgot-password";

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await request.formData(), { schema: forgotPasswordSchema });
  if (submission.status !== "success")
    return data({ sent: false, result: submission.reply() }, { status: 400 });
  const { email } = submission.value;
  const wait = await tooMany("forgot-password", request, email);
  if (wait) return data({ sent: false, result: submission.reply({ formErrors: [wait] }) }, { status: 429 });
  await auth().api.requestPasswordReset({ body: { email } });
  return data({ sent: true, result: submission.reply({ resetForm: true }) });
}

export const meta: Route.MetaFunction = () => [{ title: "Forgotten password · Kerfpost" }];

export default function ForgotPassword({ actionData }: Route.ComponentProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "forgot-password",
    schema: forgotPasswordSchema,
    lastResult: actionData?.result,
  });
  return (
    <FormPage
      title="Forgotten password"
      lead="We mail a link with which you choose a new one. It works for one hour, once."
      beside={<TextLink to="/sign-in">Back to sign in</TextLink>}
    >
      <Form method="post" {...getFormProps(form)} className="space-y-4">
        {actionData?.sent && (
          <Notice tone="note" live>
            If there is an account with this address, the mail is on its way.
          </Notice>
        )}
        <FormErrors
          errors={form.errors}
          fields={[{ id: fields.email.id, label: "E-mail", errors: fields.email.errors }]}
        />
        <TextField field={fields.email} label="E-mail" type="email" autoComplete="username" />
        <Button variant="primary" wide pending={pending}>
          Mail me the link
        </Button>
      </Form>
    </FormPage>
  );
}
