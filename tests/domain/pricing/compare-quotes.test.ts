import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  compareQuotes,
  type PriceBook,
  type PricedQuote,
  priceOrder,
  type QuoteFacts,
} from "~/domain/pricing";
import { birch, book, facts, someFacts } from "./facts";

function priced(of: QuoteFacts, by: PriceBook = book): PricedQuote {
  const result = priceOrder(of, by);
  if (!result.ok) throw new Error(result.reason);
  return result.quote;
}

describe("comparing a quote with a later one", () => {
  it("names nothing where nothing changed", () => {
    expect(compareQuotes(priced(facts), priced(facts))).toEqual([]);
  });

  it("names the lines that a dearer sheet changes", () => {
    const dearer = priced({ ...facts, stocks: [{ ...birch, sheetPrice: 8800 }] });
    const changes = compareQuotes(priced(facts), dearer);
    expect(changes.map(({ kind, difference }) => [kind, difference])).toEqual([
      ["material", 1000],
      ["tax", 85],
    ]);
  });

  it("names a line that only one of them has", () => {
    const quote = priced(facts);
    const raised = priced(facts, { ...book, minimumOrder: 30000 });
    const minimum = compareQuotes(quote, raised).find(({ kind }) => kind === "minimum");
    expect(minimum?.was).toBeNull();
    expect(minimum?.difference).toBe(minimum?.now?.amount);
    expect(compareQuotes(raised, quote).find(({ kind }) => kind === "minimum")?.now).toBeNull();
  });

  it("adds up to the difference of the totals", () => {
    fc.assert(
      fc.property(someFacts, someFacts, (one, other) => {
        const earlier = priced(one);
        const later = priced(other);
        const sum = compareQuotes(earlier, later).reduce((total, { difference }) => total + difference, 0);
        expect(sum).toBe(later.total - earlier.total);
      }),
      { numRuns: 100 },
    );
  });
});
