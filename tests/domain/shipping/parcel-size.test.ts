import { describe, expect, it } from "vitest";
import {
  billedPounds,
  dimensionalPounds,
  lengthPlusGirth,
  type ParcelLimits,
  parcelLimits,
} from "~/domain/shipping";
import { INCH_IN_MM, KG_PER_LB, poundsToKilograms } from "~/domain/units";

const inches = (length: number, width: number, height: number) => ({
  length: length * INCH_IN_MM,
  width: width * INCH_IN_MM,
  height: height * INCH_IN_MM,
});
function limitsOf(carrier: "private" | "postal"): ParcelLimits {
  const limits = parcelLimits(carrier, "2026-11-30");
  if (!limits) throw new Error("no limits");
  return limits;
}

describe("dimensional weight", () => {
  it("of 30 × 24 × 4 in is 21 lb at 139 and 18 lb at 166 (L × W × H ÷ divisor, next whole pound)", () => {
    expect(dimensionalPounds(inches(30, 24, 4), limitsOf("private"))).toBe(21);
    expect(dimensionalPounds(inches(30, 24, 4), limitsOf("postal"))).toBe(18);
  });

  it("rounds 11.1 × 8.5 × 6.2 in up to 12 × 9 × 7 and bills 6 lb (parcel trade press example)", () => {
    expect(dimensionalPounds(inches(11.1, 8.5, 6.2), limitsOf("private"))).toBe(6);
    expect(billedPounds(inches(11.1, 8.5, 6.2), poundsToKilograms(3), limitsOf("private"))).toBe(6);
    expect(billedPounds(inches(11.1, 8.5, 6.2), poundsToKilograms(9.2), limitsOf("private"))).toBe(10);
  });

  it("counts by post only above 1,728 cubic inches", () => {
    expect(dimensionalPounds(inches(12, 12, 12), limitsOf("postal"))).toBe(0);
    expect(dimensionalPounds(inches(12, 12, 13), limitsOf("postal"))).toBe(12);
  });
});

describe("length and girth", () => {
  it.each([
    [30, 24, 4, 86],
    [60, 30, 4, 128],
    [48, 48.75, 1, 146.75],
    [96, 48, 2, 196],
  ])("of %d × %d × %d in is %d in (carrier rule)", (length, width, height, girth) => {
    expect(lengthPlusGirth(inches(length, width, height)) / INCH_IN_MM).toBeCloseTo(girth, 9);
  });

  it("keeps square packs 2 in thick within 130 in up to 42 in and within 165 in up to 53.67 in (a + 2(a + 2))", () => {
    expect(lengthPlusGirth(inches(42, 42, 2)) / INCH_IN_MM).toBeCloseTo(130, 9);
    expect(lengthPlusGirth(inches(161 / 3, 161 / 3, 2)) / INCH_IN_MM).toBeCloseTo(165, 9);
  });
});

describe("parcel limits", () => {
  it("are those in force on the day (carriers' public rules as restated in trade summaries)", () => {
    expect(limitsOf("private").maxKilograms).toBeCloseTo(150 * KG_PER_LB, 9);
    expect(limitsOf("private").maxLength).toBeCloseTo(2743.2, 9);
    expect(limitsOf("private").maxLengthPlusGirth).toBeCloseTo(4191, 9);
    expect(limitsOf("postal").maxKilograms).toBeCloseTo(70 * KG_PER_LB, 9);
    expect(parcelLimits("private", "2025-08-18")).not.toBeNull();
    expect(parcelLimits("private", "2025-08-17")).toBeNull();
  });
});
