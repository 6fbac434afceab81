import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { signUpSchema } from "~/auth/account-forms";
import { homeOf } from "~/auth/areas";
import { tooMany } from "~/auth/attempts.server";
import { PASSWORD_MIN } from "~/auth/password-rules";
import { safePath } from "~/auth/safe-path";
import { currentPerson } from "~/auth/session.server";
import { signInWithPassword } from "~/auth/sign-in.server";
import { Button } from "~/components/button";
import { FormErrors } from "~/components/form-errors";
import { FormPage } from "~/components/form-page";
import { useSchemaForm } from "~/components/schema-form";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import { signUp } from "~/flows/sign-up.server";
import type { Route } from "./+types/sign-up";

export async function loader({ context, url }: Route.LoaderArgs) {
  const person = await currentPerson(context);
  const to = safePath(url.searchParams.get("to"));
  if (person) throw redirect(to ?? homeOf(person.roles));
  return { to };
}

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await request.formData(), { schema: signUpSchema });
  if (submission.status !== "success")
    return data(submission.reply({ hideFields: ["password"] }), { status: 400 });
  const { name, email, password, to } = submission.value;
  const wait = await tooMany("sign-up", request, email);
  if (wait) return data(submission.reply({ formErrors: [wait], hideFields: ["password"] }), { status: 429 });
  const made = await signUp({ name, email, password });
  if (!made.ok)
    return data(submission.reply({ fieldErrors: { email: [made.words] }, hideFields: ["password"] }), {
      status: 400,
    });
  const signedIn = await signInWithPassword(request, { email, password });
  const onward = safePath(to) ?? "/";
  throw signedIn.ok
    ? redirect(onward, { headers: signedIn.headers })
    : redirect(`/sign-in?to=${encodeURIComponent(onward)}`);
}

export const meta: Route.MetaFunction = () => [{ title: "Make an account · Kerfpost" }];

export default function SignUp({ loaderData, actionData }: Route.ComponentProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "sign-up",
    schema: signUpSchema,
    lastResult: actionData,
  });
  const onward = loaderData.to ? `?to=${encodeURIComponent(loaderData.to)}` : "";
  return (
    <FormPage
      title="Make an account"
      lead="For builders who send drawings. You can upload and price at once; paying waits until your e-mail address is confirmed."
      beside={
        <>
          <p>
            Have one already? <TextLink to={`/sign-in${onward}`}>Sign in</TextLink>
          </p>
          <p>
            By making an account you accept the <TextLink to="/terms">terms and cautions</TextLink>.
          </p>
        </>
      }
    >
      <Form method="post" {...getFormProps(form)} className="space-y-4">
        <FormErrors
          errors={form.errors}
          fields={[
            { id: fields.name.id, label: "Name", errors: fields.name.errors },
            { id: fields.email.id, label: "E-mail", errors: fields.email.errors },
            { id: fields.password.id, label: "Password", errors: fields.password.errors },
          ]}
        />
        <input type="hidden" name="to" value={loaderData.to ?? ""} />
        <TextField field={fields.name} label="Name" autoComplete="name" />
        <TextField field={fields.email} label="E-mail" type="email" autoComplete="username" />
        <TextField
          field={fields.password}
          label="Password"
          hint={`At least ${PASSWORD_MIN} letters. A few words are easier to keep than a riddle.`}
          type="password"
          autoComplete="new-password"
        />
        <Button variant="primary" wide pending={pending}>
          Make the account
        </Button>
      </Form>
    </FormPage>
  );
}
