import { data, Form } from "react-router";
import { readUnsubscribeToken } from "~/auth/unsubscribe-token.server";
import { Button } from "~/components/button";
import { FormPage } from "~/components/form-page";
import { Notice } from "~/components/notice";
import { TextLink } from "~/components/text-link";
import { OPTIONAL_MAILS } from "~/documents/mails/kinds";
import { turnOffMail } from "~/flows/set-mail-choices.server";
import type { Route } from "./+types/unsubscribe";

/** What the link in a mail is for. The link lets nobody in, so that it may be pressed without signing in. */
function kindOfLink(request: Request) {
  const asked = readUnsubscribeToken(new URL(request.url).searchParams.get("token") ?? "");
  if (!asked)
    throw data(
      {
        words:
          "This link is not whole. Copy it from the mail once more, or choose your mails in your account.",
      },
      { status: 400 },
    );
  return asked;
}

/** Opening the link changes nothing: mail programs open links by themselves. */
export function loader({ request }: Route.LoaderArgs) {
  return OPTIONAL_MAILS[kindOfLink(request).kind];
}

/** Pressed on the page, or by a mail program with one POST (RFC 8058). */
export async function action({ request }: Route.ActionArgs) {
  const verdict = await turnOffMail(kindOfLink(request));
  if (!verdict.ok) throw data({ words: verdict.words }, { status: 404 });
  return { done: true };
}

export const meta: Route.MetaFunction = () => [
  { title: "Mails · Kerfpost" },
  { name: "robots", content: "noindex" },
];

export default function Unsubscribe({ loaderData, actionData }: Route.ComponentProps) {
  const { label, tells } = loaderData;
  const kind = label.toLowerCase();
  return (
    <FormPage
      title={actionData?.done ? `No more mails about ${kind}` : `Turn off mails about ${kind}?`}
      lead={tells}
      beside={
        <p>
          All your choices are <TextLink to="/account/mail">in your account</TextLink>. Receipts, refunds,
          shortages, holds and cancellations are always sent.
        </p>
      }
    >
      {actionData?.done ? (
        <Notice tone="note" live>
          They are off. What happens still stands on the page of each order.
        </Notice>
      ) : (
        <Form method="post">
          <Button wide>Turn them off</Button>
        </Form>
      )}
    </FormPage>
  );
}
