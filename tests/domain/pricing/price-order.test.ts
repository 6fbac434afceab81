import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  type PriceBook,
  type PricedQuote,
  priceBookSchema,
  priceOrder,
  type QuoteFacts,
} from "~/domain/pricing";
import { birch, book, facts, panel, someFacts } from "./facts";

function priced(of: QuoteFacts, by: PriceBook = book): PricedQuote {
  const result = priceOrder(of, by);
  if (!result.ok) throw new Error(result.reason);
  return result.quote;
}
const line = (quote: PricedQuote, kind: string) => quote.lines.find((one) => one.kind === kind);

describe("an order worked out by hand", () => {
  const quote = priced(facts);

  it("has a valid book", () => {
    expect(priceBookSchema.parse(book)).toEqual(book);
  });

  it("charges whole sheets", () => {
    // (600 + 10) × (400 + 10) × 4 = 1.0004 m² of 2.9768 m² at 75 %: 0.448; one sheet at 80.00 + 25 %.
    expect(line(quote, "material")).toEqual({
      kind: "material",
      label: "1 sheet 18 mm birch",
      how:
        "4 parts with 10.0 mm between them take 1.00 m². With 75 % of each 2,440.0 × 1,220.0 mm sheet planned " +
        "to become parts, that is 0.45 of a sheet, charged as 1 whole sheet at $100.00. " +
        "The share is planned until the nest is made.",
      amount: 10000,
      taxable: true,
    });
  });

  it("charges whole router minutes", () => {
    // 10.513 m × 2 / 5 m/min = 4.205; 8 holes at 3 s = 0.4; one change 1; one sheet 6: 11.605, charged as 12.
    expect(line(quote, "router")).toEqual({
      kind: "router",
      label: "Router, 12 min",
      how:
        "10.51 m cut in 2 passes at 5.0 m/min, 8 holes, 1 tool change, 1 sheet loaded and cleared: " +
        "12 min at $120.00/h.",
      amount: 2400,
      taxable: true,
    });
    expect(quote.machineMinutes).toBe(12);
  });

  it("charges the bench", () => {
    // 5 tabs a part (2,000 / 400), 20 tabs at 20 s: 6.67, so 7 min. 21.03 m of edges at 10 s: 3.5, so 4 min.
    expect(line(quote, "tabs")?.amount).toBe(700);
    expect(line(quote, "tabs")?.how).toBe(
      "20 tabs (one every 400 mm of outline, at least two a part) cut off and their stubs sanded at 20 s each: 7 min at $60.00/h.",
    );
    expect(line(quote, "sanding")?.amount).toBe(400);
    expect(line(quote, "sanding")?.how).toBe(
      "Both edges of 10.51 m of cut, 21.03 m, at 10 s a metre: 4 min at $60.00/h.",
    );
    expect(quote.benchMinutes).toBe(11);
  });

  it("charges set-up, packing, freight and tax, and adds up", () => {
    expect(line(quote, "set-up")?.amount).toBe(4500);
    expect(line(quote, "packing")?.amount).toBe(800 + 4 * 50);
    expect(line(quote, "minimum")).toBeUndefined();
    expect(line(quote, "freight")?.amount).toBe(1400 + 12 * 60);
    expect(line(quote, "freight")?.how).toBe(
      "1 parcel to WA at $14.00, and 12.0 kg with packing at $0.60/kg.",
    );
    // 100.00 + 24.00 + 45.00 + 7.00 + 4.00 + 10.00 + 21.20 = 211.20; 8.5 % = 17.952.
    expect(quote.net).toBe(21120);
    expect(line(quote, "tax")?.how).toBe("8.5 % of $211.20 in WA, freight included.");
    expect(quote.tax).toBe(1795);
    expect(quote.total).toBe(22915);
    expect(quote.sheets).toEqual([{ materialId: "birch-18", sheets: 1 }]);
    expect(quote.weightKilograms).toBeCloseTo(4 * 0.224292 * 0.0179 * 685, 9);
  });
});

