import { checkFit, type Finding } from "~/domain/fit";
import type { ShopSettings } from "~/domain/orders";
import type { FileReport, ListedPart } from "./listed-parts";

/** A stock as the fit is checked against it: the lot's measured thickness, or the nominal one for want of a lot. */
export interface FitStockOf {
  readonly parts: readonly ListedPart[];
  readonly thickness: { readonly min: number; readonly mean: number; readonly max: number };
  readonly sheet: { readonly length: number; readonly width: number };
}

/** A finding with the drawing it is in: letters of parts and places are of one drawing only. */
export interface FileFinding extends Finding {
  readonly fileSha: string;
}

/** What the fit says of every file of an order on the stock chosen for it, files in their order. */
export function checkOrderFit(
  files: readonly FileReport[],
  stocks: readonly FitStockOf[],
  { fit, nesting }: Pick<ShopSettings, "fit" | "nesting">,
): FileFinding[] {
  return files.flatMap(({ sha256, report }) => {
    const stock = stocks.find((one) => one.parts.some((part) => part.fileSha === sha256));
    if (!stock) return [];
    const found = checkFit({
      report,
      stock: {
        thickness: stock.thickness,
        sheet: { width: stock.sheet.length, height: stock.sheet.width },
        margin: nesting.margin,
      },
      tools: { smallestDiameter: fit.smallestTool },
      limits: {
        smallestPartArea: fit.smallestHeldArea,
        narrowestPart: fit.smallestHeldWidth,
        thinFloor: fit.thinFloor,
        thinnestFloor: fit.thinnestFloor,
      },
    });
    return found.map((finding) => ({ ...finding, fileSha: sha256 }));
  });
}
