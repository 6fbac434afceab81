/** Boxes of parts on sheets. */
export { checkNest, type NestCheck } from "./check-nest";
export type { Nest, NestedSheet, NestItem, NestRequest, Placement, SheetSize } from "./nest";
export { nestOnSheets } from "./nest-on-sheets";
export { frameOfPlacement, type PlacedFrame } from "./placed-frame";
