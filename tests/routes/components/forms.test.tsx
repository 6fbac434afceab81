import { getFormProps, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { renderToString } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { z } from "zod";
import { CheckboxField } from "~/components/checkbox-field";
import { FormErrors } from "~/components/form-errors";
import { RadioField } from "~/components/radio-field";
import { SelectField } from "~/components/select-field";
import { TextAreaField } from "~/components/text-area-field";
import { TextField } from "~/components/text-field";

const schema = z.object({
  email: z.email("Give an e-mail address."),
  quantity: z.number("Give a whole number.").int().max(999),
  material: z.string(),
  travels: z.enum(["pick-up", "freight"]),
  words: z.string().optional(),
  approved: z.boolean().optional(),
});

function submitted(entries: Readonly<Record<string, string>>) {
  const data = new FormData();
  for (const [name, value] of Object.entries(entries)) data.set(name, value);
  return parseWithZod(data, { schema }).reply({ formErrors: ["Nothing was kept."] });
}

function OrderForm({ entries }: { readonly entries: Readonly<Record<string, string>> }) {
  const [form, fields] = useForm({ id: "order", lastResult: submitted(entries) });
  return (
    <form {...getFormProps(form)}>
      <FormErrors
        errors={form.errors}
        fields={[{ id: fields.email.id, label: "E-mail", errors: fields.email.errors }]}
      />
      <TextField field={fields.email} label="E-mail" type="email" />
      <TextField field={fields.quantity} label="How many" measured />
      <SelectField
        field={fields.material}
        label="Material"
        choices={[{ value: "birch", label: "18 mm birch" }]}
      />
      <RadioField
        field={fields.travels}
        label="How it travels"
        choices={[
          { value: "pick-up", label: "I fetch it" },
          { value: "freight", label: "Freight" },
        ]}
      />
      <TextAreaField field={fields.words} label="Words" />
      <CheckboxField field={fields.approved} label="Sizes are right" />
    </form>
  );
}

describe("a form that came back", () => {
  const page = renderToString(
    <OrderForm
      entries={{
        email: "not an address",
        quantity: "12",
        material: "birch",
        travels: "freight",
        words: "Mind the grain.",
        approved: "on",
      }}
    />,
  );

  it("keeps what was typed and chosen", () => {
    expect(page).toMatch(/<input[^>]*name="email"[^>]*value="not an address"/);
    expect(page).toMatch(/<input[^>]*name="quantity"[^>]*value="12"/);
    expect(page).toMatch(/<option[^>]*value="birch"[^>]*selected/);
    expect(page).toMatch(/<input[^>]*name="travels"[^>]*checked=""[^>]*value="freight"/);
    expect(page).toMatch(/<textarea[^>]*>Mind the grain\.<\/textarea>/);
    expect(page).toMatch(/<input[^>]*name="approved"[^>]*checked=""/);
  });

  it("says what is wrong beside the field and in the summary, and nowhere else", () => {
    expect(page.match(/aria-invalid="true"/g)).toHaveLength(1);
    expect(page.match(/Give an e-mail address\./g)).toHaveLength(2);
    expect(page).toMatch(/role="alert"[^>]*>.*Nothing was kept\./);
    expect(page).toContain('href="#order-email"');
  });
});
