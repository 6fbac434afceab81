import { getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { ButtonLink } from "~/components/button-link";
import { CheckboxField } from "~/components/checkbox-field";
import { FormErrors } from "~/components/form-errors";
import { Notice } from "~/components/notice";
import { allErrors } from "~/components/owner/all-errors";
import { RetireForm } from "~/components/owner/retire-form";
import { MATERIAL_KINDS, materialSchema } from "~/components/owner/stock-forms";
import { PageHeader } from "~/components/page-header";
import { useSchemaForm } from "~/components/schema-form";
import { SelectField } from "~/components/select-field";
import { Sheet } from "~/components/sheet";
import { TextField } from "~/components/text-field";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { saveMaterial } from "~/flows/save-material.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { findMaterial, listAllLots } from "~/models/stock.server";
import type { Route } from "./+types/material";
import { retireAct } from "./retire-act.server";

/** The address of one that is not there yet. */
const NEW = "new";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "stock.edit");
  const { materialId } = args.params;
  if (materialId === NEW) return { material: null, retiredLots: [] };
  const material = await findMaterial(db, materialId);
  if (!material) throw data({ words: "There is no such material." }, { status: 404 });
  const { createdAt: _createdAt, ...shown } = material;
  const lots = await listAllLots(db);
  return {
    material: shown,
    retiredLots: lots
      .filter((lot) => lot.materialId === materialId && !lot.active)
      .map(({ id, code }) => ({ id, code })),
  };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "stock.edit");
  const { materialId } = args.params;
  const sent = await args.request.formData();
  const retired = await retireAct(actor, "material", sent);
  if (retired && !retired.ok)
    return data({ words: retired.words, result: null }, { status: REFUSAL_STATUS[retired.reason] });
  if (retired) throw redirect("/shop/stock");
  const submission = parseWithZod(sent, { schema: materialSchema });
  if (submission.status !== "success")
    return data({ words: null, result: submission.reply() }, { status: 400 });
  const { version = 0, ...fields } = submission.value;
  const saved = await saveMaterial({
    actor,
    material: materialId === NEW ? null : { id: materialId, version },
    fields,
  });
  if (!saved.ok)
    return data(
      { words: null, result: submission.reply({ formErrors: [saved.words] }) },
      { status: REFUSAL_STATUS[saved.reason] },
    );
  throw redirect("/shop/stock");
}

export const meta: Route.MetaFunction = ({ loaderData }) => [
  {
    title: `${loaderData && "material" in loaderData ? (loaderData.material?.code ?? "New material") : "Material"} · Kerfpost`,
  },
];

const KIND_LABELS: Readonly<Record<(typeof MATERIAL_KINDS)[number], string>> = {
  "birch-plywood": "birch plywood",
  "hardwood-plywood": "hardwood plywood",
  "softwood-plywood": "softwood plywood",
  mdf: "MDF",
  acrylic: "acrylic",
  hdpe: "HDPE",
  composite: "composite",
};

const LABELS: Readonly<Record<string, string>> = {
  code: "Code",
  name: "Name",
  kind: "Kind",
  nominalThickness: "Nominal thickness",
  sheetLength: "Length",
  sheetWidth: "Width",
  density: "Density",
  sheetPrice: "Price",
};

export default function Material({ loaderData, actionData }: Route.ComponentProps) {
  const { material, retiredLots } = loaderData;
  const { form, fields, pending } = useSchemaForm({
    id: "material",
    schema: materialSchema,
    lastResult: actionData?.result,
    values: material
      ? { ...material, sheetPrice: material.sheetPrice / 100 }
      : { hasGrain: true, sheetLength: 2440, sheetWidth: 1220 },
  });
  return (
    <>
      <PageHeader
        eyebrow={<TextLink to="/shop/stock">Stock</TextLink>}
        title={material ? material.name : "Another material"}
        lead="Builders see name and thickness. Quotes that stand keep the price of the sheet they were made with."
        right={
          material && (
            <RetireForm
              thing={{ ...material, name: material.code }}
              question="Builders can no longer choose it, and drafts on it need another stock. Orders that are paid are cut."
            />
          )
        }
      />
      {actionData?.words && <Notice live>{actionData.words}</Notice>}
      {material && !material.active && (
        <Notice tone="note">This material is retired: builders do not see it.</Notice>
      )}
      <Sheet padded>
        <Form method="post" {...getFormProps(form)} className="max-w-3xl space-y-4">
          <FormErrors errors={form.errors} fields={allErrors(form, (name) => LABELS[name] ?? name)} />
          {material && <input type="hidden" name="version" value={material.version} />}
          <div className="grid items-end gap-4 sm:grid-cols-2">
            <TextField field={fields.code} label="Code on labels and cut sheets" measured />
            <TextField field={fields.name} label="Name" />
            <SelectField
              field={fields.kind}
              label="Kind"
              placeholder="Choose"
              choices={MATERIAL_KINDS.map((kind) => ({ value: kind, label: KIND_LABELS[kind] }))}
            />
            <TextField
              field={fields.nominalThickness}
              label="Nominal thickness"
              type="number"
              step="any"
              measured
              unit="mm"
            />
            <TextField
              field={fields.sheetLength}
              label="Length, along the grain"
              type="number"
              step="any"
              measured
              unit="mm"
            />
            <TextField field={fields.sheetWidth} label="Width" type="number" step="any" measured unit="mm" />
            <TextField
              field={fields.density}
              label="Density"
              type="number"
              step="any"
              measured
              unit="kg/m³"
            />
            <TextField
              field={fields.sheetPrice}
              label="Price of a sheet, before mark-up"
              type="number"
              step="any"
              measured
              unit="$"
            />
          </div>
          <CheckboxField
            field={fields.hasGrain}
            label="Its face has a grain"
            hint="Parts whose direction is fixed are not turned on it."
          />
          <div className="flex flex-wrap gap-2">
            <Button variant="primary" pending={pending}>
              {material ? "Save" : "Add it"}
            </Button>
            {material && (
              <ButtonLink to={`/shop/stock/materials/${material.id}/lots/new`}>Add a lot</ButtonLink>
            )}
          </div>
        </Form>
      </Sheet>
      {retiredLots.length > 0 && (
        <Sheet padded>
          <h2 className="mb-2 text-small font-semibold">Retired lots</h2>
          <ul className="flex flex-wrap gap-x-6 gap-y-1 text-small">
            {retiredLots.map(({ id, code }) => (
              <li key={id}>
                <TextLink to={`/shop/stock/lots/${id}`}>
                  <span className="measure">{code}</span>
                </TextLink>
              </li>
            ))}
          </ul>
        </Sheet>
      )}
    </>
  );
}
