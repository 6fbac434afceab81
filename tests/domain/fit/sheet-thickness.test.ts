import { describe, expect, test } from "vitest";
import { beyondStandard, isPlywood, measureStack, plywoodLimits, READING_POINTS } from "~/domain/fit";

const onSheet = (sheet: number, values: readonly number[]) =>
  values.map((thickness, at) => ({ sheet, position: READING_POINTS[at], thickness }));

/*
 * MAT-010 to MAT-016: sanded plywood, EN 315 / ISO 1954, lower t − (0.4 + 0.03 t), upper t + (0.2 + 0.03 t); the formula
 * seen in a summary of GB/T 9846, which uses the same table; a mill's table for 12 to 30 mm agrees after truncation.
 */
test.each([
  ["MAT-010", 6.5, 5.905, 6.895],
  ["MAT-011", 9, 8.33, 9.47],
  ["MAT-012", 12, 11.24, 12.56],
  ["MAT-013", 15, 14.15, 15.65],
  ["MAT-014", 18, 17.06, 18.74],
  ["MAT-015", 21, 19.97, 21.83],
  ["MAT-016", 24, 22.88, 24.92],
])("%s: %d mm sanded plywood may be %d to %d mm", (_id, nominal, lower, upper) => {
  expect(plywoodLimits(nominal).lower).toBeCloseTo(lower, 9);
  expect(plywoodLimits(nominal).upper).toBeCloseTo(upper, 9);
});

describe("a stack's readings", () => {
  /* MAT-060: EN 324-1:1993 measures at eight points, as a trade association summarises it. */
  test("one sheet is measured at all eight points", () => {
    const eight = [17.9, 17.8, 17.95, 17.85, 17.9, 18, 17.92, 17.88];
    expect(READING_POINTS).toHaveLength(8);
    /* The sum is 143.20, over eight 17.90. */
    expect(measureStack(onSheet(4, eight))).toEqual({
      ok: true,
      thickness: { min: 17.8, mean: 17.9, max: 18 },
    });
    expect(measureStack(onSheet(4, eight.slice(1)))).toMatchObject({ ok: false });
  });

  test("several sheets at four points each, none at three", () => {
    const four = [18, 18.1, 18.2, 18.3];
    expect(measureStack([...onSheet(1, four), ...onSheet(9, four)])).toMatchObject({
      ok: true,
      thickness: { min: 18, mean: 18.15, max: 18.3 },
    });
    expect(measureStack([...onSheet(1, four), ...onSheet(9, four.slice(1))])).toMatchObject({
      ok: false,
      reason: expect.stringContaining("Sheet 9 has 3 readings"),
    });
  });

  test("a point is measured once, and nothing is no measuring", () => {
    const twice = [...onSheet(1, [18, 18, 18, 18]), ...onSheet(1, [18, 18, 18, 18])];
    expect(measureStack(twice)).toMatchObject({ ok: false, reason: expect.stringContaining("two readings") });
    expect(measureStack([])).toMatchObject({ ok: false });
  });
});

describe("beyond the standard", () => {
  test("the words carry the formula's numbers", () => {
    const thickness = { min: 17.05, mean: 17.9, max: 18.75 };
    expect(beyondStandard({ nominal: 18, thickness, readings: [] })).toEqual([
      "Thinnest 17.05 mm is under 17.06 mm: 18 − (0.4 + 0.03 × 18), EN 315.",
      "Thickest 18.75 mm is over 18.74 mm: 18 + (0.2 + 0.03 × 18), EN 315.",
    ]);
  });

  test("readings on the limits are within it", () => {
    const thickness = { min: 17.06, mean: 17.9, max: 18.74 };
    expect(beyondStandard({ nominal: 18, thickness, readings: [] })).toEqual([]);
  });

  /* 0.6 mm inside one sheet in common thicknesses: the same summary of EN 315. */
  test("one sheet may vary by 0.6 mm, a stack by more", () => {
    const thickness = { min: 17.4, mean: 17.8, max: 18.2 };
    const flat = [...onSheet(1, [17.4, 17.5]), ...onSheet(2, [18.1, 18.2])];
    expect(beyondStandard({ nominal: 18, thickness, readings: flat })).toEqual([]);
    expect(beyondStandard({ nominal: 18, thickness, readings: onSheet(3, [17.5, 18.11]) })).toEqual([
      "Sheet 3 varies by 0.61 mm; 0.60 mm is allowed inside a sheet, EN 315.",
    ]);
    expect(beyondStandard({ nominal: 18, thickness, readings: onSheet(3, [17.5, 18.1]) })).toEqual([]);
  });

  test("it is plywood's", () => {
    expect(["birch-plywood", "softwood-plywood", "mdf", "hdpe"].map(isPlywood)).toEqual([
      true,
      true,
      false,
      false,
    ]);
  });
});
