import type { PriceBook } from "./price-book";
import type { PricedPart, QuoteFacts } from "./quote";

const isSized = ({ quantity, box, cutLength, outerLength, grossArea, area, holes }: PricedPart): boolean =>
  Number.isInteger(quantity) &&
  quantity > 0 &&
  Number.isInteger(holes) &&
  holes >= 0 &&
  [box.width, box.height, cutLength, outerLength, grossArea, area].every(
    (size) => Number.isFinite(size) && size > 0,
  );

/** Why facts cannot be priced, in a sentence for the builder; null when they can. */
export function refusalOf(facts: QuoteFacts, book: PriceBook): string | null {
  if (facts.stocks.length === 0) return "There is nothing to price: no stock has been chosen.";
  for (const stock of facts.stocks) {
    if (stock.parts.length === 0) return `No part is cut from ${stock.materialName}.`;
    if (!(stock.sheet.length > 0 && stock.sheet.width > 0))
      return `The sheet size of ${stock.materialName} is not set.`;
    const unsized = stock.parts.find((part) => !isSized(part));
    if (unsized) return `Part ${unsized.label} has no size or no quantity.`;
  }
  if (facts.delivery === "ship") {
    if (!facts.shipToRegion) return "The ship-to address is needed to price freight and tax.";
    if (facts.parcels.length === 0) return "Freight cannot be priced: no parcels are planned.";
    const heaviest = Math.max(...facts.parcels.map((parcel) => parcel.kilograms));
    if (heaviest > book.freight.maxPalletKilograms)
      return `A pallet carries at most ${book.freight.maxPalletKilograms} kg; a panel weighs ${heaviest.toFixed(1)} kg.`;
  }
  return null;
}
