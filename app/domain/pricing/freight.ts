import { formatMoney, roundHalfUp } from "~/domain/units";
import type { PriceBook } from "./price-book";
import type { PlannedParcel, QuoteFacts, QuoteLine } from "./quote";
import { counted } from "./shop-lines";

const kilograms = (parcels: readonly PlannedParcel[]): number =>
  parcels.reduce((sum, parcel) => sum + parcel.kilograms, 0);

/**
 * Parcels where every one is within a parcel's limits and they cost no more than pallets; otherwise everything
 * travels on pallets.
 */
export function freightLine(facts: QuoteFacts, book: PriceBook): QuoteLine {
  if (facts.delivery === "pick-up") {
    return {
      kind: "freight",
      label: "Pick-up",
      how: "Collected at the shop: no freight.",
      amount: 0,
      taxable: false,
    };
  }
  const { freight } = book;
  const weight = kilograms(facts.parcels);
  const shown = `${weight.toFixed(1)} kg`;
  const pallets = Math.ceil(weight / freight.maxPalletKilograms - 1e-9);
  const byParcel = roundHalfUp(facts.parcels.length * freight.perParcel + weight * freight.perKilogram);
  const byPallet = roundHalfUp(pallets * freight.perPallet + weight * freight.palletPerKilogram);
  const oversize = facts.parcels.filter((parcel) => parcel.oversize).length;
  const taxable = facts.tax.freightTaxable;

  if (oversize === 0 && byParcel <= byPallet) {
    return {
      kind: "freight",
      label: `Freight, ${counted(facts.parcels.length, "parcel")}`,
      how:
        `${counted(facts.parcels.length, "parcel")} to ${facts.shipToRegion} at ${formatMoney(freight.perParcel)}, ` +
        `and ${shown} with packing at ${formatMoney(freight.perKilogram)}/kg.`,
      amount: byParcel,
      taxable,
    };
  }
  const why =
    oversize > 0
      ? `${counted(oversize, "bundle")} beyond what a parcel may be`
      : `cheaper than ${counted(facts.parcels.length, "parcel")}`;
  return {
    kind: "freight",
    label: `Freight, ${counted(pallets, "pallet")}`,
    how:
      `${counted(pallets, "pallet")} to ${facts.shipToRegion} at ${formatMoney(freight.perPallet)} (${why}), ` +
      `and ${shown} with packing at ${formatMoney(freight.palletPerKilogram)}/kg.`,
    amount: byPallet,
    taxable,
  };
}
