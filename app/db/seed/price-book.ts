import type { PriceBook } from "~/domain/pricing";

/** The first version of the invented shop's prices, within what US job shops ask (common practice, no source). */
export const DEMO_PRICE_BOOK: PriceBook = {
  currency: "usd",
  materialMarkUp: 0.25,
  machineHour: 12_000,
  benchHour: 5_400,
  setUp: 3_500,
  setUpPerFurtherStock: 1_500,
  cutSpeeds: [
    { upToThickness: 6.9, speed: 7000, passes: 1 },
    { upToThickness: 12.7, speed: 6000, passes: 1 },
    { upToThickness: 19.1, speed: 5000, passes: 2 },
    { upToThickness: 25.4, speed: 4500, passes: 3 },
  ],
  secondsPerHole: 2.5,
  minutesPerSheet: 6,
  toolChangeMinutes: 0.5,
  tabSpacing: 350,
  secondsPerTab: 18,
  sanding: { none: 0, arrises: 12, "grit-150": 45 },
  packing: { perOrder: 900, perPiece: 45 },
  freight: {
    perParcel: 1_450,
    perKilogram: 65,
    maxParcelKilograms: 30,
    perPallet: 14_500,
    palletPerKilogram: 22,
    maxPalletKilograms: 900,
  },
  minimumOrder: 7_500,
};
