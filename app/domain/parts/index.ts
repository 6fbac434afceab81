/** Parts out of a drawing in millimetres: joining, containment, set-asides, operations, equal parts counted together. */
export { type FindPartsRules, findParts } from "./find-parts";
export { guessLayerRules } from "./layer-names";
export { DRILL_SIZES } from "./operations";
export type {
  Bridge,
  Copy,
  Crossing,
  Depth,
  Feature,
  LayerRule,
  NearEqual,
  OpenChain,
  OperationKind,
  Overlap,
  Part,
  PartsReport,
  SetAside,
} from "./part";
export {
  type ChangedPart,
  compareRevisions,
  keepLetters,
  type PairedPart,
  type RevisionComparison,
} from "./revisions";
export type { ShapeDifference } from "./shape-difference";
export type { Restored } from "./sort-out";
export { PLAUSIBLE_LENGTH, type UnitQuestion, type UnitReading, unitQuestion } from "./unit-question";
