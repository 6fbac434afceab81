/** What would go wrong on the router or at assembly, each with its place, its measure and its limit. */
export { checkFit, FIT_RULES } from "./check-fit";
export type { Finding, FitInput, FitStock, Severity } from "./finding";
export { DEFAULT_LIMITS, type FitLimits } from "./limits";
export {
  beyondStandard,
  isPlywood,
  measureStack,
  plywoodLimits,
  READING_POINTS,
  type StackThickness,
  type ThicknessLimits,
  type ThicknessReading,
  thicknessOf,
  WITHIN_SHEET,
} from "./sheet-thickness";
