import type { Executor } from "~/db/client.server";
import type { Interpretation, ShopSettings } from "~/domain/orders";
import {
  type PriceBook,
  type PricedPart,
  type PricedStock,
  planStock,
  type QuoteFacts,
} from "~/domain/pricing";
import { dayOf } from "~/domain/scheduling";
import { parcelLimits, plannedParcels } from "~/domain/shipping";
import { findMaterials, type Lot, listLots, type Material } from "~/models/materials.server";
import type { ListedPart } from "./listed-parts";
import { refuse, type Verdict } from "./verdict";

export interface Delivery {
  readonly delivery: "ship" | "pick-up";
  /** Two letters; null for pick-up. */
  readonly region: string | null;
}

export interface FactsOptions {
  readonly parts: readonly ListedPart[];
  readonly choices: Pick<Interpretation, "sanding" | "leaveTabs">;
  readonly delivery: Delivery;
  readonly taxExempt: boolean;
  readonly settings: ShopSettings;
  readonly book: PriceBook;
  readonly now: Date;
}

/** One stock of the order: its facts for the price, and the lot they were measured on. */
export interface StockPlan {
  readonly material: Material;
  /** Null when no lot on the rack has enough free sheets: then the nominal thickness stands in. */
  readonly lot: Lot | null;
  /** Whole sheets as charged. */
  readonly sheets: number;
  readonly parts: readonly ListedPart[];
}

/** Everything an order's price is made from, with the lots on the rack today. */
export async function collectFacts(
  executor: Executor,
  options: FactsOptions,
): Promise<Verdict<{ facts: QuoteFacts; stocks: readonly StockPlan[] }>> {
  const { parts, settings } = options;
  const materials = await findMaterials(
    executor,
    parts.map((part) => part.materialId),
  );
  const stocks: StockPlan[] = [];
  const priced: PricedStock[] = [];
  for (const group of groupByStock(parts)) {
    const material = materials.find(({ id }) => id === group.materialId);
    if (!material?.active)
      return refuse("incomplete", "A stock you chose is no longer offered. Choose another.");
    const nominal = pricedStock(material, null, group.parts);
    const { sheets } = planStock(nominal, settings.nesting.plannedYield, settings.nesting.spacing);
    const lot = chooseLot(await listLots(executor, material.id), group.wantedLotId, sheets);
    stocks.push({ material, lot, sheets, parts: group.parts });
    priced.push(pricedStock(material, lot, group.parts));
  }
  return {
    ok: true,
    stocks,
    facts: {
      stocks: priced,
      sanding: options.choices.sanding,
      leaveTabs: options.choices.leaveTabs,
      delivery: options.delivery.delivery,
      shipToRegion: options.delivery.region,
      parcels: options.delivery.delivery === "ship" ? planParcels(priced, options) : [],
      taxExempt: options.taxExempt,
      tax: taxFor(options.delivery, settings),
      plannedYield: settings.nesting.plannedYield,
      spacing: settings.nesting.spacing,
    },
  };
}

interface StockOfParts {
  readonly materialId: string;
  readonly wantedLotId: string | null;
  readonly parts: ListedPart[];
}

/** One group per material and kept lot, in the order of the part list. */
function groupByStock(parts: readonly ListedPart[]): StockOfParts[] {
  const groups: StockOfParts[] = [];
  for (const part of parts) {
    const group = groups.find(
      (one) => one.materialId === part.materialId && one.wantedLotId === part.wantedLotId,
    );
    if (group) group.parts.push(part);
    else groups.push({ materialId: part.materialId, wantedLotId: part.wantedLotId, parts: [part] });
  }
  return groups;
}

/** The kept lot if it still has the sheets; otherwise, as the list is sorted, the one with most free sheets. */
function chooseLot(lots: readonly Lot[], wantedLotId: string | null, sheets: number): Lot | null {
  const enough = lots.filter((lot) => lot.sheetsOnHand - lot.sheetsReserved >= sheets);
  return wantedLotId === null ? (enough[0] ?? null) : (enough.find((lot) => lot.id === wantedLotId) ?? null);
}

function pricedStock(material: Material, lot: Lot | null, parts: readonly ListedPart[]): PricedStock {
  const nominal = material.nominalThickness;
  return {
    materialId: material.id,
    materialName: material.name,
    lotId: lot?.id ?? null,
    lotCode: lot?.code ?? null,
    nominalThickness: nominal,
    thickness: lot
      ? { min: lot.thicknessMin, mean: lot.thicknessMean, max: lot.thicknessMax }
      : { min: nominal, mean: nominal, max: nominal },
    density: material.density,
    sheet: { length: material.sheetLength, width: material.sheetWidth },
    sheetPrice: material.sheetPrice,
    parts: parts.map(pricedPart),
  };
}

const pricedPart = (part: ListedPart): PricedPart => ({
  label: part.label,
  quantity: part.quantity,
  cutLength: part.outerLength + part.innerLength,
  outerLength: part.outerLength,
  holes: part.holes,
  area: part.area,
  grossArea: part.grossArea,
  box: { width: part.width, height: part.height },
});

/** Planned within the limits of parcel carriers; a day before the first known limits cannot be planned for. */
function planParcels(
  stocks: readonly PricedStock[],
  { book, now, settings }: FactsOptions,
): QuoteFacts["parcels"] {
  const limits = parcelLimits("private", dayOf(now, settings.shop.timeZone));
  return limits ? plannedParcels(stocks, limits, book.freight.maxParcelKilograms) : [];
}

/** Pick-up is taxed where the shop stands; a region that the owner did not list is not taxed. */
function taxFor({ delivery, region }: Delivery, settings: ShopSettings): QuoteFacts["tax"] {
  const where = delivery === "pick-up" ? settings.tax.homeRegion : (region ?? settings.tax.homeRegion);
  const rule = settings.tax.regions.find((one) => one.region === where);
  return { region: where, rate: rule?.rate ?? 0, freightTaxable: rule?.freightTaxable ?? false };
}
