export { type PriceBook, priceBookSchema } from "./price-book";
export type { LineKind, PricedPart, PricedQuote, PricedStock, QuoteFacts, QuoteLine } from "./quote";
