import type { Overlap } from "../parts";
import type { FitRule } from "./finding";

/** Outlines that lie on each other for a part of their length: that stretch is cut once. One finding a layer. */
export const overlappingLines: FitRule = ({ report, say }) => {
  const byLayer = new Map<string, Overlap[]>();
  for (const overlap of report.overlaps)
    byLayer.set(overlap.layer, [...(byLayer.get(overlap.layer) ?? []), overlap]);
  return [...byLayer].map(([layer, overlaps]) => {
    const length = overlaps.reduce((sum, overlap) => sum + overlap.length, 0);
    const places = overlaps.length === 1 ? "one place" : `${overlaps.length} places`;
    return {
      code: "overlapping-lines",
      severity: "note" as const,
      part: null,
      copy: null,
      at: overlaps[0].at,
      measured: length,
      limit: null,
      words: `Outlines on layer ${layer} lie on each other in ${places}, ${say(length)} in all. It is cut and priced once.`,
      remedy: null,
    };
  });
};
