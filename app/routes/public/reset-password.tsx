import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { resetPasswordSchema } from "~/auth/account-forms";
import { tooMany } from "~/auth/attempts.server";
import { auth } from "~/auth/auth.server";
import { PASSWORD_MIN } from "~/auth/password-rules";
import { isRefusal } from "~/auth/sign-in.server";
import { Button } from "~/components/button";
import { FormErrors } from "~/components/form-errors";
import { FormPage } from "~/components/form-page";
import { useSchemaForm } from "~/components/schema-form";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import type { Route } from "./+types/reset-password";

export function loader({ url }: Route.LoaderArgs) {
  return { token: url.searchParams.get("token") ?? "" };
}

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await request.formData(), { schema: resetPasswordSchema });
  if (submission.status !== "success")
    return data(submission.reply({ hideFields: ["password"] }), { status: 400 });
  const { token, password } = submission.value;
  const refuse = (words: string, status: number) =>
    data(submission.reply({ formErrors: [words], hideFields: ["password"] }), { status });
  const wait = await tooMany("reset-password", request, token);
  if (wait) return refuse(wait, 429);
  try {
    await auth().api.resetPassword({ body: { newPassword: password, token } });
  } catch (error) {
    if (!isRefusal(error)) throw error;
    return refuse("This link was used or has run out. Ask for another.", 400);
  }
  throw redirect("/sign-in?reset");
}

export const meta: Route.MetaFunction = () => [{ title: "A new password · Kerfpost" }];

export default function ResetPassword({ loaderData, actionData }: Route.ComponentProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "reset-password",
    schema: resetPasswordSchema,
    lastResult: actionData,
  });
  return (
    <FormPage
      title="Choose a new password"
      lead="Everywhere you are signed in now, you are signed out."
      beside={<TextLink to="/forgot-password">Ask for another link</TextLink>}
    >
      <Form method="post" {...getFormProps(form)} className="space-y-4">
        <FormErrors
          errors={form.errors}
          fields={[{ id: fields.password.id, label: "New password", errors: fields.password.errors }]}
        />
        <input type="hidden" name="token" value={loaderData.token} />
        <TextField
          field={fields.password}
          label="New password"
          hint={`At least ${PASSWORD_MIN} letters.`}
          type="password"
          autoComplete="new-password"
        />
        <Button variant="primary" wide pending={pending}>
          Set the password
        </Button>
      </Form>
    </FormPage>
  );
}
