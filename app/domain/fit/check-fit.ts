import { formatLength, formatMillimetres, type ShownUnit } from "../units";
import { bridgedGap } from "./bridged-gap";
import { copiesTimesQuantity } from "./copies-times-quantity";
import { crossingOutlines } from "./crossing-outlines";
import { doubledLines } from "./doubled-lines";
import type { Finding, FitInput, FitRule, Severity } from "./finding";
import { DEFAULT_LIMITS } from "./limits";
import { nearEqualParts } from "./near-equal-parts";
import { openOutline } from "./open-outline";
import { openingNarrowerThanTool } from "./opening-narrower-than-tool";
import { overlappingLines } from "./overlapping-lines";
import { partHeldByTabs } from "./part-held-by-tabs";
import { partLargerThanSheet } from "./part-larger-than-sheet";
import { partTooSmallToHold } from "./part-too-small-to-hold";
import { pocketDeeperThanStock } from "./pocket-deeper-than-stock";
import { pocketDepthUnknown } from "./pocket-depth-unknown";
import { possibleFrame } from "./possible-frame";
import { thinFloor } from "./thin-floor";
import { unitImplausible } from "./unit-implausible";

/** All rules by the code of what they find. */
export const FIT_RULES: Readonly<Record<string, FitRule>> = {
  "open-outline": openOutline,
  "crossing-outlines": crossingOutlines,
  "unit-implausible": unitImplausible,
  "possible-frame": possibleFrame,
  "part-larger-than-sheet": partLargerThanSheet,
  "opening-narrower-than-tool": openingNarrowerThanTool,
  "pocket-deeper-than-stock": pocketDeeperThanStock,
  "thin-floor": thinFloor,
  "pocket-depth-unknown": pocketDepthUnknown,
  "part-too-small-to-hold": partTooSmallToHold,
  "part-held-by-tabs": partHeldByTabs,
  "bridged-gap": bridgedGap,
  "doubled-lines": doubledLines,
  "copies-times-quantity": copiesTimesQuantity,
  "near-equal-parts": nearEqualParts,
  "overlapping-lines": overlappingLines,
};

const ORDER: Readonly<Record<Severity, number>> = { stop: 0, ask: 1, note: 2 };

/** Small lengths to a hundredth of a millimetre: gaps and floors are measured so. */
const inWords = (length: number, shown: ShownUnit): string =>
  shown === "mm" && length < 10 ? `${formatMillimetres(length, 2)}\u2009mm` : formatLength(length, shown);

/** What would go wrong on the router with these parts in this stock: what stops first, then what is asked, then notes. */
export function checkFit({ limits, shown = "mm", ...input }: FitInput): Finding[] {
  const fit = {
    ...input,
    limits: { ...DEFAULT_LIMITS, ...limits },
    say: (length: number) => inWords(length, shown),
  };
  const found = Object.values(FIT_RULES).flatMap((rule) => rule(fit));
  return found.sort((one, other) => ORDER[one.severity] - ORDER[other.severity]);
}
