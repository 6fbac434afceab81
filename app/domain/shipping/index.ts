/** Weights, parcels and what carriers take. */
export { type BoxStock, type FormaldehydeLine, formaldehydeLine } from "./formaldehyde";
export { type Addressed, addressFromLines, isPostOfficeBox, labelAddress } from "./label-address";
export { type CarrierKind, type ParcelLimits, parcelLimits } from "./parcel-limits";
export { type ParcelNotes, parcelNotes, TEAM_LIFT_POUNDS } from "./parcel-notes";
export {
  billedPounds,
  dimensionalPounds,
  lengthPlusGirth,
  longestSide,
  type ParcelSize,
} from "./parcel-size";
export { flatPiecesOf, plannedParcels } from "./planned-parcels";
export { gs1CheckDigit, type SsccParts, sscc } from "./sscc";
export {
  bySize,
  type FlatPiece,
  type PackingAllowance,
  SLEEVE,
  type SuggestedParcel,
  stackPieces,
  suggestParcels,
} from "./suggest-parcels";
