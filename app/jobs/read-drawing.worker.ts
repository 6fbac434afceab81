import { gzipSync } from "node:zlib";
import { type Drawing, readDrawing } from "~/domain/drawing";
import type { ReadingSummary } from "~/models/readings.server";

/** Of gzip: half the time of its standard for some more bytes. */
const FAST = 2;

export interface ReadDrawingInput {
  readonly bytes: Uint8Array;
}

export type ReadDrawingOutput =
  | { readonly ok: true; readonly summary: ReadingSummary; readonly drawing: Uint8Array }
  | { readonly ok: false; readonly reason: string };

/** Reads DXF bytes; the drawing comes back as gzipped JSON, ready to be stored. */
export default function readDrawingTask({ bytes }: ReadDrawingInput): ReadDrawingOutput {
  const read = readDrawing(bytes);
  if (!read.ok) return read;
  return {
    ok: true,
    summary: summaryOf(read.drawing),
    drawing: gzipSync(JSON.stringify(read.drawing), { level: FAST }),
  };
}

function summaryOf({ declared, layers, entities, ignored, notes }: Drawing): ReadingSummary {
  return { declared, layers, entities, ignored, notes };
}
