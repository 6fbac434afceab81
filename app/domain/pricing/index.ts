/** What an order costs, line by line, and where each line comes from. */
export { compareQuotes, type LineDifference } from "./compare-quotes";
export { type PriceBook, priceBookSchema } from "./price-book";
export { priceOrder } from "./price-order";
export type {
  LineKind,
  PlannedParcel,
  PricedPart,
  PricedQuote,
  PricedStock,
  PriceOrder,
  QuoteFacts,
  QuoteLine,
} from "./quote";
export { type PricedBefore, type Repriced, reprice } from "./reprice";
export { nestedArea, type PlannedStock, planSheets, planStock } from "./sheets";
