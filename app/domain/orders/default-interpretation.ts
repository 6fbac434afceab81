import type { FileInterpretation, Interpretation } from "./interpretation";

export type LayerChoice = FileInterpretation["layers"][number];

/** A file of an order, with what may be supposed of its layers before the builder says so. */
export interface InterpretedFile {
  readonly sha256: string;
  /** Later ones count over earlier ones of the same layer. */
  readonly supposed: readonly LayerChoice[];
}

/**
 * The interpretation of an order's files: what the builder chose, defaults for what they have not chosen yet, and
 * nothing of files that are gone. A file's unit stays null until it is confirmed, its stock null until chosen.
 */
export function interpretFiles(
  files: readonly InterpretedFile[],
  chosen: Interpretation | undefined,
): Interpretation {
  const here = new Set(files.map(({ sha256 }) => sha256));
  return {
    files: files.map(({ sha256, supposed }) => {
      const file = chosen?.files.find((candidate) => candidate.sha256 === sha256);
      return {
        sha256,
        unit: file?.unit ?? null,
        layers: latestByLayer([...supposed, ...(file?.layers ?? [])]),
        materialId: file?.materialId ?? null,
        lotId: file?.lotId ?? null,
        sets: file?.sets ?? 1,
      };
    }),
    parts: chosen?.parts.filter(({ sha256 }) => here.has(sha256)) ?? [],
    sanding: chosen?.sanding ?? "none",
    leaveTabs: chosen?.leaveTabs ?? false,
  };
}

function latestByLayer(choices: readonly LayerChoice[]): LayerChoice[] {
  return [...new Map(choices.map((choice) => [choice.layer, choice])).values()];
}
