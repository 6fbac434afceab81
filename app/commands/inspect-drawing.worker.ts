import { readDrawing, scaleDrawing } from "~/domain/drawing";
import { findParts } from "~/domain/parts";
import type { LengthUnit } from "~/domain/units";
import type { Thickness } from "./inspect-arguments";
import { inspectionOf } from "./inspection";

export interface InspectInput {
  readonly bytes: Uint8Array;
  /** What the coordinates are in, whatever the file declares; null to go by the file. */
  readonly unit: LengthUnit | null;
  readonly thickness: Thickness | null;
}

export type InspectOutput =
  | { readonly ok: true; readonly json: string; readonly notes: readonly string[] }
  | { readonly ok: false; readonly reason: string };

/** Reads a drawing and finds its parts; the document comes back as JSON text. */
export default function inspectDrawingTask({ bytes, unit, thickness }: InspectInput): InspectOutput {
  const read = readDrawing(bytes);
  if (!read.ok) return read;
  const used = unit ?? read.drawing.declared ?? "mm";
  const drawing = scaleDrawing(read.drawing, used);
  const report = findParts(drawing, { layers: [] });
  const json = JSON.stringify(
    inspectionOf({ drawing, report, used, told: unit !== null, thickness }),
    null,
    1,
  );
  return { ok: true, json, notes: drawing.notes };
}
