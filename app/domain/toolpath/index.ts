/** What cutting takes: feeds, moves under acceleration, tabs, minutes. */
export {
  type CutEstimate,
  type CutEstimateResult,
  type CutPart,
  type CutRates,
  type CutSpeed,
  cutSpeedFor,
  estimateMinutes,
} from "./estimate";
export { chipLoad, feedRate } from "./feed";
export { distanceToReachFeed, moveTime, peakSpeed, type RestToRest } from "./moves";
export { FEWEST_TABS, tabCount } from "./tabs";
