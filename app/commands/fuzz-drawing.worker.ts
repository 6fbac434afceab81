import { readDrawing, scaleDrawing } from "~/domain/drawing";
import { findParts, type PartsReport } from "~/domain/parts";
import { damagedDrawing } from "./drawings/damage";

export interface FuzzOutput {
  readonly damage: string;
  /** `unsound`: measures that are not finite numbers. */
  readonly outcome: "read" | "refused" | "unsound";
}

/** Makes the damaged drawing of a seed, reads it and finds its parts. */
export default function fuzzDrawingTask(seed: number): FuzzOutput {
  const { damage, bytes } = damagedDrawing(seed);
  const read = readDrawing(bytes);
  if (!read.ok) return { damage, outcome: read.reason === "" ? "unsound" : "refused" };
  const report = findParts(scaleDrawing(read.drawing, read.drawing.declared ?? "mm"), { layers: [] });
  return { damage, outcome: isSound(report) ? "read" : "unsound" };
}

const isSound = ({ drawn, totals, parts }: PartsReport): boolean =>
  [
    ...[drawn.length, drawn.uniqueLength, drawn.hiddenLength, totals.area, totals.cutLength],
    ...parts.flatMap(({ outerLength, innerLength, area }) => [outerLength, innerLength, area]),
  ].every(Number.isFinite);
