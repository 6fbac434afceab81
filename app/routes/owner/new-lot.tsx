import { FormProvider, getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { FormErrors } from "~/components/form-errors";
import { LotFieldset } from "~/components/owner/lot-fieldset";
import { ReadingsFields } from "~/components/owner/readings-fields";
import { newLotSchema, readingsOf } from "~/components/owner/stock-forms";
import { PageHeader } from "~/components/page-header";
import { useSchemaForm } from "~/components/schema-form";
import { Sheet } from "~/components/sheet";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { addLot } from "~/flows/add-lot.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { findMaterial } from "~/models/stock.server";
import type { Route } from "./+types/new-lot";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "stock.edit");
  const material = await findMaterial(db, args.params.materialId);
  if (!material) throw data({ words: "There is no such material." }, { status: 404 });
  return { name: material.name, code: material.code };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "stock.edit");
  const submission = parseWithZod(await args.request.formData(), { schema: newLotSchema });
  if (submission.status !== "success") return data(submission.reply(), { status: 400 });
  const { code, supplierLot, supplierDocument, sheetsOnHand } = submission.value;
  const added = await addLot({
    actor,
    materialId: args.params.materialId,
    fields: { code, supplierLot, supplierDocument, sheetsOnHand },
    readings: readingsOf(submission.value),
  });
  if (!added.ok)
    return data(submission.reply({ formErrors: [added.words] }), { status: REFUSAL_STATUS[added.reason] });
  throw redirect(`/shop/stock/lots/${added.lotId}`);
}

export const meta: Route.MetaFunction = () => [{ title: "New lot · Kerfpost" }];

export default function NewLot({ loaderData, actionData }: Route.ComponentProps) {
  const { form, fields, pending } = useSchemaForm({
    id: "new-lot",
    schema: newLotSchema,
    lastResult: actionData,
    values: { code: `${loaderData.code}/` },
  });
  return (
    <>
      <PageHeader
        eyebrow={<TextLink to="/shop/stock">Stock</TextLink>}
        title={`Another lot of ${loaderData.name}`}
        lead="A stack is measured before anything is cut from it: joints are checked against its thinnest and thickest reading."
      />
      <Sheet padded>
        <FormProvider context={form.context}>
          <Form method="post" {...getFormProps(form)} className="space-y-6">
            <FormErrors errors={form.errors} />
            <LotFieldset fields={fields} />
            <ReadingsFields />
            <Button variant="primary" pending={pending}>
              Add the lot
            </Button>
          </Form>
        </FormProvider>
      </Sheet>
    </>
  );
}
