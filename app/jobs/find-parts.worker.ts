import { gunzipSync, gzipSync } from "node:zlib";
import { canonicalJson } from "~/documents/canonical-json";
import { type Drawing, scaleDrawing } from "~/domain/drawing";
import { findParts, type LayerRule } from "~/domain/parts";
import type { LengthUnit } from "~/domain/units";

/** Of gzip: half the time of its standard for some more bytes. */
const FAST = 2;

export interface FindPartsInput {
  /** A drawing as stored by its reading: gzipped JSON, in its own coordinates. */
  readonly drawing: Uint8Array;
  /** What the coordinates are in. */
  readonly unit: LengthUnit;
  readonly layers: readonly LayerRule[];
}

/** Finds the parts in a stored drawing; the report comes back as gzipped canonical JSON, ready to be stored. */
export default function findPartsTask({ drawing, unit, layers }: FindPartsInput): Uint8Array {
  const read: Drawing = JSON.parse(gunzipSync(drawing).toString("utf8"));
  const report = findParts(scaleDrawing(read, unit), { layers });
  return gzipSync(canonicalJson(report), { level: FAST });
}
