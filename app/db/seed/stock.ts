/**
 * Eight points of a sheet, 50 mm in from its edges (EN 324-1), and how far each commonly lies from the sheet's
 * middle thickness: thinner at the corners, where sanding takes more (common practice, no source). Millimetres.
 */
const POINTS = [
  ["corner 1", -0.08],
  ["long edge 1", 0.02],
  ["corner 2", -0.05],
  ["short edge 1", 0.04],
  ["corner 3", -0.06],
  ["long edge 2", 0.05],
  ["corner 4", -0.03],
  ["short edge 2", 0.09],
] as const;

export interface LotReading {
  /** Counted from the top of the stack. */
  readonly sheet: number;
  readonly position: string;
  readonly thickness: number;
}

export interface DemoLot {
  readonly code: string;
  readonly supplierLot: string;
  readonly supplierDocument: string | null;
  readonly sheetsOnHand: number;
  readonly measuredDaysAgo: number;
  readonly readings: readonly LotReading[];
}

const hundredths = (thickness: number): number => Math.round(thickness * 100) / 100;

/** Readings of the top, a middle and the bottom sheet of a stack from their middle thicknesses. */
const stackReadings = (
  sheets: number,
  middles: readonly [number, number, number],
  spread = 1,
): LotReading[] =>
  [1, Math.ceil(sheets / 2), sheets].flatMap((sheet, i) =>
    POINTS.map(([position, off]) => ({ sheet, position, thickness: hundredths(middles[i] + off * spread) })),
  );

const METRIC = { sheetLength: 2440, sheetWidth: 1220 } as const;
const IMPERIAL = { sheetLength: 2438.4, sheetWidth: 1219.2 } as const;

/**
 * Eight materials. Birch densities are a European all-birch data sheet's; poplar, MDF and HDPE are usual values
 * (common practice, no source; MDF and HDPE from memory). Prices in cents a sheet, invented.
 */
export const DEMO_MATERIALS = [
  {
    code: "BB-6.5",
    name: "6.5 mm birch",
    kind: "birch-plywood",
    nominalThickness: 6.5,
    sheetLength: 1525,
    sheetWidth: 1525,
    hasGrain: true,
    density: 670,
    sheetPrice: 3_480,
    lots: [
      {
        code: "BB-6.5/3",
        supplierLot: "K-2261",
        supplierDocument: "Binder 3, sheet 12",
        sheetsOnHand: 34,
        measuredDaysAgo: 19,
        readings: stackReadings(34, [6.42, 6.38, 6.45], 0.7),
      },
    ],
  },
  {
    code: "BB-9",
    name: "9 mm birch",
    kind: "birch-plywood",
    nominalThickness: 9,
    ...METRIC,
    hasGrain: true,
    density: 710,
    sheetPrice: 4_960,
    lots: [
      {
        code: "BB-9/5",
        supplierLot: "K-2307",
        supplierDocument: "Binder 3, sheet 15",
        sheetsOnHand: 41,
        measuredDaysAgo: 8,
        readings: stackReadings(41, [9.12, 9.05, 9.09], 0.8),
      },
      {
        code: "BB-9/4",
        supplierLot: "K-2198",
        supplierDocument: "Binder 3, sheet 7",
        sheetsOnHand: 6,
        measuredDaysAgo: 63,
        readings: stackReadings(6, [8.94, 8.97, 8.91], 0.8),
      },
    ],
  },
  {
    code: "BB-12",
    name: "12 mm birch",
    kind: "birch-plywood",
    nominalThickness: 12,
    ...METRIC,
    hasGrain: true,
    density: 695,
    sheetPrice: 6_150,
    lots: [
      {
        code: "BB-12/6",
        supplierLot: "K-2290",
        supplierDocument: "Binder 3, sheet 14",
        sheetsOnHand: 38,
        measuredDaysAgo: 15,
        readings: stackReadings(38, [11.86, 11.93, 11.81]),
      },
    ],
  },
  {
    code: "BB-18",
    name: "18 mm birch",
    kind: "birch-plywood",
    nominalThickness: 18,
    ...METRIC,
    hasGrain: true,
    density: 685,
    sheetPrice: 7_360,
    lots: [
      {
        code: "BB-18/7",
        supplierLot: "K-2315",
        supplierDocument: "Binder 3, sheet 16",
        sheetsOnHand: 62,
        measuredDaysAgo: 5,
        readings: stackReadings(62, [17.95, 17.9, 17.92]),
      },
      {
        code: "BB-18/6",
        supplierLot: "K-2244",
        supplierDocument: "Binder 3, sheet 10",
        sheetsOnHand: 11,
        measuredDaysAgo: 41,
        readings: stackReadings(11, [17.62, 17.55, 17.58]),
      },
    ],
  },
  {
    code: "POP-12",
    name: "12 mm mixed poplar, for trials",
    kind: "hardwood-plywood",
    nominalThickness: 12,
    ...IMPERIAL,
    hasGrain: true,
    density: 520,
    sheetPrice: 2_650,
    lots: [
      {
        code: "POP-12/2",
        supplierLot: "M-0871",
        supplierDocument: "Binder 4, sheet 3",
        sheetsOnHand: 27,
        measuredDaysAgo: 26,
        readings: stackReadings(27, [11.7, 11.58, 11.66], 1.8),
      },
    ],
  },
  {
    code: "MDF-6",
    name: "6 mm MDF",
    kind: "mdf",
    nominalThickness: 6,
    ...METRIC,
    hasGrain: false,
    density: 780,
    sheetPrice: 2_180,
    lots: [
      {
        code: "MDF-6/2",
        supplierLot: "D-5512",
        supplierDocument: "Binder 5, sheet 2",
        sheetsOnHand: 30,
        measuredDaysAgo: 33,
        readings: stackReadings(30, [6.02, 6.03, 6.01], 0.3),
      },
    ],
  },
  {
    code: "MDF-18",
    name: "18 mm MDF",
    kind: "mdf",
    nominalThickness: 18,
    ...METRIC,
    hasGrain: false,
    density: 750,
    sheetPrice: 4_240,
    lots: [
      {
        code: "MDF-18/4",
        supplierLot: "D-5603",
        supplierDocument: "Binder 5, sheet 4",
        sheetsOnHand: 24,
        measuredDaysAgo: 12,
        readings: stackReadings(24, [18.04, 18.06, 18.05], 0.4),
      },
    ],
  },
  {
    code: "HD-19",
    name: "19 mm HDPE",
    kind: "hdpe",
    nominalThickness: 19.05,
    ...IMPERIAL,
    hasGrain: false,
    density: 955,
    sheetPrice: 21_900,
    lots: [
      {
        code: "HD-19/1",
        supplierLot: "P-118",
        supplierDocument: null,
        sheetsOnHand: 9,
        measuredDaysAgo: 48,
        readings: stackReadings(9, [19.21, 19.18, 19.24], 1.2),
      },
    ],
  },
] as const satisfies readonly {
  readonly code: string;
  readonly lots: readonly DemoLot[];
  readonly [field: string]: unknown;
}[];
