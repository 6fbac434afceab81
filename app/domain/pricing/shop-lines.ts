import type { CutEstimate } from "~/domain/toolpath";
import { tabCount } from "~/domain/toolpath";
import { formatMillimetres, formatMinutes, formatMoney, roundHalfUp } from "~/domain/units";
import type { PriceBook } from "./price-book";
import type { QuoteFacts, QuoteLine } from "./quote";
import type { PlannedStock } from "./sheets";

/** A line and the bench minutes behind it. */
export interface BenchLine {
  readonly line: QuoteLine;
  readonly minutes: number;
}

export const counted = (count: number, one: string, many = `${one}s`): string =>
  `${count.toLocaleString("en-US")} ${count === 1 ? one : many}`;
export const metres = (millimetres: number): string => `${formatMillimetres(millimetres / 1000, 2)} m`;
const hourly = (minutes: number, hour: number): number => roundHalfUp((minutes * hour) / 60);
/** Minutes charged: whole ones, so that minutes times rate on the line gives its amount. */
const wholeMinutes = (minutes: number): number => Math.ceil(minutes - 1e-9);

export function materialLine(
  { stock, pieces, area, share, sheets }: PlannedStock,
  facts: QuoteFacts,
  book: PriceBook,
): QuoteLine {
  const each = roundHalfUp(stock.sheetPrice * (1 + book.materialMarkUp));
  const sheet = `${formatMillimetres(stock.sheet.length)} × ${formatMillimetres(stock.sheet.width)} mm`;
  return {
    kind: "material",
    label: `${counted(sheets, "sheet")} ${stock.materialName}`,
    how:
      `${counted(pieces, "part")} with ${formatMillimetres(facts.spacing)} mm between them ${pieces === 1 ? "takes" : "take"} ` +
      `${(area / 1e6).toFixed(2)} m². With ${Math.round(facts.plannedYield * 100)} % of each ${sheet} sheet planned ` +
      `to become parts, that is ${share.toFixed(2)} ${share > 1 ? "sheets" : "of a sheet"}, charged as ${counted(sheets, "whole sheet")} at ` +
      `${formatMoney(each)}. The share is planned until the nest is made.`,
    amount: each * sheets,
    taxable: true,
  };
}

export function routerLine(
  { stock, sheets }: PlannedStock,
  estimate: CutEstimate,
  several: boolean,
  book: PriceBook,
): { readonly line: QuoteLine; readonly minutes: number } {
  const minutes = wholeMinutes(estimate.minutes);
  const changes = estimate.toolChanges > 0 ? `, ${counted(sheets, "tool change")}` : "";
  return {
    minutes,
    line: {
      kind: "router",
      label: several
        ? `Router, ${stock.materialName}, ${formatMinutes(minutes)}`
        : `Router, ${formatMinutes(minutes)}`,
      how:
        `${metres(estimate.cutLength)} cut in ${counted(estimate.passes, "pass", "passes")} at ` +
        `${(estimate.speed / 1000).toFixed(1)} m/min, ${counted(estimate.holes, "hole")}${changes}, ` +
        `${counted(sheets, "sheet")} loaded and cleared: ${minutes} min at ${formatMoney(book.machineHour)}/h.`,
      amount: hourly(minutes, book.machineHour),
      taxable: true,
    },
  };
}

export function setUpLine(stocks: number, book: PriceBook): QuoteLine {
  const further = stocks - 1;
  const amount = book.setUp + further * book.setUpPerFurtherStock;
  return {
    kind: "set-up",
    label: "Set-up",
    how:
      further === 0
        ? `Once per order, for one stock: ${formatMoney(book.setUp)}.`
        : `Once per order ${formatMoney(book.setUp)}, and ${counted(further, "further stock")} at ${formatMoney(book.setUpPerFurtherStock)}.`,
    amount,
    taxable: true,
  };
}

export function tabsLine(facts: QuoteFacts, book: PriceBook): BenchLine {
  const tabs = facts.stocks
    .flatMap((stock) => stock.parts)
    .reduce((sum, part) => sum + tabCount(part.outerLength, book.tabSpacing) * part.quantity, 0);
  const minutes = facts.leaveTabs ? 0 : wholeMinutes((tabs * book.secondsPerTab) / 60);
  const rule = `one every ${formatMillimetres(book.tabSpacing, 0)} mm of outline, at least two a part`;
  return {
    minutes,
    line: {
      kind: "tabs",
      label: facts.leaveTabs ? "Tabs left on" : "Tabs cut off",
      how: facts.leaveTabs
        ? `About ${counted(tabs, "tab")} (${rule}) stay on the parts, for you to cut off and sand.`
        : `${counted(tabs, "tab")} (${rule}) cut off and their stubs sanded at ${book.secondsPerTab} s each: ` +
          `${minutes} min at ${formatMoney(book.benchHour)}/h.`,
      amount: hourly(minutes, book.benchHour),
      taxable: true,
    },
  };
}

const SANDING_WORDS = {
  none: "No sanding",
  arrises: "Arrises taken off",
  "grit-150": "Sanded to 150 grit",
} as const;

export function sandingLine(facts: QuoteFacts, book: PriceBook): BenchLine {
  const cut = facts.stocks
    .flatMap((stock) => stock.parts)
    .reduce((sum, part) => sum + part.cutLength * part.quantity, 0);
  const seconds = book.sanding[facts.sanding];
  const edges = 2 * cut;
  const minutes = wholeMinutes(((edges / 1000) * seconds) / 60);
  return {
    minutes,
    line: {
      kind: "sanding",
      label: SANDING_WORDS[facts.sanding],
      how:
        facts.sanding === "none"
          ? "Edges come as the cutter leaves them."
          : `Both edges of ${metres(cut)} of cut, ${metres(edges)}, at ${seconds} s a metre: ` +
            `${minutes} min at ${formatMoney(book.benchHour)}/h.`,
      amount: hourly(minutes, book.benchHour),
      taxable: true,
    },
  };
}

export function packingLine(pieces: number, book: PriceBook): QuoteLine {
  return {
    kind: "packing",
    label: "Packing",
    how: `${formatMoney(book.packing.perOrder)} an order and ${counted(pieces, "part")} at ${formatMoney(book.packing.perPiece)}.`,
    amount: book.packing.perOrder + pieces * book.packing.perPiece,
    taxable: true,
  };
}

/** What brings a small order up to the smallest one the shop takes; null where it is not needed. */
export function minimumLine(soFar: number, book: PriceBook): QuoteLine | null {
  if (soFar >= book.minimumOrder) return null;
  return {
    kind: "minimum",
    label: "Up to the smallest order",
    how: `The smallest order is ${formatMoney(book.minimumOrder)} before freight and tax; the lines above come to ${formatMoney(soFar)}.`,
    amount: book.minimumOrder - soFar,
    taxable: true,
  };
}
