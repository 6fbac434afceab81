import type { PricedPart, PricedStock } from "./quote";

/** Square millimetres that a part takes with half the spacing around it; exact for a rectangle, and a little over for other shapes. */
export const nestedArea = (part: Pick<PricedPart, "grossArea" | "outerLength">, spacing: number): number =>
  part.grossArea + (part.outerLength * spacing) / 2 + spacing ** 2;

/**
 * Sheets by the planned yield: the share of a sheet that an area stands for, which may be above one, and the
 * whole sheets that it is charged as.
 */
export function planSheets({
  area,
  sheetArea,
  plannedYield,
}: {
  area: number;
  sheetArea: number;
  plannedYield: number;
}): { readonly share: number; readonly sheets: number } {
  const share = area / (sheetArea * plannedYield);
  return { share, sheets: Math.ceil(share - 1e-9) };
}

export interface PlannedStock {
  readonly stock: PricedStock;
  readonly pieces: number;
  readonly area: number;
  readonly share: number;
  readonly sheets: number;
}

export function planStock(stock: PricedStock, plannedYield: number, spacing: number): PlannedStock {
  const area = stock.parts.reduce((sum, part) => sum + nestedArea(part, spacing) * part.quantity, 0);
  const pieces = stock.parts.reduce((sum, part) => sum + part.quantity, 0);
  const sheetArea = stock.sheet.length * stock.sheet.width;
  return { stock, pieces, area, ...planSheets({ area, sheetArea, plannedYield }) };
}
