import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { signInSchema } from "~/auth/account-forms";
import { homeOf } from "~/auth/areas";
import { tooMany } from "~/auth/attempts.server";
import { safePath } from "~/auth/safe-path";
import { currentPerson } from "~/auth/session.server";
import { signInWithPassword } from "~/auth/sign-in.server";
import { Button } from "~/components/button";
import { FormErrors } from "~/components/form-errors";
import { FormPage } from "~/components/form-page";
import { useSchemaForm } from "~/components/schema-form";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import type { Route } from "./+types/sign-in";

export async function loader({ context, url }: Route.LoaderArgs) {
  const person = await currentPerson(context);
  const to = safePath(url.searchParams.get("to"));
  if (person) throw redirect(to ?? homeOf(person.roles));
  return { to, reset: url.searchParams.has("reset") };
}

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await request.formData(), { schema: signInSchema });
  if (submission.status !== "success")
    return data(submission.reply({ hideFields: ["password"] }), { status: 400 });
  const { email, password, to } = submission.value;
  const refuse = (words: string, status: number) =>
    data(submission.reply({ formErrors: [words], hideFields: ["password"] }), { status });
  const wait = await tooMany("sign-in", request, email);
  if (wait) return refuse(wait, 429);
  const signedIn = await signInWithPassword(request, { email, password });
  if (!signedIn.ok) return refuse("No account has this address and this password together.", 400);
  throw redirect(safePath(to) ?? "/", { headers: signedIn.headers });
}

export const meta: Route.MetaFunction = () => [{ title: "Sign in · Kerfpost" }];

export default function SignIn({ loaderData, actionData }: Route.ComponentProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "sign-in",
    schema: signInSchema,
    lastResult: actionData,
  });
  const onward = loaderData.to ? `?to=${encodeURIComponent(loaderData.to)}` : "";
  return (
    <FormPage
      title="Sign in"
      lead={
        loaderData.reset ? "The new password is set; use it here. All earlier sign-ins are ended." : undefined
      }
      beside={
        <>
          <p>
            New here? <TextLink to={`/sign-up${onward}`}>Make an account</TextLink>
          </p>
          <p>
            <TextLink to="/forgot-password">Forgot the password?</TextLink>
          </p>
        </>
      }
    >
      <Form method="post" {...getFormProps(form)} className="space-y-4">
        <FormErrors
          errors={form.errors}
          fields={[
            { id: fields.email.id, label: "E-mail", errors: fields.email.errors },
            { id: fields.password.id, label: "Password", errors: fields.password.errors },
          ]}
        />
        <input type="hidden" name="to" value={loaderData.to ?? ""} />
        <TextField field={fields.email} label="E-mail" type="email" autoComplete="username" />
        <TextField field={fields.password} label="Password" type="password" autoComplete="current-password" />
        <Button variant="primary" wide pending={pending}>
          Sign in
        </Button>
      </Form>
    </FormPage>
  );
}
