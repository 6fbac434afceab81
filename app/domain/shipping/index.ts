/** Weights, parcels and what carriers take. */
export { type CarrierKind, type ParcelLimits, parcelLimits } from "./parcel-limits";
export {
  billedPounds,
  dimensionalPounds,
  lengthPlusGirth,
  longestSide,
  type ParcelSize,
} from "./parcel-size";
export { flatPiecesOf, plannedParcels } from "./planned-parcels";
export {
  type FlatPiece,
  type PackingAllowance,
  SLEEVE,
  type SuggestedParcel,
  suggestParcels,
} from "./suggest-parcels";
