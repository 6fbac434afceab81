import { getFieldsetProps, getFormProps, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import type { ShipTo } from "~/domain/orders";
import { Button } from "../button";
import { CheckboxField } from "../checkbox-field";
import { plainField } from "../field";
import { FormErrors } from "../form-errors";
import { RadioField } from "../radio-field";
import { RailSection } from "../rail";
import { TextField } from "../text-field";
import { newAddressSchema, PICK_UP } from "./order-acts";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

interface DeliveryPanelProps {
  readonly delivery: "ship" | "pick-up" | null;
  readonly shipTo: ShipTo | null;
  readonly addresses: readonly { readonly id: string; readonly shipTo: ShipTo }[];
  readonly shopAddress: readonly string[];
  readonly version: number;
}

export const placeWords = ({ recipient, line1, city, region, postcode }: ShipTo): string =>
  `${recipient}, ${line1}, ${city} ${region} ${postcode}`;

/** Where a draft goes: picked up, to an address of the book, or to a new one. Freight and tax depend on it. */
export function DeliveryPanel(props: DeliveryPanelProps) {
  const { delivery, shipTo } = props;
  return (
    <div id="delivery" tabIndex={-1} className="scroll-mt-4 outline-offset-4">
      <RailSection title="Where it goes">
        {delivery === null ? (
          <DeliveryChoice {...props} />
        ) : (
          <>
            <p>{delivery === "pick-up" ? "You pick it up at the shop." : shipTo && placeWords(shipTo)}</p>
            <details className="mt-1 print:hidden">
              <summary className="inline-flex min-h-7 items-center text-blue hover:underline pointer-coarse:min-h-11">
                Send it elsewhere
              </summary>
              <div className="mt-2">
                <DeliveryChoice {...props} />
              </div>
            </details>
          </>
        )}
      </RailSection>
    </div>
  );
}

function DeliveryChoice({ delivery, shipTo, addresses, shopAddress, version }: DeliveryPanelProps) {
  const act = useAct("delivery");
  const saved = addresses.find((one) => shipTo !== null && placeWords(one.shipTo) === placeWords(shipTo));
  const value = delivery === "pick-up" ? PICK_UP : (saved?.id ?? addresses[0]?.id ?? "");
  return (
    <div className="space-y-3">
      <act.Form method="post" className="space-y-2">
        <RefusalNotice refusal={act.refusal} />
        <input type="hidden" name="intent" value="delivery" />
        <input type="hidden" name="version" value={version} />
        <RadioField
          field={plainField("to", { id: "delivery-to", value, required: true })}
          label="Where it goes"
          labelHidden
          choices={[
            ...addresses.map(({ id, shipTo: to }) => ({
              value: id,
              label: `Ship to ${to.recipient}`,
              hint: `${to.line1}, ${to.city} ${to.region} ${to.postcode}`,
            })),
            { value: PICK_UP, label: "I pick it up", hint: shopAddress.slice(1).join(", ") },
          ]}
        />
        <Button size="small" pending={act.pending}>
          Use this
        </Button>
      </act.Form>
      <details>
        <summary className="inline-flex min-h-7 items-center text-blue hover:underline pointer-coarse:min-h-11">
          Another address
        </summary>
        <NewAddress version={version} />
      </details>
    </div>
  );
}

function NewAddress({ version }: { readonly version: number }) {
  const act = useAct("new-address");
  const [form, fields] = useForm({
    id: "new-address",
    lastResult: act.result,
    shouldValidate: "onSubmit",
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: newAddressSchema }),
  });
  const to = fields.shipTo.getFieldset();
  const lines = [
    { field: to.recipient, label: "Who receives it", autoComplete: "name" },
    { field: to.company, label: "Company, if any", autoComplete: "organization" },
    { field: to.line1, label: "Street and number", autoComplete: "address-line1" },
    { field: to.line2, label: "Apartment, dock, slip", autoComplete: "address-line2" },
    { field: to.city, label: "City", autoComplete: "address-level2" },
    { field: to.region, label: "State, two letters", autoComplete: "address-level1" },
    { field: to.postcode, label: "ZIP code", autoComplete: "postal-code" },
    { field: to.phone, label: "Telephone, for the carrier", autoComplete: "tel" },
  ] as const;
  return (
    <act.Form method="post" {...getFormProps(form)} className="mt-2 space-y-3">
      <FormErrors
        errors={form.errors}
        fields={lines.map(({ field, label }) => ({ id: field.id, label, errors: field.errors }))}
      />
      <RefusalNotice refusal={act.refusal} />
      <input type="hidden" name="intent" value="new-address" />
      <input type="hidden" name="version" value={version} />
      <fieldset {...getFieldsetProps(fields.shipTo)} className="space-y-3">
        <legend className="sr-only">Address</legend>
        {lines.map(({ field, label, autoComplete }) => (
          <TextField key={field.name} field={field} label={label} autoComplete={autoComplete} />
        ))}
        <CheckboxField field={to.residential} label="A home, not a business" defaultChecked />
      </fieldset>
      <CheckboxField field={fields.keep} label="Keep it in my address book" defaultChecked />
      <Button size="small" pending={act.pending}>
        Ship to this address
      </Button>
    </act.Form>
  );
}
