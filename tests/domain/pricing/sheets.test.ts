import { describe, expect, it } from "vitest";
import { nestedArea, planSheets, priceOrder } from "~/domain/pricing";
import { roundHalfUp } from "~/domain/units";
import { birch, book, facts, panel } from "./facts";

describe("sheets by the planned yield", () => {
  // 2.3 m² of a 2.9768 m² sheet costing 120.00 at 75 % planned yield: share = part area ÷ (sheet area × yield),
  // 123.62; a whole sheet 120.00 (worked example, arithmetic).
  it("gives the worked share and the worked whole sheet", () => {
    const planned = planSheets({ area: 2.3, sheetArea: 2.9768, plannedYield: 0.75 });
    expect(roundHalfUp(planned.share * 12000)).toBe(12362);
    expect(planned.sheets).toBe(2);
    const full = planSheets({ area: 2.3, sheetArea: 2.9768, plannedYield: 1 });
    expect(full.sheets * 12000).toBe(12000);
  });

  it("needs no further sheet for an area that fills the plan exactly", () => {
    expect(planSheets({ area: 0.3, sheetArea: 1, plannedYield: 0.1 }).sheets).toBe(3);
  });

  it("grows a rectangle by half the spacing on each side", () => {
    expect(nestedArea({ grossArea: 600 * 400, outerLength: 2000 }, 10)).toBe(610 * 410);
  });
});

describe("set-up spread over a quantity", () => {
  // 60 once and 9 a piece give 69.00, 15.00 and 10.20 each at 1, 10 and 50 (worked example, arithmetic).
  it("gives the worked unit prices", () => {
    const plain = {
      ...book,
      materialMarkUp: 0,
      setUp: 6000,
      machineHour: 0,
      benchHour: 0,
      packing: { perOrder: 0, perPiece: 900 },
      minimumOrder: 0,
    };
    const each = [1, 10, 50].map((quantity) => {
      const stocks = [{ ...birch, sheetPrice: 0, parts: [{ ...panel, quantity }] }];
      const result = priceOrder({ ...facts, stocks, delivery: "pick-up", taxExempt: true }, plain);
      return result.ok ? result.quote.total / quantity : null;
    });
    expect(each).toEqual([6900, 1500, 1020]);
  });
});

describe("mark-up on cost", () => {
  // 40 % mark-up on 100.00 is 140.00 (worked example, arithmetic); 40 % margin would be 166.67.
  it("gives the worked price of a sheet", () => {
    const result = priceOrder(
      { ...facts, stocks: [{ ...birch, sheetPrice: 10000 }] },
      { ...book, materialMarkUp: 0.4 },
    );
    expect(result.ok && result.quote.lines[0].amount).toBe(14000);
  });
});
