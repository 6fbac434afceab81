import type { FitRule } from "./finding";

/** Outlines that cross themselves or each other: what is inside and what is outside is then anybody's guess. */
export const crossingOutlines: FitRule = ({ report }) =>
  report.crossings.map(({ layer, at, itself }) => ({
    code: "crossing-outlines",
    severity: "ask" as const,
    part: null,
    copy: null,
    at,
    measured: null,
    limit: null,
    words: itself
      ? `An outline on layer ${layer} crosses itself. Is it to be cut as drawn?`
      : `Two outlines cross, one on layer ${layer}. Are both to be cut as drawn?`,
    remedy: null,
  }));
