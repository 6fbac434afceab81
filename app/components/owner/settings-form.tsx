import { FormProvider, getFormProps, type SubmissionResult } from "@conform-to/react";
import { Form } from "react-router";
import type { z } from "zod";
import { Button } from "../button";
import { CheckboxField } from "../checkbox-field";
import { FormErrors } from "../form-errors";
import { useSchemaForm } from "../schema-form";
import { TextAreaField } from "../text-area-field";
import { TextField } from "../text-field";
import { allErrors } from "./all-errors";
import { FormPart } from "./form-part";
import { type NumberRow, NumberRows } from "./number-rows";
import { settingsFormSchema } from "./settings-schema";

const ORDERS: readonly NumberRow[] = [
  { path: "review.cap", label: "A person looks at orders above", unit: "$" },
  { path: "quote.validDays", label: "A quote holds", unit: "days" },
  { path: "upload.maxMegabytes", label: "Largest drawing", unit: "MB" },
  { path: "upload.maxFiles", label: "Drawings in an order", unit: "files" },
];
const LEAD: readonly NumberRow[] = [
  { path: "lead.cutOffHour", label: "Approvals count that day until", unit: "o'clock" },
  { path: "lead.bufferDays", label: "Tabs, sanding and packing", unit: "working days" },
  { path: "lead.transitDays", label: "On the road", unit: "working days" },
];
const NESTING: readonly NumberRow[] = [
  { path: "nesting.spacing", label: "Between parts", unit: "mm" },
  { path: "nesting.margin", label: "Along the sheet's edges", unit: "mm" },
  { path: "nesting.plannedYield", label: "Share of a sheet planned to be parts", unit: "%" },
];
const FIT: readonly NumberRow[] = [
  { path: "fit.smallestTool", label: "Smallest tool", unit: "mm" },
  { path: "fit.bridge", label: "Gaps joined without asking, up to", unit: "mm" },
  { path: "fit.bridgeAsk", label: "Gaps joined with a question, up to", unit: "mm" },
  { path: "fit.smallestHeldArea", label: "Smallest part tabs hold, area", unit: "mm²" },
  { path: "fit.smallestHeldWidth", label: "Smallest part tabs hold, width", unit: "mm" },
  { path: "fit.thinFloor", label: "A pocket's floor is thin under", unit: "mm" },
  { path: "fit.thinnestFloor", label: "A pocket's floor is refused under", unit: "mm" },
];
const RETENTION: readonly NumberRow[] = [
  { path: "retention.abandonedDraftDays", label: "Drafts nobody touched are dropped after", unit: "days" },
];

const LABELS = new Map(
  [...ORDERS, ...LEAD, ...NESTING, ...FIT, ...RETENTION].map(({ path, label }) => [path, label]),
);

interface SettingsFormProps {
  readonly values: z.input<typeof settingsFormSchema>;
  readonly lastResult: SubmissionResult<string[]> | null | undefined;
}

/** Everything the owner sets that is not a price. */
export function SettingsForm({ values, lastResult }: SettingsFormProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "settings",
    schema: settingsFormSchema,
    lastResult,
    values,
  });
  const shop = fields.shop.getFieldset();
  const tax = fields.tax.getFieldset();
  const lead = fields.lead.getFieldset();
  const regions = tax.regions.getFieldList();
  return (
    <FormProvider context={form.context}>
      <Form method="post" {...getFormProps(form)}>
        <FormErrors errors={form.errors} fields={allErrors(form, (name) => LABELS.get(name) ?? name)} />
        {/* Return in a field saves; it does not add or remove a state. */}
        <button type="submit" hidden tabIndex={-1} aria-hidden="true" />
        <input
          type="hidden"
          name={fields.version.name}
          defaultValue={typeof fields.version.initialValue === "string" ? fields.version.initialValue : ""}
        />
        <FormPart title="The shop" note="It stands on mails, labels and receipts.">
          <div className="grid items-end gap-4 sm:grid-cols-2">
            <TextField field={shop.name} label="Name" autoComplete="organization" />
            <TextField field={shop.email} label="E-mail" type="email" />
            <TextField field={shop.phone} label="Telephone" type="tel" />
            <TextField field={shop.timeZone} label="Time zone" measured />
          </div>
          <TextAreaField field={shop.address} label="Address, a line a line" />
        </FormPart>
        <FormPart
          title="Sales tax"
          note="Where the shop collects it, as the accountant says. A state that is not here is not taxed."
        >
          <ul className="space-y-3">
            {regions.map((row, place) => {
              const region = row.getFieldset();
              return (
                <li key={row.key} className="flex flex-wrap items-end gap-4">
                  <div className="w-24">
                    <TextField field={region.region} label="State" measured />
                  </div>
                  <div className="w-36">
                    <TextField field={region.rate} label="Rate" type="number" step="any" measured unit="%" />
                  </div>
                  <div className="pb-1.5">
                    <CheckboxField field={region.freightTaxable} label="Freight is taxed" />
                  </div>
                  <Button
                    {...form.remove.getButtonProps({ name: tax.regions.name, index: place })}
                    variant="quiet"
                  >
                    Remove
                  </Button>
                </li>
              );
            })}
          </ul>
          <Button {...form.insert.getButtonProps({ name: tax.regions.name })} size="small">
            Another state
          </Button>
          <div className="w-40">
            <TextField field={tax.homeRegion} label="Pick-up is taxed in" measured />
          </div>
        </FormPart>
        <FormPart title="Orders and quotes">
          <NumberRows rows={ORDERS} />
        </FormPart>
        <FormPart title="Lead time">
          <NumberRows rows={LEAD} />
          <div className="max-w-sm">
            <TextAreaField field={lead.holidays} label="Holidays" hint="One a line: 2026-12-25." rows={6} />
          </div>
        </FormPart>
        <FormPart title="Nesting">
          <NumberRows rows={NESTING} />
        </FormPart>
        <FormPart
          title="Limits of the fit check"
          note="Drawings are checked against these from the next reading on."
        >
          <NumberRows rows={FIT} />
        </FormPart>
        <FormPart title="Retention">
          <NumberRows rows={RETENTION} />
        </FormPart>
        <FormPart title="Terms" note="Shown at the terms page and agreed to at the approval.">
          <TextAreaField field={fields.terms} label="The text; an empty line begins a paragraph" rows={14} />
        </FormPart>
        <Button variant="primary" pending={pending}>
          Save the settings
        </Button>
      </Form>
    </FormProvider>
  );
}
