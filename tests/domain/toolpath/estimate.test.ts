import { describe, expect, it } from "vitest";
import { type CutRates, cutSpeedFor, estimateMinutes, tabCount } from "~/domain/toolpath";

const rates: CutRates = {
  cutSpeeds: [
    { upToThickness: 18, speed: 5000, passes: 2 },
    { upToThickness: 9, speed: 6000, passes: 1 },
  ],
  secondsPerHole: 3,
  minutesPerSheet: 6,
  toolChangeMinutes: 0.5,
};

describe("router minutes", () => {
  it("add up cutting, holes, tool changes and handling", () => {
    const result = estimateMinutes({
      parts: [
        { quantity: 2, cutLength: 5000, holes: 10 },
        { quantity: 1, cutLength: 2500, holes: 0 },
      ],
      thickness: 18,
      sheets: 2,
      rates,
    });
    // 12.5 m × 2 passes at 5 m/min; 20 holes at 3 s; two changes of half a minute; two sheets at 6 min.
    expect(result).toEqual({
      ok: true,
      estimate: {
        minutes: 5 + 1 + 1 + 12,
        cutting: 5,
        drilling: 1,
        toolChanges: 1,
        handling: 12,
        cutLength: 12500,
        holes: 20,
        passes: 2,
        speed: 5000,
      },
    });
  });

  it("change no tool where no hole is drilled", () => {
    const result = estimateMinutes({
      parts: [{ quantity: 1, cutLength: 6000, holes: 0 }],
      thickness: 9,
      sheets: 1,
      rates,
    });
    expect(result.ok && result.estimate.minutes).toBe(1 + 6);
  });

  it("refuse a thickness that no speed covers", () => {
    expect(estimateMinutes({ parts: [], thickness: 30, sheets: 1, rates })).toEqual({
      ok: false,
      reason: "No cutting speed is set for stock 30 mm thick.",
    });
  });

  it("take the thinnest covering entry, whatever the order of the table", () => {
    expect(cutSpeedFor(6.5, rates.cutSpeeds)?.passes).toBe(1);
    expect(cutSpeedFor(9, rates.cutSpeeds)?.passes).toBe(1);
    expect(cutSpeedFor(12, rates.cutSpeeds)?.passes).toBe(2);
    expect(cutSpeedFor(18.1, rates.cutSpeeds)).toBeNull();
  });
});

describe("tabs", () => {
  // At least two a part, 8 to 18 in apart: common practice, no source.
  it("hold every part twice at least and no further apart than the spacing", () => {
    expect(tabCount(100, 350)).toBe(2);
    expect(tabCount(700, 350)).toBe(2);
    expect(tabCount(701, 350)).toBe(3);
    expect(tabCount(2080, 350)).toBe(6);
  });
});
