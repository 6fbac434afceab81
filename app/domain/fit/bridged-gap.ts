import type { FitRule } from "./finding";

/** Gaps that were bridged to close an outline: every one is listed, the wider ones asked. */
export const bridgedGap: FitRule = ({ report, say }) =>
  report.bridges.map(({ layer, gap, at, asked }) => ({
    code: "bridged-gap",
    severity: asked ? ("ask" as const) : ("note" as const),
    part: null,
    copy: null,
    at,
    measured: gap,
    limit: null,
    words: asked
      ? `A gap of ${say(gap)} on layer ${layer} was closed with a straight line. Is that right?`
      : `A gap of ${say(gap)} on layer ${layer} was closed with a straight line.`,
    remedy: "close-gap",
  }));
