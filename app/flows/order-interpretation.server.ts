import type { Executor } from "~/db/client.server";
import type { Drawing } from "~/domain/drawing";
import { type Interpretation, interpretFiles, type LayerChoice } from "~/domain/orders";
import { guessLayerRules } from "~/domain/parts";
import { listDrawings, type OrderDrawing } from "~/models/drawing-files.server";
import { findNewestInterpretation, recallLayers } from "~/models/interpretations.server";
import { findReadings, type Reading, type ReadingSummary } from "~/models/readings.server";
import { READER_VERSION } from "./read-drawing.server";

export interface InterpretedDrawing {
  readonly drawing: OrderDrawing;
  readonly reading: Reading | undefined;
}

export interface OrderInterpretation {
  /** The number that a change must name as the one it was made from; 0 while nothing is saved. */
  readonly number: number;
  /** Id of the saved row, null while nothing is saved. */
  readonly id: string | null;
  /** What is saved, with defaults for whatever is not. */
  readonly content: Interpretation;
  readonly drawings: readonly InterpretedDrawing[];
}

/**
 * What an order's drawings mean now: the builder's choices, and for layers they said nothing of, what they settled
 * for layers of that name before, or else what the name suggests.
 */
export async function orderInterpretation(
  executor: Executor,
  order: { id: string; builderId: string },
): Promise<OrderInterpretation> {
  const drawings = await listDrawings(executor, order.id);
  const readings = await findReadings(
    executor,
    drawings.map(({ fileSha }) => fileSha),
    READER_VERSION,
  );
  const saved = await findNewestInterpretation(executor, order.id);
  const names = [...readings.values()].flatMap(
    ({ summary }) => summary?.layers.map(({ name }) => name) ?? [],
  );
  const recalled = await recallLayers(executor, order.builderId, names);
  const files = drawings.map(({ fileSha }) => ({
    sha256: fileSha,
    supposed: supposedLayers(readings.get(fileSha)?.summary ?? null, recalled),
  }));
  return {
    number: saved?.number ?? 0,
    id: saved?.id ?? null,
    content: interpretFiles(files, saved?.content),
    drawings: drawings.map((drawing) => ({ drawing, reading: readings.get(drawing.fileSha) })),
  };
}

/** What the names of a file's layers suggest. */
export function guessedLayers(summary: ReadingSummary | null): LayerChoice[] {
  if (!summary) return [];
  const outline: Drawing = {
    ...summary,
    unit: "drawing",
    paths: [],
    texts: [],
    ignored: [],
  };
  return guessLayerRules(outline);
}

function supposedLayers(summary: ReadingSummary | null, recalled: readonly LayerChoice[]): LayerChoice[] {
  const here = new Set(summary?.layers.map(({ name }) => name));
  return [...guessedLayers(summary), ...recalled.filter(({ layer }) => here.has(layer))];
}
