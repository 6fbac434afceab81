import type { PlannedParcel, PricedStock } from "~/domain/pricing";
import { panelKilograms } from "~/domain/units";
import type { ParcelLimits } from "./parcel-limits";
import { type FlatPiece, suggestParcels } from "./suggest-parcels";

/** Every piece of an order's stocks, one by one, as it will lie in a stack: its box and its measured thickness and weight. */
export const flatPiecesOf = (stocks: readonly PricedStock[]): readonly FlatPiece[] =>
  stocks.flatMap(({ materialId, thickness, density, parts }) =>
    parts.flatMap((part) =>
      Array.from({ length: part.quantity }, (_, i) => ({
        id: `${materialId} ${part.label} ${i + 1}`,
        width: part.box.width,
        height: part.box.height,
        thickness: thickness.max,
        kilograms: panelKilograms(part.area, thickness.mean, density),
      })),
    ),
  );

/** How an order would be packed, for its price: within the carrier's limits and the shop's own heaviest parcel. */
export const plannedParcels = (
  stocks: readonly PricedStock[],
  limits: ParcelLimits,
  maxParcelKilograms: number,
): readonly PlannedParcel[] =>
  suggestParcels(flatPiecesOf(stocks), {
    ...limits,
    maxKilograms: Math.min(limits.maxKilograms, maxParcelKilograms),
  }).map(({ kilograms, oversize }) => ({ kilograms, oversize }));
