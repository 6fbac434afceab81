import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { inviteSchema, rolesSchema } from "~/auth/account-forms";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { DateTime } from "~/components/date-time";
import { plainField } from "~/components/field";
import { FormErrors } from "~/components/form-errors";
import { Notice } from "~/components/notice";
import { PageHeader } from "~/components/page-header";
import { RoleBoxes } from "~/components/role-boxes";
import { useSchemaForm } from "~/components/schema-form";
import { Sheet } from "~/components/sheet";
import { TextField } from "~/components/text-field";
import { db } from "~/db/client.server";
import { changeRoles } from "~/flows/change-roles.server";
import { inviteStaff } from "~/flows/invite-staff.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { listOpenInvitations, revokeInvitations } from "~/models/invitations.server";
import { listStaff } from "~/models/user-roles.server";
import type { Route } from "./+types/staff";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "staff.invite");
  const invitations = await listOpenInvitations(db, new Date());
  return {
    staff: await listStaff(db),
    invitations: invitations.map(({ id, email, roles, expiresAt }) => ({ id, email, roles, expiresAt })),
  };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "staff.invite");
  const sent = await args.request.formData();
  const intent = sent.get("intent");
  if (intent === "revoke") {
    await revokeInvitations(db, { id: String(sent.get("invitation")) }, new Date());
    throw redirect("/owner/staff");
  }
  if (intent === "roles") {
    const submission = parseWithZod(sent, { schema: rolesSchema });
    if (submission.status !== "success") throw data(null, { status: 400 });
    const changed = await changeRoles({ actor, ...submission.value });
    if (!changed.ok)
      return data({ words: changed.words, result: null }, { status: REFUSAL_STATUS[changed.reason] });
    throw redirect("/owner/staff");
  }
  const submission = parseWithZod(sent, { schema: inviteSchema });
  if (submission.status !== "success")
    return data({ words: null, result: submission.reply() }, { status: 400 });
  const invited = await inviteStaff({ actor, ...submission.value });
  if (!invited.ok)
    return data(
      { words: null, result: submission.reply({ formErrors: [invited.words] }) },
      { status: REFUSAL_STATUS[invited.reason] },
    );
  throw redirect("/owner/staff");
}

export const meta: Route.MetaFunction = () => [{ title: "Staff · Kerfpost" }];

export default function Staff({ loaderData, actionData }: Route.ComponentProps) {
  const { staff, invitations } = loaderData;
  return (
    <>
      <PageHeader
        title="Who works here"
        lead="Roles say what somebody sees and does. The shop keeps one owner at least."
      />
      {actionData?.words && <Notice live>{actionData.words}</Notice>}
      <Sheet label="Staff">
        <ul className="divide-y divide-line">
          {staff.map(({ id, name, email, roles }) => (
            <li key={id} className="flex flex-wrap items-center justify-between gap-x-8 gap-y-2 px-4 py-3">
              <div className="min-w-0">
                <p className="font-medium">{name}</p>
                <p className="measure text-small break-all text-soft">{email}</p>
              </div>
              <Form method="post" className="flex flex-wrap items-center gap-x-4 gap-y-2">
                <input type="hidden" name="intent" value="roles" />
                <input type="hidden" name="userId" value={id} />
                <RoleBoxes key={roles.join()} legend={`Roles of ${name}`} idPrefix={id} chosen={roles} />
                <Button variant="plain" size="small">
                  Save<span className="sr-only"> the roles of {name}</span>
                </Button>
              </Form>
            </li>
          ))}
        </ul>
      </Sheet>
      {invitations.length > 0 && (
        <Sheet label="Open invitations">
          <h2 className="border-b border-line px-4 py-3 text-small font-semibold">Invited</h2>
          <ul className="divide-y divide-line">
            {invitations.map(({ id, email, roles, expiresAt }) => (
              <li key={id} className="flex flex-wrap items-center justify-between gap-x-8 gap-y-2 px-4 py-3">
                <div className="min-w-0">
                  <p className="measure break-all">{email}</p>
                  <p className="text-small text-soft">
                    {roles.join(", ")}, until <DateTime at={expiresAt} show="day" />
                  </p>
                </div>
                <Form method="post">
                  <input type="hidden" name="intent" value="revoke" />
                  <Button variant="quiet" size="small" name="invitation" value={id}>
                    Call back<span className="sr-only"> the invitation of {email}</span>
                  </Button>
                </Form>
              </li>
            ))}
          </ul>
        </Sheet>
      )}
      <Sheet padded>
        <InviteForm key={invitations[0]?.id} lastResult={actionData?.result} />
      </Sheet>
    </>
  );
}

function InviteForm({
  lastResult,
}: {
  readonly lastResult: NonNullable<Route.ComponentProps["actionData"]>["result"] | undefined;
}) {
  const { form, fields, pending } = useSchemaForm({ id: "invite", schema: inviteSchema, lastResult });
  const roles = plainField(fields.roles.name, { id: fields.roles.id, errors: fields.roles.errors });
  return (
    <Form method="post" {...getFormProps(form)} className="max-w-md space-y-4">
      <h2 className="text-lead font-semibold">Invite somebody</h2>
      <FormErrors
        errors={form.errors}
        fields={[
          { id: fields.email.id, label: "E-mail", errors: fields.email.errors },
          { id: `${fields.roles.id}-operator`, label: "Roles", errors: fields.roles.errors },
        ]}
      />
      <input type="hidden" name="intent" value="invite" />
      <TextField field={fields.email} label="E-mail" type="email" autoComplete="off" />
      <RoleBoxes legend="Roles" legendShown idPrefix={fields.roles.id} chosen={[]} field={roles} />
      <Button variant="primary" pending={pending}>
        Mail the invitation
      </Button>
    </Form>
  );
}
