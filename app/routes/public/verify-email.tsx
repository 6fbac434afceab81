import { data, Form, redirect } from "react-router";
import { tooMany } from "~/auth/attempts.server";
import { auth, verificationToken } from "~/auth/auth.server";
import { mailVerification } from "~/auth/auth-mails.server";
import { requirePerson } from "~/auth/guards.server";
import { currentPerson } from "~/auth/session.server";
import { isRefusal } from "~/auth/sign-in.server";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { FormPage } from "~/components/form-page";
import { Notice } from "~/components/notice";
import { db } from "~/db/client.server";
import type { Route } from "./+types/verify-email";

/** The mailed link: confirms the address, however often it is opened. */
export async function loader({ context, url }: Route.LoaderArgs) {
  const token = url.searchParams.get("token");
  if (token !== null) {
    try {
      await auth().api.verifyEmail({ query: { token } });
    } catch (error) {
      if (!isRefusal(error)) throw error;
      throw redirect("/verify-email?over");
    }
    throw redirect("/verify-email?confirmed");
  }
  const person = await currentPerson(context);
  return {
    confirmed: url.searchParams.has("confirmed") || person?.emailVerified === true,
    over: url.searchParams.has("over"),
    address: person?.email ?? null,
  };
}

/** Mails the link again. */
export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  if (person.emailVerified) throw redirect("/verify-email");
  const wait = await tooMany("verify-email", args.request, person.id);
  if (wait) return data({ sent: false, words: wait }, { status: 429 });
  await mailVerification(db, person, await verificationToken(person.email));
  return { sent: true, words: `The mail is on its way to ${person.email}.` };
}

export const meta: Route.MetaFunction = () => [{ title: "Your e-mail address · Kerfpost" }];

export default function VerifyEmail({ loaderData, actionData }: Route.ComponentProps) {
  const { confirmed, over, address } = loaderData;
  if (confirmed)
    return (
      <FormPage title="Your address is confirmed">
        <p className="mb-4">You can pay for orders now. Receipts and news of your orders come to it.</p>
        <ButtonLink to="/" variant="primary">
          {address ? "To my orders" : "Sign in"}
        </ButtonLink>
      </FormPage>
    );
  return (
    <FormPage title={over ? "This link has run out" : "Confirm your e-mail address"}>
      <div className="space-y-4">
        {actionData && (
          <Notice tone={actionData.sent ? "note" : "warn"} live>
            {actionData.words}
          </Notice>
        )}
        {address ? (
          <>
            <p>We mailed a link to {address}. It works for one day; only the newest is needed.</p>
            <Form method="post">
              <Button variant="plain">Send the mail again</Button>
            </Form>
          </>
        ) : (
          <>
            <p>Sign in, and we mail you another link.</p>
            <ButtonLink to="/sign-in?to=/verify-email" variant="primary">
              Sign in
            </ButtonLink>
          </>
        )}
      </div>
    </FormPage>
  );
}