describe("choices", () => {
  it("leaves the tabs on for nothing", () => {
    const quote = priced({ ...facts, leaveTabs: true });
    expect(line(quote, "tabs")).toMatchObject({ label: "Tabs left on", amount: 0 });
  });

  it("prices each sanding level", () => {
    const amounts = (["none", "arrises", "grit-150"] as const).map(
      (sanding) => line(priced({ ...facts, sanding }), "sanding")?.amount,
    );
    // 21.03 m at 0, 10 and 40 s: 0, 4 and 15 min.
    expect(amounts).toEqual([0, 400, 1500]);
  });

  it("charges no freight for pick-up and leaves it out of the tax", () => {
    const quote = priced({ ...facts, delivery: "pick-up", shipToRegion: null, parcels: [] });
    expect(line(quote, "freight")).toMatchObject({ amount: 0, how: "Collected at the shop: no freight." });
    expect(line(quote, "tax")?.how).toBe("8.5 % of $190.00 in WA.");
  });

  it("leaves freight out of the tax where it is not taxed", () => {
    const quote = priced({ ...facts, tax: { ...facts.tax, freightTaxable: false } });
    expect(quote.tax).toBe(1615);
    expect(line(quote, "tax")?.how).toBe("8.5 % of $190.00 in WA, freight not taxed.");
  });

  it("says why no tax is charged", () => {
    expect(line(priced({ ...facts, taxExempt: true }), "tax")).toMatchObject({
      amount: 0,
      how: "A valid exemption certificate is on file.",
    });
    const oregon = { rate: 0, freightTaxable: false, region: "OR" };
    expect(line(priced({ ...facts, tax: oregon }), "tax")?.how).toBe("No sales tax is collected for OR.");
  });

  it("brings a small order up to the smallest one, before freight and tax", () => {
    const small = { ...panel, quantity: 1 };
    const quote = priced({ ...facts, stocks: [{ ...birch, sheetPrice: 0, parts: [small] }] });
    const before = ["material", "router", "set-up", "tabs", "sanding", "packing"]
      .map((kind) => line(quote, kind)?.amount ?? 0)
      .reduce((sum, amount) => sum + amount, 0);
    expect(before).toBeLessThan(9000);
    expect(line(quote, "minimum")?.amount).toBe(9000 - before);
  });

  it("sends what no parcel may carry on a pallet", () => {
    const quote = priced({ ...facts, parcels: [{ kilograms: 40, oversize: true }] });
    expect(line(quote, "freight")).toMatchObject({ label: "Freight, 1 pallet", amount: 14000 + 40 * 20 });
  });

  it("takes a pallet where it is cheaper than parcels", () => {
    const parcels = Array.from({ length: 12 }, () => ({ kilograms: 30, oversize: false }));
    const quote = priced({ ...facts, parcels });
    expect(line(quote, "freight")?.amount).toBe(14000 + 360 * 20);
    expect(line(quote, "freight")?.how).toContain("cheaper than 12 parcels");
  });

  it("gives every stock its own material and router line and one further set-up", () => {
    const thin = { ...birch, materialId: "birch-6.5", materialName: "6.5 mm birch", nominalThickness: 6.5 };
    const quote = priced({ ...facts, stocks: [birch, thin] });
    expect(quote.lines.filter(({ kind }) => kind === "router").map(({ label }) => label)).toEqual([
      "Router, 18 mm birch, 12 min",
      "Router, 6.5 mm birch, 10 min",
    ]);
    expect(line(quote, "set-up")?.amount).toBe(6000);
  });
});

describe("refusals", () => {
  const reason = (of: QuoteFacts): string => {
    const result = priceOrder(of, book);
    return result.ok ? "" : result.reason;
  };

  it("say what is missing", () => {
    expect(reason({ ...facts, stocks: [] })).toBe("There is nothing to price: no stock has been chosen.");
    expect(reason({ ...facts, stocks: [{ ...birch, parts: [] }] })).toBe("No part is cut from 18 mm birch.");
    expect(reason({ ...facts, stocks: [{ ...birch, parts: [{ ...panel, grossArea: 0 }] }] })).toBe(
      "Part A has no size or no quantity.",
    );
    expect(reason({ ...facts, stocks: [{ ...birch, parts: [{ ...panel, quantity: 1.5 }] }] })).toBe(
      "Part A has no size or no quantity.",
    );
    expect(reason({ ...facts, shipToRegion: null })).toBe(
      "The ship-to address is needed to price freight and tax.",
    );
    expect(reason({ ...facts, parcels: [] })).toBe("Freight cannot be priced: no parcels are planned.");
    expect(reason({ ...facts, stocks: [{ ...birch, nominalThickness: 40 }] })).toBe(
      "No cutting speed is set for stock 40 mm thick.",
    );
  });
});

describe("whatever the order", () => {
  it("the total is the sum of the lines, each a whole number of cents and never negative", () => {
    fc.assert(
      fc.property(someFacts, (some) => {
        const quote = priced(some);
        const sum = quote.lines.reduce((total, { amount }) => total + amount, 0);
        expect(quote.total).toBe(sum);
        expect(quote.total).toBe(quote.net + quote.tax);
        for (const { amount } of quote.lines) {
          expect(Number.isSafeInteger(amount)).toBe(true);
          expect(amount).toBeGreaterThanOrEqual(0);
        }
        expect(quote.net - (line(quote, "freight")?.amount ?? 0)).toBeGreaterThanOrEqual(book.minimumOrder);
      }),
      { numRuns: 300 },
    );
  });

  it("the same facts give the same quote", () => {
    fc.assert(
      fc.property(someFacts, (some) => {
        expect(priceOrder(structuredClone(some), structuredClone(book))).toEqual(priceOrder(some, book));
      }),
      { numRuns: 100 },
    );
  });

  it("one more of a part never costs less", () => {
    fc.assert(
      fc.property(someFacts, fc.nat(), (some, pick) => {
        const stock = pick % some.stocks.length;
        const part = pick % some.stocks[stock].parts.length;
        const more = structuredClone(some);
        const stocks = more.stocks.map((one, i) =>
          i !== stock
            ? one
            : {
                ...one,
                parts: one.parts.map((kind, j) =>
                  j === part ? { ...kind, quantity: kind.quantity + 1 } : kind,
                ),
              },
        );
        expect(priced({ ...more, stocks }).total).toBeGreaterThanOrEqual(priced(some).total);
      }),
      { numRuns: 300 },
    );
  });
});
