import { featurePlace } from "./feature-place";
import type { FitRule } from "./finding";

/** Pockets drawn without a depth: the layer's name gives none, or it is the wide part of a countersunk hole. */
export const pocketDepthUnknown: FitRule = ({ report }) =>
  report.parts.flatMap((part) => {
    const unknown = part.features.filter(({ kind, depth }) => kind === "pocket" && depth === null);
    if (unknown.length === 0) return [];
    const count = unknown.length === 1 ? "A pocket" : `${unknown.length} pockets`;
    return [
      {
        code: "pocket-depth-unknown",
        severity: "ask" as const,
        part: part.id,
        copy: null,
        at: featurePlace(unknown[0]),
        measured: null,
        limit: null,
        words: `${count} in part ${part.name} ${unknown.length === 1 ? "has" : "have"} no depth. Say how deep, or how much to leave.`,
        remedy: null,
      },
    ];
  });
