import type { OpenChain } from "../parts";
import type { Finding, FitCase, FitRule } from "./finding";

/** The ends of an outline left open are at most this share of its length apart. */
const NEARLY_CLOSED_SHARE = 0.05;

/**
 * Lines that close no outline. One that nearly closes stops, since its part cannot be cut; others may be meant
 * for engraving or for nothing and are asked, many on a layer at once.
 */
export const openOutline: FitRule = (fit) => {
  const { nearlyClosedGap, mostOpenListed } = fit.limits;
  const isNear = ({ gap, length, curves }: OpenChain) =>
    curves.length > 1 && gap > 0 && gap <= nearlyClosedGap && gap <= NEARLY_CLOSED_SHARE * length;
  const loose = new Map<string, OpenChain[]>();
  for (const chain of fit.report.open) {
    if (!isNear(chain)) loose.set(chain.layer, [...(loose.get(chain.layer) ?? []), chain]);
  }
  return [
    ...fit.report.open.filter(isNear).map((chain) => nearlyClosed(chain, fit)),
    ...[...loose].flatMap(([layer, chains]) =>
      chains.length > mostOpenListed
        ? [manyOpen(layer, chains, fit)]
        : chains.map((chain) => openLine(chain, fit)),
    ),
  ];
};

const nearlyClosed = ({ layer, gap, at }: OpenChain, { say, limits }: FitCase): Finding => ({
  code: "open-outline",
  severity: "stop",
  part: null,
  copy: null,
  at,
  measured: gap,
  limit: limits.nearlyClosedGap,
  words: `An outline on layer ${layer} is open by ${say(gap)}. Close it, or it cannot be cut.`,
  remedy: "close-gap",
});

const openLine = ({ layer, length, gap, at }: OpenChain, { say }: FitCase): Finding => ({
  code: "open-outline",
  severity: "ask",
  part: null,
  copy: null,
  at,
  measured: length,
  limit: null,
  words:
    gap > 0
      ? `A line of ${say(length)} on layer ${layer} closes no outline. It is not cut unless you say what it is.`
      : `A line of ${say(length)} on layer ${layer} stands in no part. It is not cut unless you say what it is.`,
  remedy: null,
});

const manyOpen = (layer: string, chains: readonly OpenChain[], { say }: FitCase): Finding => {
  const length = chains.reduce((sum, chain) => sum + chain.length, 0);
  return {
    code: "open-outline",
    severity: "ask",
    part: null,
    copy: null,
    at: chains[0].at,
    measured: length,
    limit: null,
    words: `${chains.length} lines on layer ${layer}, ${say(length)} together, close no outline. They are not cut unless you say what they are.`,
    remedy: null,
  };
};
