import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { z } from "zod";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { CheckboxField } from "~/components/checkbox-field";
import { ConfirmButton } from "~/components/confirm-button";
import { EmptyState } from "~/components/empty-state";
import { FormErrors } from "~/components/form-errors";
import { useSchemaForm } from "~/components/schema-form";
import { Sheet } from "~/components/sheet";
import { TextField } from "~/components/text-field";
import { db } from "~/db/client.server";
import { shipToSchema } from "~/domain/orders";
import {
  type Address,
  addAddress,
  changeAddress,
  listAddresses,
  removeAddress,
} from "~/models/addresses.server";
import type { Route } from "./+types/addresses";
import { AccountTabs } from "./account-tabs";

/** A box that is not ticked sends nothing. */
const addressSchema = shipToSchema.extend({ residential: z.boolean().default(false) });

export async function loader(args: Route.LoaderArgs) {
  const person = await requireAct(args, "account.edit");
  const addresses = await listAddresses(db, person.id);
  const changing = args.url.searchParams.get("change");
  return { addresses, changed: addresses.find(({ id }) => id === changing) ?? null };
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "account.edit");
  const sent = await args.request.formData();
  const removed = sent.get("remove");
  if (typeof removed === "string") {
    await removeAddress(db, person.id, removed, new Date());
    throw redirect("/account/addresses");
  }
  const submission = parseWithZod(sent, { schema: addressSchema });
  if (submission.status !== "success") return data(submission.reply(), { status: 400 });
  const id = args.url.searchParams.get("change");
  if (id === null) await addAddress(db, person.id, submission.value);
  else if (!(await changeAddress(db, person.id, { id, shipTo: submission.value })))
    throw data({ words: "This address is no longer in your book." }, { status: 404 });
  throw redirect("/account/addresses");
}

export const meta: Route.MetaFunction = () => [{ title: "Addresses · Kerfpost" }];

export default function Addresses({ loaderData, actionData }: Route.ComponentProps) {
  const { addresses, changed } = loaderData;
  return (
    <>
      <AccountTabs at="/account/addresses" />
      <Sheet label="Address book">
        {addresses.length === 0 ? (
          <EmptyState>
            Where finished parts ship to. Orders keep a copy of the address they were made with.
          </EmptyState>
        ) : (
          <ul className="divide-y divide-line">
            {addresses.map((address) => (
              <AddressRow key={address.id} address={address} />
            ))}
          </ul>
        )}
      </Sheet>
      <Sheet padded>
        <AddressForm key={changed?.id ?? addresses.length} changed={changed} lastResult={actionData} />
      </Sheet>
    </>
  );
}

function AddressRow({ address: { id, shipTo } }: { readonly address: Address }) {
  const lines = [shipTo.company, shipTo.line1, shipTo.line2].filter((line) => line !== undefined);
  return (
    <li className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2 px-4 py-3">
      <address className="not-italic">
        <span className="font-medium">{shipTo.recipient}</span>
        <span className="block text-small text-soft">
          {lines.join(", ")}, {shipTo.city} {shipTo.region} {shipTo.postcode}
        </span>
      </address>
      <div className="flex flex-wrap gap-2">
        <ButtonLink to={`/account/addresses?change=${id}`} variant="quiet" size="small">
          Change
        </ButtonLink>
        <Form method="post">
          <ConfirmButton
            label="Remove"
            question={`${shipTo.recipient}, ${shipTo.line1} leaves the book. Orders made with it keep it.`}
            confirm="Remove it"
            name="remove"
            value={id}
            size="small"
            variant="quiet"
          />
        </Form>
      </div>
    </li>
  );
}

interface AddressFormProps {
  readonly changed: Address | null;
  readonly lastResult: Route.ComponentProps["actionData"];
}

function AddressForm({ changed, lastResult }: AddressFormProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "address",
    schema: addressSchema,
    lastResult,
    values: changed?.shipTo ?? { residential: true },
  });
  const asked = [
    ["recipient", "Recipient"],
    ["line1", "Street and number"],
    ["city", "City"],
    ["region", "State"],
    ["postcode", "ZIP code"],
  ] as const;
  return (
    <Form method="post" {...getFormProps(form)} className="max-w-md space-y-4">
      <h2 className="text-lead font-semibold">{changed ? "Change the address" : "Another address"}</h2>
      <FormErrors
        errors={form.errors}
        fields={asked.map(([name, label]) => ({
          id: fields[name].id,
          label,
          errors: fields[name].errors,
        }))}
      />
      <TextField field={fields.recipient} label="Recipient" autoComplete="name" />
      <TextField field={fields.company} label="Company, if any" autoComplete="organization" />
      <TextField field={fields.line1} label="Street and number" autoComplete="address-line1" />
      <TextField field={fields.line2} label="Apartment, dock, slip" autoComplete="address-line2" />
      <TextField field={fields.city} label="City" autoComplete="address-level2" />
      <div className="grid grid-cols-2 gap-4">
        <TextField field={fields.region} label="State" autoComplete="address-level1" measured />
        <TextField field={fields.postcode} label="ZIP code" autoComplete="postal-code" measured />
      </div>
      <TextField field={fields.phone} label="Telephone for the driver" type="tel" autoComplete="tel" />
      <CheckboxField
        field={fields.residential}
        label="A home, not a business"
        hint="Carriers ask; freight to a home may need a lift gate."
      />
      <div className="flex flex-wrap gap-2">
        <Button variant="primary" pending={pending}>
          {changed ? "Save" : "Add the address"}
        </Button>
        {changed && (
          <ButtonLink to="/account/addresses" variant="plain">
            Leave it
          </ButtonLink>
        )}
      </div>
    </Form>
  );
}
