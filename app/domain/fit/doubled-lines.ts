import { startOf } from "../geometry";
import type { FitRule } from "./finding";

/** Curves drawn twice on the same spot: each is cut once, which the builder should know. */
export const doubledLines: FitRule = ({ report }) =>
  report.setAside
    .filter(({ what }) => what === "duplicate")
    .map(({ layer, count, paths }) => ({
      code: "doubled-lines",
      severity: "note" as const,
      part: null,
      copy: null,
      at: paths.length > 0 ? startOf(paths[0].curves[0]) : null,
      measured: count,
      limit: null,
      words: `${count === 1 ? "One line" : `${count} lines`} on layer ${layer} ${count === 1 ? "is" : "are"} drawn twice. Each is cut once.`,
      remedy: "drop-doubled",
    }));
