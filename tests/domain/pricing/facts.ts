import fc from "fast-check";
import type { PriceBook, PricedPart, PricedStock, QuoteFacts } from "~/domain/pricing";

/** Round figures within the ranges usual in US job shops (common practice, no source), so that amounts can be worked out by hand. */
export const book: PriceBook = {
  currency: "usd",
  materialMarkUp: 0.25,
  machineHour: 12000,
  benchHour: 6000,
  setUp: 4500,
  setUpPerFurtherStock: 1500,
  cutSpeeds: [
    { upToThickness: 9.5, speed: 6000, passes: 1 },
    { upToThickness: 25, speed: 5000, passes: 2 },
  ],
  secondsPerHole: 3,
  minutesPerSheet: 6,
  toolChangeMinutes: 1,
  tabSpacing: 400,
  secondsPerTab: 20,
  sanding: { none: 0, arrises: 10, "grit-150": 40 },
  packing: { perOrder: 800, perPiece: 50 },
  freight: {
    perParcel: 1400,
    perKilogram: 60,
    maxParcelKilograms: 30,
    perPallet: 14000,
    palletPerKilogram: 20,
    maxPalletKilograms: 900,
  },
  minimumOrder: 9000,
};

/** A 600 × 400 panel with two 100 mm round openings, circumference 314.16 each. */
export const panel: PricedPart = {
  label: "A",
  quantity: 4,
  cutLength: 2628.32,
  outerLength: 2000,
  holes: 2,
  area: 224292,
  grossArea: 240000,
  box: { width: 600, height: 400 },
};

export const birch: PricedStock = {
  materialId: "birch-18",
  materialName: "18 mm birch",
  lotId: "lot-7",
  lotCode: "BB-18/7",
  nominalThickness: 18,
  thickness: { min: 17.82, mean: 17.9, max: 18.04 },
  density: 685,
  sheet: { length: 2440, width: 1220 },
  sheetPrice: 8000,
  parts: [panel],
};

export const facts: QuoteFacts = {
  stocks: [birch],
  sanding: "arrises",
  leaveTabs: false,
  delivery: "ship",
  shipToRegion: "WA",
  parcels: [{ kilograms: 12, oversize: false }],
  taxExempt: false,
  tax: { rate: 0.085, freightTaxable: true, region: "WA" },
  plannedYield: 0.75,
  spacing: 10,
};

const size = fc.integer({ min: 20, max: 1200 });
const partOf = (label: string): fc.Arbitrary<PricedPart> =>
  fc
    .record({
      width: size,
      height: size,
      quantity: fc.integer({ min: 1, max: 40 }),
      holes: fc.integer({ min: 0, max: 30 }),
    })
    .map(({ width, height, quantity, holes }) => ({
      label,
      quantity,
      holes,
      outerLength: 2 * (width + height),
      cutLength: 2 * (width + height) + holes * 15.7,
      area: width * height * 0.9,
      grossArea: width * height,
      box: { width, height },
    }));

const stockOf = (materialId: string): fc.Arbitrary<PricedStock> =>
  fc
    .record({
      parts: fc
        .integer({ min: 1, max: 4 })
        .chain((count) => fc.tuple(...Array.from({ length: count }, (_, i) => partOf(`${"ABCD"[i]}`)))),
      sheetPrice: fc.integer({ min: 0, max: 30000 }),
      nominalThickness: fc.constantFrom(6.5, 9, 12, 18),
    })
    .map(({ parts, sheetPrice, nominalThickness }) => ({
      ...birch,
      materialId,
      materialName: materialId,
      nominalThickness,
      sheetPrice,
      parts,
    }));

export const someFacts: fc.Arbitrary<QuoteFacts> = fc.record({
  stocks: fc
    .integer({ min: 1, max: 3 })
    .chain((count) => fc.tuple(...Array.from({ length: count }, (_, i) => stockOf(`stock-${i}`)))),
  sanding: fc.constantFrom("none", "arrises", "grit-150"),
  leaveTabs: fc.boolean(),
  delivery: fc.constantFrom("ship", "pick-up"),
  shipToRegion: fc.constant("WA"),
  parcels: fc.array(
    fc.record({ kilograms: fc.double({ min: 0.1, max: 120, noNaN: true }), oversize: fc.boolean() }),
    {
      minLength: 1,
      maxLength: 6,
    },
  ),
  taxExempt: fc.boolean(),
  tax: fc.record({
    rate: fc.integer({ min: 0, max: 2000 }).map((basisPoints) => basisPoints / 10000),
    freightTaxable: fc.boolean(),
    region: fc.constant("WA"),
  }),
  plannedYield: fc.double({ min: 0.3, max: 0.95, noNaN: true }),
  spacing: fc.double({ min: 1, max: 20, noNaN: true }),
});
