import { data, Form, useNavigation } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { CheckboxField } from "~/components/checkbox-field";
import { plainField } from "~/components/field";
import { Notice } from "~/components/notice";
import { Sheet } from "~/components/sheet";
import { db } from "~/db/client.server";
import { OPTIONAL_MAIL_KINDS, OPTIONAL_MAILS } from "~/documents/mails/kinds";
import { setMailChoices } from "~/flows/set-mail-choices.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { findAddressee } from "~/models/people.server";
import type { Route } from "./+types/mail";
import { AccountTabs } from "./account-tabs";

const wantedSchema = z.array(z.enum(["stage", "quote", "message"]));

export async function loader(args: Route.LoaderArgs) {
  const { id, email } = await requireAct(args, "account.edit");
  const muted = (await findAddressee(db, id))?.mutedMails ?? [];
  return {
    email,
    choices: OPTIONAL_MAIL_KINDS.map((kind) => ({
      kind,
      ...OPTIONAL_MAILS[kind],
      wanted: !muted.includes(kind),
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "account.edit");
  const wanted = wantedSchema.safeParse((await args.request.formData()).getAll("wanted"));
  if (!wanted.success) throw data({ words: "There is no such kind of mail." }, { status: 400 });
  const verdict = await setMailChoices({ userId: person.id, wanted: wanted.data });
  if (!verdict.ok) throw data({ words: verdict.words }, { status: REFUSAL_STATUS[verdict.reason] });
  return { saved: true };
}

export const meta: Route.MetaFunction = () => [{ title: "E-mail · Kerfpost" }];

export default function Mail({ loaderData, actionData }: Route.ComponentProps) {
  const pending = useNavigation().formAction === "/account/mail";
  return (
    <>
      <AccountTabs at="/account/mail" />
      <Sheet padded>
        <Form method="post" className="max-w-lg space-y-4">
          {actionData?.saved && (
            <Notice tone="note" live>
              Saved.
            </Notice>
          )}
          <fieldset className="space-y-2">
            <legend className="mb-2 font-semibold">
              Mails to <span className="measure font-normal break-all">{loaderData.email}</span>
            </legend>
            {loaderData.choices.map(({ kind, label, tells, wanted }) => (
              <CheckboxField
                key={kind}
                field={plainField("wanted", { id: `wanted-${kind}` })}
                label={label}
                hint={tells}
                value={kind}
                defaultChecked={wanted}
              />
            ))}
          </fieldset>
          <p className="text-small text-soft">
            Always sent: confirming your address, a new password, receipts, refunds, a part that is made
            again, what waits to be picked up, a hold, an order that needs a change or is cancelled.
          </p>
          <Button variant="primary" pending={pending}>
            Save
          </Button>
        </Form>
      </Sheet>
    </>
  );
}
