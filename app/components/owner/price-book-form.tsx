import { FormProvider, getFormProps, type SubmissionResult } from "@conform-to/react";
import { Form } from "react-router";
import type { z } from "zod";
import { Button } from "../button";
import { FormErrors } from "../form-errors";
import { useSchemaForm } from "../schema-form";
import { TextField } from "../text-field";
import { allErrors } from "./all-errors";
import { FormPart } from "./form-part";
import { NumberRows } from "./number-rows";
import { PRICE_SECTIONS } from "./price-book-rows";
import { priceBookFormSchema } from "./price-book-schema";

interface PriceBookFormProps {
  readonly values: z.input<typeof priceBookFormSchema>;
  readonly stamp: string;
  readonly lastResult: SubmissionResult<string[]> | null | undefined;
}

const LABELS = new Map(
  PRICE_SECTIONS.flatMap(({ rows }) => rows.map(({ path, label }) => [path, label] as const)),
);

/** The draft's prices, to be changed. */
export function PriceBookForm({ values, stamp, lastResult }: PriceBookFormProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "price-book",
    schema: priceBookFormSchema,
    lastResult,
    values,
  });
  const speeds = fields.cutSpeeds.getFieldList();
  return (
    <FormProvider context={form.context}>
      <Form method="post" {...getFormProps(form)}>
        <FormErrors errors={form.errors} fields={allErrors(form, (name) => LABELS.get(name) ?? name)} />
        {/* Return in a field saves; it does not add or remove a speed. */}
        <button type="submit" hidden tabIndex={-1} aria-hidden="true" />
        <input type="hidden" name="stamp" value={stamp} />
        {PRICE_SECTIONS.map(({ title, rows }) => (
          <FormPart key={title} title={title}>
            <NumberRows rows={rows} />
          </FormPart>
        ))}
        <FormPart
          title="Speeds, by nominal thickness"
          note="A sheet is cut at the speed of the first row that reaches its thickness. Length over speed is the minutes, times the passes."
        >
          <ul className="space-y-3">
            {speeds.map((row, place) => {
              const speed = row.getFieldset();
              return (
                <li key={row.key} className="flex flex-wrap items-end gap-4">
                  <div className="w-40">
                    <TextField
                      field={speed.upToThickness}
                      label="Up to"
                      type="number"
                      step="any"
                      measured
                      unit="mm"
                    />
                  </div>
                  <div className="w-44">
                    <TextField
                      field={speed.speed}
                      label="Speed"
                      type="number"
                      step="any"
                      measured
                      unit="mm/min"
                    />
                  </div>
                  <div className="w-28">
                    <TextField field={speed.passes} label="Passes" type="number" measured />
                  </div>
                  {speeds.length > 1 && (
                    <Button
                      {...form.remove.getButtonProps({ name: fields.cutSpeeds.name, index: place })}
                      variant="quiet"
                    >
                      Remove
                    </Button>
                  )}
                </li>
              );
            })}
          </ul>
          <Button {...form.insert.getButtonProps({ name: fields.cutSpeeds.name })} size="small">
            Another thickness
          </Button>
        </FormPart>
        <FormPart title="Why">
          <div className="max-w-xl">
            <TextField field={fields.note} label="A note for the record" />
          </div>
        </FormPart>
        <Button pending={pending}>Save the draft</Button>
      </Form>
    </FormProvider>
  );
}
