import { INCH_IN_MM, kilogramsToPounds } from "~/domain/units";
import type { ParcelLimits } from "./parcel-limits";
import { billedPounds, lengthPlusGirth, longestSide, type ParcelSize } from "./parcel-size";

/** Above this a parcel takes two people (carriers' surcharge and lifting threshold of 50 lb; common practice, no source). */
export const TEAM_LIFT_POUNDS = 50;

export interface ParcelNotes {
  readonly pounds: number;
  readonly billedPounds: number;
  readonly teamLift: boolean;
  /** Which limits it is beyond, in words; empty when it may go as a parcel. */
  readonly beyond: readonly string[];
  /** The sizes the limits are about. Millimetres. */
  readonly longest: number;
  readonly lengthPlusGirth: number;
}

const SLACK = 1e-6;
const inches = (length: number): string => `${(length / INCH_IN_MM).toFixed(0)} in`;

/** What to know of a closed parcel before a label is bought. */
export function parcelNotes(size: ParcelSize, kilograms: number, limits: ParcelLimits): ParcelNotes {
  const pounds = kilogramsToPounds(kilograms);
  const longest = longestSide(size);
  const girth = lengthPlusGirth(size);
  return {
    pounds,
    billedPounds: billedPounds(size, kilograms, limits),
    teamLift: pounds > TEAM_LIFT_POUNDS,
    beyond: [
      ...(kilograms > limits.maxKilograms + SLACK
        ? [`heavier than ${kilogramsToPounds(limits.maxKilograms).toFixed(0)} lb`]
        : []),
      ...(longest > limits.maxLength + SLACK ? [`longer than ${inches(limits.maxLength)}`] : []),
      ...(girth > limits.maxLengthPlusGirth + SLACK
        ? [`length plus girth over ${inches(limits.maxLengthPlusGirth)}`]
        : []),
    ],
    longest,
    lengthPlusGirth: girth,
  };
}
