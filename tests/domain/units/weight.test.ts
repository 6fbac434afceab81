import { describe, expect, it } from "vitest";
import { INCH_IN_MM, kilogramsToPounds, panelKilograms, poundsToKilograms } from "~/domain/units";

describe("weight of a panel = area × thickness × density", () => {
  // Sheets of 1220 × 2440 mm from a European all-birch plywood data sheet (1.4 mm veneers, EN 315 basis).
  it.each([
    [4, 660, 7.9],
    [6.5, 670, 13.0],
    [9, 710, 19.0],
    [12, 695, 24.8],
    [18, 685, 36.7],
    [21, 680, 42.5],
    [24, 680, 48.6],
    [30, 672, 60.0],
  ])("%d mm birch at %d kg/m³ weighs %d kg", (thickness, density, kilograms) => {
    expect(Math.abs(panelKilograms(1220 * 2440, thickness, density) - kilograms)).toBeLessThanOrEqual(0.06);
  });

  it("gives 80.9 lb for the 18 mm sheet of 36.7 kg (lb = 0.45359237 kg)", () => {
    expect(kilogramsToPounds(36.7)).toBeCloseTo(80.9, 1);
    expect(poundsToKilograms(kilogramsToPounds(36.7))).toBeCloseTo(36.7, 12);
  });

  it("gives 28.68 kg and 63.2 lb for 1525 × 1525 × 18 mm at 685 kg/m³ (arithmetic on the data sheet's density)", () => {
    const sheet = panelKilograms(1525 * 1525, 18, 685);
    expect(Math.abs(sheet - 28.68)).toBeLessThan(0.05);
    expect(kilogramsToPounds(sheet)).toBeCloseTo(63.2, 1);
  });

  it("gives 12.63 lb for 24 × 30 × 0.709 in at 42.76 lb/ft³ (arithmetic)", () => {
    const area = 24 * 30 * INCH_IN_MM ** 2;
    const density = poundsToKilograms(42.76) / ((12 * INCH_IN_MM) / 1000) ** 3;
    expect(density).toBeCloseTo(685, 0);
    expect(
      Math.abs(kilogramsToPounds(panelKilograms(area, 0.709 * INCH_IN_MM, density)) - 12.63),
    ).toBeLessThan(0.05);
  });

  it("gives 7.14 kg/m² for 6 mm cast acrylic at 1.19 g/cm³ (ISO 1183 method)", () => {
    expect(panelKilograms(1e6, 6, 1190)).toBeCloseTo(7.14, 9);
  });

  it("gives 18.19 kg/m² for 3/4 in HDPE at 0.955 g/cm³ (density from memory)", () => {
    expect(panelKilograms(1e6, 0.75 * INCH_IN_MM, 955)).toBeCloseTo(18.19, 2);
  });

  it("gives 43.81 kg and 96.6 lb for 49 × 97 × 3/4 in MDF at 750 kg/m³ (density from memory, wood handbook)", () => {
    const sheet = panelKilograms(49 * 97 * INCH_IN_MM ** 2, 0.75 * INCH_IN_MM, 750);
    expect(Math.abs(sheet - 43.81)).toBeLessThan(0.05);
    expect(Math.abs(kilogramsToPounds(sheet) - 96.6)).toBeLessThan(0.05);
  });
});
