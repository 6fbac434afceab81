import type { PriceBook } from "~/domain/pricing";
import { formatMoney } from "~/domain/units";

interface PriceRow {
  /** The value's dotted name. */
  readonly path: string;
  readonly label: string;
  readonly show: "money" | "percent" | "number";
  readonly unit?: string;
}

export interface PriceSection {
  readonly title: string;
  readonly rows: readonly PriceRow[];
}

/** The price book in the order a person reads it; the speeds, a list, stand apart. */
export const PRICE_SECTIONS: readonly PriceSection[] = [
  {
    title: "Material and set-up",
    rows: [
      { path: "materialMarkUp", label: "Mark-up on the sheet's price", show: "percent", unit: "%" },
      { path: "setUp", label: "Set-up, an order", show: "money", unit: "$" },
      { path: "setUpPerFurtherStock", label: "Set-up, each further stock", show: "money", unit: "$" },
      { path: "minimumOrder", label: "Smallest order, before freight and tax", show: "money", unit: "$" },
    ],
  },
  {
    title: "Router",
    rows: [
      { path: "machineHour", label: "Machine, an hour", show: "money", unit: "$" },
      { path: "secondsPerHole", label: "A hole", show: "number", unit: "s" },
      { path: "minutesPerSheet", label: "Loading and clearing a sheet", show: "number", unit: "min" },
      { path: "toolChangeMinutes", label: "A change of tool", show: "number", unit: "min" },
    ],
  },
  {
    title: "Bench",
    rows: [
      { path: "benchHour", label: "Bench, an hour", show: "money", unit: "$" },
      { path: "tabSpacing", label: "One tab every so much outline", show: "number", unit: "mm" },
      { path: "secondsPerTab", label: "A tab, cut off and sanded", show: "number", unit: "s" },
      { path: "sanding.none", label: "No sanding, a metre of edge", show: "number", unit: "s" },
      { path: "sanding.arrises", label: "Arrises taken off, a metre of edge", show: "number", unit: "s" },
      { path: "sanding.grit-150", label: "Sanded to 150 grit, a metre of edge", show: "number", unit: "s" },
    ],
  },
  {
    title: "Packing and freight",
    rows: [
      { path: "packing.perOrder", label: "Packing, an order", show: "money", unit: "$" },
      { path: "packing.perPiece", label: "Packing, a part", show: "money", unit: "$" },
      { path: "freight.perParcel", label: "A parcel", show: "money", unit: "$" },
      { path: "freight.perKilogram", label: "A parcel's kilogram", show: "money", unit: "$" },
      { path: "freight.maxParcelKilograms", label: "Heaviest parcel", show: "number", unit: "kg" },
      { path: "freight.perPallet", label: "A pallet", show: "money", unit: "$" },
      { path: "freight.palletPerKilogram", label: "A pallet's kilogram", show: "money", unit: "$" },
      { path: "freight.maxPalletKilograms", label: "Heaviest pallet", show: "number", unit: "kg" },
    ],
  },
];

/** The value of a dotted name, as it is kept. */
function valueAt(book: PriceBook, path: string): number {
  let value: unknown = book;
  for (const name of path.split("."))
    value = value && typeof value === "object" ? Reflect.get(value, name) : null;
  if (typeof value !== "number") throw new Error(`The price book has no number called ${path}.`);
  return value;
}

/** A price as it is read: `$120.00`, `25 %`, `2.5 s`. */
export function priceInWords(book: PriceBook, { path, show, unit }: PriceRow): string {
  const value = valueAt(book, path);
  if (show === "money") return formatMoney(value, book.currency);
  if (show === "percent") return `${Number((value * 100).toFixed(4))} %`;
  return `${value.toLocaleString("en-US")} ${unit ?? ""}`.trim();
}

/** The speeds of a book: what is cut how fast, and in how many passes. */
export const speedsInWords = (
  book: PriceBook,
): readonly { readonly label: string; readonly value: string }[] =>
  book.cutSpeeds.map(({ upToThickness, speed, passes }) => ({
    label: `Up to ${upToThickness} mm`,
    value: `${speed.toLocaleString("en-US")} mm/min, ${passes} ${passes === 1 ? "pass" : "passes"}`,
  }));
