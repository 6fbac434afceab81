/**
 * Reads one drawing in a process of its own, so that its peak of memory is its own: the reader's name, the file and
 * how many times; the best time is told. Run by the topic `reading`.
 */
import { readFileSync } from "node:fs";
import DxfParser from "dxf-parser";
import { readDrawing, scaleDrawing } from "~/domain/drawing";
import { findParts } from "~/domain/parts";

export interface ReadingMeasure {
  readonly seconds: number;
  readonly peakMegabytes: number;
}

const READERS: Readonly<Record<string, (bytes: Uint8Array) => void>> = {
  parts(bytes) {
    const read = readDrawing(bytes);
    if (!read.ok) throw new Error(read.reason);
    const { parts } = findParts(scaleDrawing(read.drawing, "mm"), { layers: [] });
    if (parts.length === 0) throw new Error("No parts were found.");
  },
  drawing(bytes) {
    const read = readDrawing(bytes);
    if (!read.ok) throw new Error(read.reason);
  },
  "dxf-parser"(bytes) {
    const parsed = new DxfParser().parseSync(new TextDecoder().decode(bytes));
    if (!parsed || parsed.entities.length === 0) throw new Error("dxf-parser read nothing.");
  },
};

const [reader, file, times] = process.argv.slice(2);
const bytes = new Uint8Array(readFileSync(file));
let seconds = Infinity;
for (let i = 0; i < Number(times); i++) {
  const began = performance.now();
  READERS[reader](bytes);
  seconds = Math.min(seconds, (performance.now() - began) / 1000);
}
const measure: ReadingMeasure = { seconds, peakMegabytes: process.resourceUsage().maxRSS / 1024 };
process.stdout.write(JSON.stringify(measure));
