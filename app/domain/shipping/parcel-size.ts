import { INCH_IN_MM, kilogramsToPounds } from "~/domain/units";
import type { ParcelLimits } from "./parcel-limits";

/** Outside sizes in any order. Millimetres. */
export interface ParcelSize {
  readonly length: number;
  readonly width: number;
  readonly height: number;
}

/** Rounding in conversions must not start the next whole inch or pound. */
const SLACK = 1e-6;

const sides = ({ length, width, height }: ParcelSize): readonly number[] => [length, width, height];

export const longestSide = (size: ParcelSize): number => Math.max(...sides(size));

/** Longest side and twice each of the others, in the unit of the sides. */
export function lengthPlusGirth(size: ParcelSize): number {
  const sum = sides(size).reduce((total, side) => total + side, 0);
  return 2 * sum - longestSide(size);
}

/** Whole pounds that a parcel's volume stands for, each side rounded up to a whole inch; zero where volume is not billed. */
export function dimensionalPounds(
  size: ParcelSize,
  limits: Pick<ParcelLimits, "dimensionalDivisor" | "dimensionalOverCubicInches">,
): number {
  const cubicInches = sides(size).reduce((volume, side) => volume * Math.ceil(side / INCH_IN_MM - SLACK), 1);
  return cubicInches > limits.dimensionalOverCubicInches
    ? Math.ceil(cubicInches / limits.dimensionalDivisor - SLACK)
    : 0;
}

/** What the carrier bills: the larger of the weight and the dimensional weight, in whole pounds. */
export const billedPounds = (
  size: ParcelSize,
  kilograms: number,
  limits: Pick<ParcelLimits, "dimensionalDivisor" | "dimensionalOverCubicInches">,
): number => Math.max(Math.ceil(kilogramsToPounds(kilograms) - SLACK), dimensionalPounds(size, limits));
