import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { CheckboxField } from "~/components/checkbox-field";
import { ConfirmButton } from "~/components/confirm-button";
import { DateTime } from "~/components/date-time";
import { EmptyState } from "~/components/empty-state";
import { plainField } from "~/components/field";
import { FormErrors } from "~/components/form-errors";
import { Notice } from "~/components/notice";
import { useSchemaForm } from "~/components/schema-form";
import { Sheet } from "~/components/sheet";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { API_SCOPE_WORDS, API_SCOPES } from "~/domain/orders";
import { makeApiKey } from "~/flows/make-api-key.server";
import { revokeApiKey } from "~/flows/revoke-api-key.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { type ApiKey, listApiKeys } from "~/models/api-keys.server";
import type { Route } from "./+types/keys";
import { AccountTabs } from "./account-tabs";

const keySchema = z.object({
  name: z
    .string({ error: "What will use it?" })
    .trim()
    .min(1, "What will use it?")
    .max(60, "At most 60 letters"),
  scopes: z.array(z.enum(API_SCOPES)).min(1, "Choose what it may read"),
});

export async function loader(args: Route.LoaderArgs) {
  const person = await requireAct(args, "account.edit");
  return { keys: await listApiKeys(db, person.id) };
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "account.edit");
  const sent = await args.request.formData();
  const keyId = sent.get("revoke");
  if (typeof keyId === "string") {
    const revoked = await revokeApiKey({ actor: person, keyId });
    if (!revoked.ok) throw data({ words: revoked.words }, { status: REFUSAL_STATUS[revoked.reason] });
    return { secret: null, revoked: revoked.name, result: null };
  }
  const submission = parseWithZod(sent, { schema: keySchema });
  if (submission.status !== "success")
    return data({ secret: null, revoked: null, result: submission.reply() }, { status: 400 });
  const made = await makeApiKey({ actor: person, ...submission.value });
  if (!made.ok)
    return data(
      { secret: null, revoked: null, result: submission.reply({ formErrors: [made.words] }) },
      { status: REFUSAL_STATUS[made.reason] },
    );
  return data(
    { secret: made.secret, revoked: null, result: submission.reply({ resetForm: true }) },
    { headers: { "Cache-Control": "no-store" } },
  );
}

export const meta: Route.MetaFunction = () => [{ title: "API keys · Kerfpost" }];

export default function Keys({ loaderData, actionData }: Route.ComponentProps) {
  const { keys } = loaderData;
  return (
    <>
      <AccountTabs at="/account/keys" />
      {actionData?.secret && (
        <Notice tone="note" title="The new key, shown this once" live>
          <code className="measure block py-1 break-all select-all">{actionData.secret}</code>
          Keep it where your program finds it. Only its fingerprint is stored here.
        </Notice>
      )}
      {actionData?.revoked && (
        <Notice tone="note" live>
          {actionData.revoked} is revoked: it opens nothing any more.
        </Notice>
      )}
      <Sheet label="Keys">
        {keys.length === 0 ? (
          <EmptyState>
            A key lets a program of yours read your orders. How: <TextLink to="/api-guide">the API</TextLink>.
          </EmptyState>
        ) : (
          <ul className="divide-y divide-line">
            {keys.map((key) => (
              <KeyRow key={key.id} apiKey={key} />
            ))}
          </ul>
        )}
      </Sheet>
      <Sheet padded>
        <NewKey key={keys.length} lastResult={actionData?.result ?? null} />
      </Sheet>
    </>
  );
}

function KeyRow({ apiKey }: { readonly apiKey: ApiKey }) {
  const { id, name, prefix, scopes, createdAt, lastUsedAt, revokedAt } = apiKey;
  return (
    <li className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2 px-4 py-3">
      <div>
        <span className="font-medium">{name}</span>{" "}
        <span className="measure text-small text-soft">{prefix}…</span>
        <span className="block text-small text-soft">{scopes.join(", ")}</span>
        <span className="block text-small text-soft">
          Made <DateTime at={createdAt} show="day" />,{" "}
          {lastUsedAt ? (
            <>
              last used <DateTime at={lastUsedAt} show="day-time" />
            </>
          ) : (
            "never used"
          )}
          {revokedAt && (
            <>
              , revoked <DateTime at={revokedAt} show="day-time" />
            </>
          )}
        </span>
      </div>
      {!revokedAt && (
        <Form method="post">
          <ConfirmButton
            label="Revoke"
            question={`Whatever uses ${name} is turned away from now on. A revoked key does not come back.`}
            confirm="Revoke it"
            name="revoke"
            value={id}
            size="small"
            variant="quiet"
          />
        </Form>
      )}
    </li>
  );
}

type Result = NonNullable<Route.ComponentProps["actionData"]>["result"];

function NewKey({ lastResult }: { readonly lastResult: Result }) {
  const { form, fields, pending } = useSchemaForm({
    id: "api-key",
    schema: keySchema,
    lastResult: lastResult ?? undefined,
  });
  return (
    <Form method="post" {...getFormProps(form)} className="max-w-md space-y-4">
      <h2 className="text-lead font-semibold">Another key</h2>
      <FormErrors
        errors={form.errors}
        fields={[
          { id: fields.name.id, label: "What uses it", errors: fields.name.errors },
          {
            id: `${fields.scopes.id}-${API_SCOPES[0]}`,
            label: "What it may read",
            errors: fields.scopes.errors,
          },
        ]}
      />
      <TextField
        field={fields.name}
        label="What uses it"
        hint="A name to know it by: the order board in the workshop."
      />
      <fieldset className="space-y-2">
        <legend className="mb-2 font-medium">What it may read</legend>
        {API_SCOPES.map((scope) => (
          <CheckboxField
            key={scope}
            field={plainField(fields.scopes.name, { id: `${fields.scopes.id}-${scope}` })}
            label={API_SCOPE_WORDS[scope].label}
            hint={API_SCOPE_WORDS[scope].opens}
            value={scope}
          />
        ))}
      </fieldset>
      <Button variant="primary" pending={pending}>
        Make the key
      </Button>
    </Form>
  );
}
