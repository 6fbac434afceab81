import type { Interpretation } from "~/domain/orders";
import type { PartsReport } from "~/domain/parts";

/** A kind of part on an order's part list, of whatever file. Lengths millimetres, areas mm2. */
export interface ListedPart {
  readonly fileSha: string;
  readonly letter: string;
  /** Unique in the order: `A`, or `2A` for the second of several drawings. */
  readonly label: string;
  readonly name: string;
  /** Copies drawn, times the sets ordered. */
  readonly quantity: number;
  readonly mirrorOf: string | null;
  readonly materialId: string;
  /** The lot that the builder keeps, as after a fit strip; null lets the shop choose. */
  readonly wantedLotId: string | null;
  readonly grain: "along-x" | "along-y" | "free";
  readonly width: number;
  readonly height: number;
  readonly outerLength: number;
  readonly innerLength: number;
  readonly area: number;
  readonly grossArea: number;
  readonly holes: number;
}

export interface FileReport {
  readonly sha256: string;
  readonly report: PartsReport;
}

/** The part list under an interpretation, drawings in its order. Parts of files without a stock are left out. */
export function listOrderParts(files: readonly FileReport[], interpretation: Interpretation): ListedPart[] {
  const several = interpretation.files.length > 1;
  return interpretation.files.flatMap((file, index) => {
    const found = files.find(({ sha256 }) => sha256 === file.sha256);
    const { materialId } = file;
    if (!found || materialId === null) return [];
    const label = (letter: string) => (several ? `${index + 1}${letter}` : letter);
    return found.report.parts.map((part) => {
      const choice = interpretation.parts.find(
        (chosen) => chosen.sha256 === file.sha256 && chosen.letter === part.id,
      );
      return {
        fileSha: file.sha256,
        letter: part.id,
        label: label(part.id),
        name: choice?.name || part.name,
        quantity: part.quantity * file.sets,
        mirrorOf: part.mirrorOf === null ? null : label(part.mirrorOf),
        materialId,
        wantedLotId: file.lotId,
        grain: choice?.grain ?? "along-x",
        width: part.box.maxX - part.box.minX,
        height: part.box.maxY - part.box.minY,
        outerLength: part.outerLength,
        innerLength: part.innerLength,
        area: part.area,
        grossArea: part.grossArea,
        holes: part.holes,
      };
    });
  });
}
