import { INCH_IN_MM, KG_PER_LB } from "~/domain/units";

export type CarrierKind = "private" | "postal";

/** What a carrier takes as one parcel. Millimetres and kilograms; the divisor in cubic inches to the pound. */
export interface ParcelLimits {
  readonly maxKilograms: number;
  readonly maxLength: number;
  readonly maxLengthPlusGirth: number;
  readonly dimensionalDivisor: number;
  /** Parcels up to this many cubic inches are billed by their weight alone. */
  readonly dimensionalOverCubicInches: number;
}

interface DatedLimits {
  readonly carrier: CarrierKind;
  /** In force from this day on. */
  readonly from: string;
  readonly pounds: number;
  readonly lengthInches: number;
  readonly lengthPlusGirthInches: number;
  readonly dimensionalDivisor: number;
  readonly dimensionalOverCubicInches: number;
}

/**
 * US parcel limits as the carriers' public rules say, restated in trade summaries; to be read again every year.
 * Since 18 August 2025 every side is rounded up to a whole inch before the dimensional weight.
 */
const DATED_LIMITS: readonly DatedLimits[] = [
  {
    carrier: "private",
    from: "2025-08-18",
    pounds: 150,
    lengthInches: 108,
    lengthPlusGirthInches: 165,
    dimensionalDivisor: 139,
    dimensionalOverCubicInches: 0,
  },
  {
    carrier: "postal",
    from: "2025-08-18",
    pounds: 70,
    lengthInches: 130,
    lengthPlusGirthInches: 130,
    dimensionalDivisor: 166,
    dimensionalOverCubicInches: 1728,
  },
];

/** The limits in force on a day (`YYYY-MM-DD`); null before the first that are known. */
export function parcelLimits(carrier: CarrierKind, day: string): ParcelLimits | null {
  const inForce = DATED_LIMITS.filter((entry) => entry.carrier === carrier && entry.from <= day).toSorted(
    (one, other) => other.from.localeCompare(one.from),
  )[0];
  return inForce
    ? {
        maxKilograms: inForce.pounds * KG_PER_LB,
        maxLength: inForce.lengthInches * INCH_IN_MM,
        maxLengthPlusGirth: inForce.lengthPlusGirthInches * INCH_IN_MM,
        dimensionalDivisor: inForce.dimensionalDivisor,
        dimensionalOverCubicInches: inForce.dimensionalOverCubicInches,
      }
    : null;
}
