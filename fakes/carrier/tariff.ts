/**
 * Services, limits and prices of the invented carrier "Towpath Parcel".
 *
 * Limits and the dimensional divisor follow those of private US carriers: 150 lb, 108 in long, 165 in length
 * plus girth, L x W x H / 139 with each side rounded up to whole inches and the weight up to whole pounds
 * (design notes on shipping, SHP-001 to 007). A surcharge falls on what is over 48 in, 50 lb or 130 in length plus
 * girth. Prices are invented: a base and a price per billed pound, by zone.
 */
const POUND = 0.45359237;
const INCH = 25.4;

export interface Parcel {
  weightKg: number;
  lengthMm: number;
  widthMm: number;
  heightMm: number;
}

export interface Service {
  code: "towpath-ground" | "towpath-swift";
  name: string;
  /** Cents. */
  base: number;
  /** Cents a billed pound. */
  perPound: number;
  /** Working days at zone 0, and per zone beyond. */
  days: number;
  daysPerZone: number;
}

export const SERVICES: Service[] = [
  { code: "towpath-ground", name: "Towpath Ground", base: 895, perPound: 62, days: 1, daysPerZone: 0.5 },
  { code: "towpath-swift", name: "Towpath Swift", base: 2450, perPound: 148, days: 1, daysPerZone: 0.1 },
];

const LIMITS = { pounds: 150, lengthInches: 108, girthInches: 165 };
/** Cents for each of: longest side over 48 in, weight over 50 lb, length plus girth over 130 in. */
const SURCHARGES = { long: 1850, heavy: 2600, large: 9500 };

export interface Measured {
  /** Whole inches, longest first. */
  sides: [number, number, number];
  pounds: number;
  billedPounds: number;
  girthInches: number;
}

/** Rounds a side up to whole inches and the greater of real and dimensional weight up to whole pounds. */
export function measure(parcel: Parcel): Measured {
  const [long = 0, middle = 0, short = 0] = [parcel.lengthMm, parcel.widthMm, parcel.heightMm]
    .map((side) => Math.ceil(withoutNoise(side / INCH)))
    .sort((a, b) => b - a);
  const pounds = parcel.weightKg / POUND;
  const dimensional = (long * middle * short) / 139;
  return {
    sides: [long, middle, short],
    pounds,
    billedPounds: Math.ceil(withoutNoise(Math.max(pounds, dimensional))),
    girthInches: long + 2 * (middle + short),
  };
}

/** Why the carrier does not take a parcel, or undefined. */
export function refusalOf({ sides, pounds, girthInches }: Measured): string | undefined {
  if (pounds > LIMITS.pounds) return `heavier than ${LIMITS.pounds} lb`;
  if (sides[0] > LIMITS.lengthInches) return `longer than ${LIMITS.lengthInches} in`;
  if (girthInches > LIMITS.girthInches) return `length plus girth over ${LIMITS.girthInches} in`;
  return undefined;
}

/** Zone 0 to 9 from the first digits of two five-digit postal codes. */
export function zoneBetween(fromPostal: string, toPostal: string): number {
  return Math.abs(Number(fromPostal[0]) - Number(toPostal[0]));
}

/** Price in cents and working days for a shipment. */
export function rate(service: Service, parcels: Measured[], zone: number): { amount: number; days: number } {
  const amount = parcels.reduce((sum, { sides, pounds, billedPounds, girthInches }) => {
    const surcharge =
      (sides[0] > 48 ? SURCHARGES.long : 0) +
      (pounds > 50 ? SURCHARGES.heavy : 0) +
      (girthInches > 130 ? SURCHARGES.large : 0);
    return sum + service.base + Math.round(service.perPound * billedPounds * (1 + zone / 10)) + surcharge;
  }, 0);
  return { amount, days: Math.ceil(withoutNoise(service.days + service.daysPerZone * zone)) };
}

/** Keeps a whole number whole where the division left a last-digit error. */
function withoutNoise(value: number): number {
  return Math.round(value * 1e6) / 1e6;
}
