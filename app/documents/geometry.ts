import type { LayerRule, PartsReport } from "~/domain/parts";
import type { LengthUnit } from "~/domain/units";

/** The parts found in one file, and what was taken to find them. */
export interface FileGeometry {
  readonly sha256: string;
  readonly unit: LengthUnit;
  /** False while the unit is what the file declares, or millimetres for want of it, and nobody has confirmed it. */
  readonly confirmed: boolean;
  readonly layers: readonly LayerRule[];
  readonly report: PartsReport;
}

/** Everything found in an order's files: what the drawing viewer loads, kept under the hash of its canonical JSON. */
export interface GeometryDocument {
  readonly files: readonly FileGeometry[];
}
