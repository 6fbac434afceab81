import type { Sanding } from "~/domain/orders";
import type { PriceBook } from "./price-book";

export type LineKind =
  | "material"
  | "router"
  | "set-up"
  | "tabs"
  | "sanding"
  | "packing"
  | "minimum"
  | "freight"
  | "tax";

/** A kind of part as pricing needs it. Millimetres, mm2, kilograms per piece. */
export interface PricedPart {
  readonly label: string;
  readonly quantity: number;
  readonly cutLength: number;
  readonly outerLength: number;
  readonly holes: number;
  readonly area: number;
  readonly grossArea: number;
  readonly box: { readonly width: number; readonly height: number };
}

/** A parcel as it is planned: kilograms with packing. `oversize` is beyond what a parcel may be, so goes on a pallet. */
export interface PlannedParcel {
  readonly kilograms: number;
  readonly oversize: boolean;
}

/** Everything on one stock. */
export interface PricedStock {
  readonly materialId: string;
  readonly materialName: string;
  readonly lotId: string | null;
  readonly lotCode: string | null;
  readonly nominalThickness: number;
  readonly thickness: { readonly min: number; readonly mean: number; readonly max: number };
  readonly density: number;
  readonly sheet: { readonly length: number; readonly width: number };
  readonly sheetPrice: number;
  readonly parts: readonly PricedPart[];
}

/** What a price is made from; kept whole inside the quote. */
export interface QuoteFacts {
  readonly stocks: readonly PricedStock[];
  readonly sanding: Sanding;
  readonly leaveTabs: boolean;
  readonly delivery: "ship" | "pick-up";
  readonly shipToRegion: string | null;
  /** How the order would be packed, from the shipping room; empty for pick-up. */
  readonly parcels: readonly PlannedParcel[];
  readonly taxExempt: boolean;
  readonly tax: { readonly rate: number; readonly freightTaxable: boolean; readonly region: string };
  /** Share of a sheet planned to become parts, and the room left between them, until the order is nested. */
  readonly plannedYield: number;
  readonly spacing: number;
}

export interface QuoteLine {
  readonly kind: LineKind;
  readonly label: string;
  /** How the amount came about, in a sentence with its numbers. */
  readonly how: string;
  /** Integer cents. */
  readonly amount: number;
  readonly taxable: boolean;
}

export interface PricedQuote {
  readonly lines: readonly QuoteLine[];
  readonly net: number;
  readonly tax: number;
  readonly total: number;
  readonly machineMinutes: number;
  readonly benchMinutes: number;
  readonly weightKilograms: number;
  readonly sheets: readonly { readonly materialId: string; readonly sheets: number }[];
}

/** Deterministic for its facts and book. Refuses when a stock has no parts or a part no size. */
export type PriceOrder = (
  facts: QuoteFacts,
  book: PriceBook,
) => { readonly ok: true; readonly quote: PricedQuote } | { readonly ok: false; readonly reason: string };
