import { requireAct } from "~/auth/guards.server";
import { ButtonLink } from "~/components/button-link";
import { DateTime } from "~/components/date-time";
import { EmptyState } from "~/components/empty-state";
import { Measure, Size } from "~/components/measure";
import { Money } from "~/components/money";
import { stripScale, ThicknessStrip } from "~/components/owner/thickness-strip";
import { HeaderFact, PageHeader } from "~/components/page-header";
import { Sheet } from "~/components/sheet";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { beyondStandard, isPlywood } from "~/domain/fit";
import { listAllLots, listAllMaterials, listNewestReadings } from "~/models/stock.server";
import type { Route } from "./+types/stock";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "stock.edit");
  const lots = await listAllLots(db);
  const readings = await listNewestReadings(db);
  const materials = await listAllMaterials(db);
  return {
    materials: materials.map((material) => {
      const { id, code, name, kind, nominalThickness, sheetLength, sheetWidth, sheetPrice, active } =
        material;
      return {
        id,
        code,
        name,
        plywood: isPlywood(kind),
        nominal: nominalThickness,
        sheetLength,
        sheetWidth,
        sheetPrice,
        active,
        lots: lots
          .filter((lot) => lot.materialId === id)
          .map((lot) => {
            const thickness = { min: lot.thicknessMin, mean: lot.thicknessMean, max: lot.thicknessMax };
            return {
              id: lot.id,
              code: lot.code,
              active: lot.active,
              onHand: lot.sheetsOnHand,
              reserved: lot.sheetsReserved,
              measuredAt: lot.measuredAt,
              hasPaper: lot.supplierDocument !== null,
              thickness,
              beyond: isPlywood(kind)
                ? beyondStandard({
                    nominal: nominalThickness,
                    thickness,
                    readings: readings.filter(({ lotId }) => lotId === lot.id),
                  })
                : [],
            };
          }),
      };
    }),
  };
}

export const meta: Route.MetaFunction = () => [{ title: "Stock · Kerfpost" }];

type Material = Route.ComponentProps["loaderData"]["materials"][number];

export default function Stock({ loaderData }: Route.ComponentProps) {
  const inUse = loaderData.materials.filter(({ active }) => active);
  const retired = loaderData.materials.filter(({ active }) => !active);
  const sheets = inUse.flatMap(({ lots }) => lots).reduce((sum, lot) => sum + lot.onHand, 0);
  return (
    <>
      <PageHeader
        title="Stock"
        lead="What a sheet is called is its nominal; what is cut and checked is what was measured. Each strip runs from a lot's thinnest to its thickest reading, the blue mark is the mean, the dashed lines are what EN 315 allows."
        right={
          <div className="flex flex-wrap items-center gap-6">
            <HeaderFact label="sheets on hand">{sheets}</HeaderFact>
            <ButtonLink to="/shop/stock/materials/new" variant="primary">
              Add a material
            </ButtonLink>
          </div>
        }
      />
      {inUse.length === 0 ? (
        <EmptyState place>No material yet. Builders choose from what stands here.</EmptyState>
      ) : (
        inUse.map((material) => <MaterialSheet key={material.id} material={material} />)
      )}
      {retired.length > 0 && (
        <Sheet padded>
          <h2 className="mb-2 text-small font-semibold">Retired</h2>
          <ul className="flex flex-wrap gap-x-6 gap-y-1 text-small">
            {retired.map(({ id, code, name }) => (
              <li key={id}>
                <TextLink to={`/shop/stock/materials/${id}`}>
                  <span className="measure">{code}</span> {name}
                </TextLink>
              </li>
            ))}
          </ul>
        </Sheet>
      )}
    </>
  );
}

function MaterialSheet({ material }: { readonly material: Material }) {
  const { id, code, name, nominal, plywood, lots } = material;
  const shown = lots.filter((lot) => lot.active);
  const scale =
    shown.length > 0 ? stripScale(shown.map(({ thickness }) => ({ thickness, nominal, plywood }))) : null;
  const retired = lots.length - shown.length;
  return (
    <Sheet label={name}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b border-line px-4 py-3">
        <h2 className="text-body font-semibold">
          <TextLink to={`/shop/stock/materials/${id}`}>
            <span className="measure">{code}</span> {name}
          </TextLink>
        </h2>
        <p className="flex flex-wrap items-baseline gap-x-4 gap-y-1 text-small text-soft">
          <span>
            nominal <Measure length={nominal} digits={2} />
          </span>
          <Size width={material.sheetLength} height={material.sheetWidth} />
          <span>
            <Money cents={material.sheetPrice} /> a sheet
          </span>
          <TextLink to={`/shop/stock/materials/${id}/lots/new`}>
            Add a lot<span className="sr-only"> of {name}</span>
          </TextLink>
        </p>
      </div>
      {scale === null ? (
        <p className="px-4 py-4 text-small text-amber">
          No lot in use. Orders on it are checked against the nominal thickness and cannot be quoted.
        </p>
      ) : (
        <ul className="divide-y divide-line">
          {shown.map((lot) => (
            <li
              key={lot.id}
              className="grid items-center gap-x-8 gap-y-2 px-4 py-3 md:grid-cols-[10rem_minmax(0,1fr)_13rem]"
            >
              <div>
                <TextLink to={`/shop/stock/lots/${lot.id}`}>
                  <span className="measure">{lot.code}</span>
                </TextLink>
                <p className="text-caption text-soft">
                  measured <DateTime at={lot.measuredAt} show="day" />
                </p>
              </div>
              <ThicknessStrip thickness={lot.thickness} nominal={nominal} plywood={plywood} scale={scale} />
              <div className="text-small md:text-right">
                <p className="measure">
                  {lot.thickness.min.toFixed(2)} ·{" "}
                  <span className="text-blue">{lot.thickness.mean.toFixed(2)}</span> ·{" "}
                  {lot.thickness.max.toFixed(2)} mm
                </p>
                <p className={lot.onHand - lot.reserved > 0 ? "text-soft" : "text-amber"}>
                  <span className="measure">{lot.onHand}</span> on hand,{" "}
                  <span className="measure">{lot.reserved}</span> reserved
                </p>
                {!lot.hasPaper && <p className="text-caption text-amber">no supplier's document</p>}
              </div>
              {lot.beyond.length > 0 && (
                <ul className="text-small text-amber md:col-span-3">
                  {lot.beyond.map((words) => (
                    <li key={words}>{words}</li>
                  ))}
                </ul>
              )}
            </li>
          ))}
        </ul>
      )}
      {retired > 0 && (
        <p className="border-t border-line px-4 py-2 text-caption text-soft">
          {retired === 1 ? "One lot" : `${retired} lots`} retired: see the material's own page.
        </p>
      )}
    </Sheet>
  );
}
