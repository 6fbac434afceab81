import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { acceptInvitationSchema } from "~/auth/account-forms";
import { tooMany } from "~/auth/attempts.server";
import { PASSWORD_MIN } from "~/auth/password-rules";
import { currentPerson } from "~/auth/session.server";
import { signInWithPassword } from "~/auth/sign-in.server";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { FormErrors } from "~/components/form-errors";
import { FormPage } from "~/components/form-page";
import { useSchemaForm } from "~/components/schema-form";
import { TextField } from "~/components/text-field";
import { db } from "~/db/client.server";
import { acceptInvitation } from "~/flows/accept-invitation.server";
import { hashToken } from "~/flows/invite-staff.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { findIdByEmail } from "~/models/accounts.server";
import { findOpenInvitation } from "~/models/invitations.server";
import type { Route } from "./+types/invitation";

export async function loader({ context, params }: Route.LoaderArgs) {
  const invitation = await findOpenInvitation(db, hashToken(params.token), new Date());
  if (!invitation)
    throw data(
      { words: "This invitation was used, called back or has run out. Ask the owner for another." },
      { status: 410 },
    );
  const { email, roles, inviter } = invitation;
  const person = await currentPerson(context);
  const account = await findIdByEmail(db, email);
  return {
    email,
    roles: roles.join(" and "),
    inviter,
    signedInAs: person?.email ?? null,
    own: person !== null && person.id === account,
    hasAccount: account !== undefined,
  };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const { token } = params;
  const wait = await tooMany("invitation", request, hashToken(token));
  const person = await currentPerson(context);
  if (person) {
    if (wait) throw data({ words: wait }, { status: 429 });
    const taken = await acceptInvitation({ token, as: { userId: person.id, email: person.email } });
    if (!taken.ok) throw data({ words: taken.words }, { status: REFUSAL_STATUS[taken.reason] });
    throw redirect("/");
  }
  const submission = parseWithZod(await request.formData(), { schema: acceptInvitationSchema });
  if (submission.status !== "success")
    return data(submission.reply({ hideFields: ["password"] }), { status: 400 });
  const refuse = (words: string, status: number) =>
    data(submission.reply({ formErrors: [words], hideFields: ["password"] }), { status });
  if (wait) return refuse(wait, 429);
  const taken = await acceptInvitation({ token, as: submission.value });
  if (!taken.ok) return refuse(taken.words, REFUSAL_STATUS[taken.reason]);
  const { password } = submission.value;
  const signedIn = await signInWithPassword(request, { email: taken.email, password });
  throw signedIn.ok ? redirect("/", { headers: signedIn.headers }) : redirect("/sign-in");
}

export const meta: Route.MetaFunction = () => [{ title: "Invitation · Kerfpost" }];

export default function InvitationPage({ loaderData, actionData, params }: Route.ComponentProps) {
  const { email, roles, inviter, signedInAs, own, hasAccount } = loaderData;
  const lead = `${inviter} invites you, ${email}, to the shop as ${roles}.`;
  if (own)
    return (
      <FormPage title="Work in the shop" lead={lead}>
        <Form method="post">
          <Button variant="primary" wide>
            Accept
          </Button>
        </Form>
      </FormPage>
    );
  if (signedInAs !== null)
    return (
      <FormPage title="Work in the shop" lead={lead}>
        <p>You are signed in as {signedInAs}. Sign out, then open the link in the mail again.</p>
      </FormPage>
    );
  if (hasAccount)
    return (
      <FormPage title="Work in the shop" lead={lead}>
        <p className="mb-4">You have an account with this address: sign in with it to accept.</p>
        <ButtonLink to={`/sign-in?to=${encodeURIComponent(`/invitation/${params.token}`)}`}>
          Sign in
        </ButtonLink>
      </FormPage>
    );
  return (
    <FormPage title="Work in the shop" lead={lead}>
      <NewAccount lastResult={actionData} />
    </FormPage>
  );
}

function NewAccount({ lastResult }: { readonly lastResult: Route.ComponentProps["actionData"] }) {
  const { form, fields, pending } = useSchemaForm({
    id: "invitation",
    schema: acceptInvitationSchema,
    lastResult,
  });
  return (
    <Form method="post" {...getFormProps(form)} className="space-y-4">
      <FormErrors
        errors={form.errors}
        fields={[
          { id: fields.name.id, label: "Name", errors: fields.name.errors },
          { id: fields.password.id, label: "Password", errors: fields.password.errors },
        ]}
      />
      <TextField field={fields.name} label="Name" autoComplete="name" />
      <TextField
        field={fields.password}
        label="Password"
        hint={`At least ${PASSWORD_MIN} letters.`}
        type="password"
        autoComplete="new-password"
      />
      <Button variant="primary" wide pending={pending}>
        Accept
      </Button>
    </Form>
  );
}
