import { FormProvider, getFormProps } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { DateTime } from "~/components/date-time";
import { FormErrors } from "~/components/form-errors";
import { Notice } from "~/components/notice";
import { LotFieldset } from "~/components/owner/lot-fieldset";
import { ReadingsFields } from "~/components/owner/readings-fields";
import { RetireForm } from "~/components/owner/retire-form";
import { lotSchema, readingsOf, readingsSchema } from "~/components/owner/stock-forms";
import { stripScale, ThicknessStrip } from "~/components/owner/thickness-strip";
import { HeaderFact, PageHeader } from "~/components/page-header";
import { useSchemaForm } from "~/components/schema-form";
import { Sheet } from "~/components/sheet";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { beyondStandard, isPlywood, plywoodLimits, READING_POINTS } from "~/domain/fit";
import { changeLot } from "~/flows/change-lot.server";
import { readThickness } from "~/flows/read-thickness.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { findLot } from "~/models/materials.server";
import { findNames } from "~/models/people.server";
import { findMaterial, listLotReadings } from "~/models/stock.server";
import type { Route } from "./+types/lot";
import { retireAct } from "./retire-act.server";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "stock.edit");
  const lot = await findLot(db, args.params.lotId);
  const material = lot && (await findMaterial(db, lot.materialId));
  if (!lot || !material) throw data({ words: "There is no such lot." }, { status: 404 });
  const readings = await listLotReadings(db, lot.id);
  const names = await findNames(
    db,
    readings.flatMap(({ measuredBy }) => (measuredBy === null ? [] : [measuredBy])),
  );
  const thickness = { min: lot.thicknessMin, mean: lot.thicknessMean, max: lot.thicknessMax };
  const newest = readings.filter(({ measuredAt }) => measuredAt.getTime() === lot.measuredAt.getTime());
  return {
    lot: {
      id: lot.id,
      code: lot.code,
      version: lot.version,
      active: lot.active,
      supplierLot: lot.supplierLot,
      supplierDocument: lot.supplierDocument,
      sheetsOnHand: lot.sheetsOnHand,
      sheetsReserved: lot.sheetsReserved,
      measuredAt: lot.measuredAt,
    },
    material: {
      id: material.id,
      name: material.name,
      nominal: material.nominalThickness,
      plywood: isPlywood(material.kind),
    },
    thickness,
    beyond: isPlywood(material.kind)
      ? beyondStandard({ nominal: material.nominalThickness, thickness, readings: newest })
      : [],
    measurings: measuringsOf(readings, names),
  };
}

type Reading = Awaited<ReturnType<typeof listLotReadings>>[number];

