import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { formatMinutes, formatMoney, roundHalfUp } from "~/domain/units";

describe("money", () => {
  it("rounds half up", () => {
    expect(roundHalfUp(0.5)).toBe(1);
    expect(roundHalfUp(1.4999)).toBe(1);
    expect(roundHalfUp(-0.5)).toBe(0);
    // 1.005 × 100 is 100.49999999999999 in binary; the half is meant.
    expect(roundHalfUp(1.005 * 100)).toBe(101);
  });

  it("rounds to within half a cent", () => {
    fc.assert(
      fc.property(fc.double({ min: -1e9, max: 1e9, noNaN: true }), (amount) => {
        const rounded = roundHalfUp(amount);
        expect(Number.isInteger(rounded)).toBe(true);
        expect(Math.abs(rounded - amount)).toBeLessThanOrEqual(0.5 + 1e-6);
      }),
    );
  });

  it("is shown with its sign and two digits", () => {
    expect(formatMoney(124455)).toBe("$1,244.55");
    expect(formatMoney(-1800)).toBe("-$18.00");
  });
});

describe("minutes", () => {
  it("are shown as hours from an hour and a half on", () => {
    expect(formatMinutes(0)).toBe("0 min");
    expect(formatMinutes(0.2)).toBe("1 min");
    expect(formatMinutes(46.4)).toBe("46 min");
    expect(formatMinutes(370)).toBe("6 h 10 min");
  });
});