/** The readings by the instant of their measuring, the newest first, a row a sheet with its points in their order. */
function measuringsOf(readings: readonly Reading[], names: ReadonlyMap<string, string>) {
  const instants = [...new Set(readings.map(({ measuredAt }) => measuredAt.getTime()))];
  return instants.map((instant) => {
    const own = readings.filter(({ measuredAt }) => measuredAt.getTime() === instant);
    return {
      at: new Date(instant),
      by: own[0]?.measuredBy ? (names.get(own[0].measuredBy) ?? null) : null,
      sheets: [...new Set(own.map(({ sheet }) => sheet))].map((sheet) => ({
        sheet,
        points: READING_POINTS.map(
          (point) =>
            own.find((reading) => reading.sheet === sheet && reading.position === point)?.thickness ?? null,
        ),
      })),
    };
  });
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "stock.edit");
  const { lotId } = args.params;
  const here = `/shop/stock/lots/${lotId}`;
  const sent = await args.request.formData();
  const retired = await retireAct(actor, "lot", sent);
  if (retired && !retired.ok)
    return data(
      { words: retired.words, lot: null, readings: null },
      { status: REFUSAL_STATUS[retired.reason] },
    );
  if (retired) throw redirect(here);
  if (sent.get("intent") === "measure") {
    const submission = parseWithZod(sent, { schema: readingsSchema });
    if (submission.status !== "success")
      return data({ words: null, lot: null, readings: submission.reply() }, { status: 400 });
    const { version = 0 } = submission.value;
    const measured = await readThickness({ actor, lotId, version, readings: readingsOf(submission.value) });
    if (!measured.ok)
      return data(
        { words: null, lot: null, readings: submission.reply({ formErrors: [measured.words] }) },
        { status: REFUSAL_STATUS[measured.reason] },
      );
    throw redirect(here);
  }
  const submission = parseWithZod(sent, { schema: lotSchema });
  if (submission.status !== "success")
    return data({ words: null, lot: submission.reply(), readings: null }, { status: 400 });
  const { version = 0, ...fields } = submission.value;
  const changed = await changeLot({ actor, lotId, version, fields });
  if (!changed.ok)
    return data(
      { words: null, lot: submission.reply({ formErrors: [changed.words] }), readings: null },
      { status: REFUSAL_STATUS[changed.reason] },
    );
  throw redirect(here);
}

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.lot.code ?? "Lot"} · Kerfpost` },
];

type Data = Route.ComponentProps["loaderData"];
type Reply = NonNullable<Route.ComponentProps["actionData"]>;

export default function Lot({ loaderData, actionData }: Route.ComponentProps) {
  const { lot, material, thickness, beyond, measurings } = loaderData;
  const limits = plywoodLimits(material.nominal);
  return (
    <>
      <PageHeader
        eyebrow={
          <>
            <TextLink to="/shop/stock">Stock</TextLink> /{" "}
            <TextLink to={`/shop/stock/materials/${material.id}`}>{material.name}</TextLink>
          </>
        }
        title={`Lot ${lot.code}`}
        right={
          <div className="flex flex-wrap items-center gap-6">
            <HeaderFact label="on hand">{lot.sheetsOnHand}</HeaderFact>
            <HeaderFact label="reserved">{lot.sheetsReserved}</HeaderFact>
            <RetireForm
              thing={{ ...lot, name: lot.code }}
              question="Nothing new is quoted or cut from it. Its readings stay on record."
            />
          </div>
        }
      />
      {actionData?.words && <Notice live>{actionData.words}</Notice>}
      {!lot.active && <Notice tone="note">This lot is retired: nothing is cut from it.</Notice>}
      {beyond.length > 0 && (
        <Notice title="Beyond the standard">
          {beyond.map((words) => (
            <p key={words}>{words}</p>
          ))}
        </Notice>
      )}
      <Sheet padded label="Thickness">
        <ThicknessStrip
          {...material}
          thickness={thickness}
          scale={stripScale([{ thickness, nominal: material.nominal, plywood: material.plywood }])}
        />
        <p className="mt-3 flex flex-wrap gap-x-8 gap-y-1 text-small">
          <span>
            thinnest <span className="measure">{thickness.min.toFixed(2)} mm</span>
          </span>
          <span className="text-blue">
            mean <span className="measure">{thickness.mean.toFixed(2)} mm</span>
          </span>
          <span>
            thickest <span className="measure">{thickness.max.toFixed(2)} mm</span>
          </span>
          <span className="text-soft">
            {material.plywood ? (
              <>
                EN 315 allows{" "}
                <span className="measure">
                  {limits.lower.toFixed(2)} to {limits.upper.toFixed(2)} mm
                </span>{" "}
                of {material.nominal} mm sanded plywood
              </>
            ) : (
              "no standard is held for this kind of sheet"
            )}
          </span>
        </p>
      </Sheet>
      <Sheet padded>
        <LotForm key={lot.version} lot={lot} reply={actionData?.lot} />
      </Sheet>
      <Sheet padded>
        <MeasureForm key={lot.measuredAt.getTime()} version={lot.version} reply={actionData?.readings} />
      </Sheet>
      {measurings.map((measuring) => (
        <Measuring key={measuring.at.getTime()} measuring={measuring} />
      ))}
    </>
  );
}

function LotForm({ lot, reply }: { readonly lot: Data["lot"]; readonly reply: Reply["lot"] | undefined }) {
  const { form, fields, pending } = useSchemaForm({
    id: "lot",
    schema: lotSchema,
    lastResult: reply,
    values: {
      ...lot,
      supplierLot: lot.supplierLot ?? undefined,
      supplierDocument: lot.supplierDocument ?? undefined,
    },
  });
  return (
    <Form method="post" {...getFormProps(form)} className="space-y-4">
      <FormErrors errors={form.errors} />
      <input type="hidden" name="version" value={lot.version} />
      <LotFieldset fields={fields} />
      <Button pending={pending}>Save</Button>
    </Form>
  );
}

function MeasureForm({
  version,
  reply,
}: {
  readonly version: number;
  readonly reply: Reply["readings"] | undefined;
}) {
  const { form, pending } = useSchemaForm({ id: "readings", schema: readingsSchema, lastResult: reply });
  return (
    <FormProvider context={form.context}>
      <Form method="post" {...getFormProps(form)} className="space-y-4">
        <h2 className="text-lead font-semibold">Measure it anew</h2>
        <FormErrors errors={form.errors} />
        <input type="hidden" name="intent" value="measure" />
        <input type="hidden" name="version" value={version} />
        <ReadingsFields />
        <Button pending={pending}>Save the readings</Button>
      </Form>
    </FormProvider>
  );
}

function Measuring({ measuring }: { readonly measuring: Data["measurings"][number] }) {
  return (
    <Sheet padded>
      <h2 className="mb-2 text-small font-semibold">
        Measured <DateTime at={measuring.at} show="day-time" />
        {measuring.by ? ` by ${measuring.by}` : ""}
      </h2>
      <Table caption="Readings in millimetres">
        <TableHead>
          <HeadCell>sheet</HeadCell>
          {READING_POINTS.map((point) => (
            <HeadCell key={point} numeric>
              {point}
            </HeadCell>
          ))}
        </TableHead>
        <tbody>
          {measuring.sheets.map(({ sheet, points }) => (
            <TableRow key={sheet}>
              <RowHead measured>{sheet}</RowHead>
              {points.map((thickness, at) => (
                <Cell key={READING_POINTS[at]} numeric>
                  {thickness?.toFixed(2) ?? ""}
                </Cell>
              ))}
            </TableRow>
          ))}
        </tbody>
      </Table>
    </Sheet>
  );
}
