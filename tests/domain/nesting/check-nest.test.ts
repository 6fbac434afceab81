import { describe, expect, it } from "vitest";
import { checkNest, type Nest, type NestRequest } from "~/domain/nesting";

const request: NestRequest = {
  items: [
    { id: "A", width: 400, height: 200, mayTurn90: false, quantity: 2 },
    { id: "B", width: 100, height: 50, mayTurn90: true, quantity: 1 },
  ],
  sheet: { length: 1000, width: 500 },
  spacing: 10,
  margin: 20,
};
const a1 = { item: "A", copy: 1, x: 20, y: 20, turnDegrees: 0 } as const;
const a2 = { item: "A", copy: 2, x: 430, y: 20, turnDegrees: 0 } as const;
const b1 = { item: "B", copy: 1, x: 20, y: 230, turnDegrees: 90 } as const;
const nestOf = (placements: Nest["sheets"][number]["placements"]): Nest => ({
  sheets: [{ placements, yield: 0 }],
  unplaced: [],
});
const problems = (nest: Nest): readonly string[] => {
  const result = checkNest(nest, request);
  return result.ok ? [] : result.problems;
};

describe("the check of a nest", () => {
  it("passes a sound one, at exactly the spacing and the margin", () => {
    expect(checkNest(nestOf([a1, a2, b1]), request)).toEqual({ ok: true });
  });

  it("counts a copy set aside as there", () => {
    expect(checkNest({ ...nestOf([a1, a2]), unplaced: [{ item: "B", copy: 1 }] }, request)).toEqual({
      ok: true,
    });
  });

  it("finds boxes that overlap", () => {
    expect(problems(nestOf([a1, { ...a2, x: 300 }, b1]))).toEqual(["Sheet 1: A no. 1 and A no. 2 overlap."]);
  });

  it("finds one box inside another", () => {
    expect(problems(nestOf([a1, a2, { ...b1, x: 100, y: 60 }]))).toEqual([
      "Sheet 1: A no. 1 and B no. 1 overlap.",
    ]);
  });

  it("finds boxes too near, side by side and corner to corner", () => {
    expect(problems(nestOf([a1, { ...a2, x: 429 }, b1]))).toEqual([
      "Sheet 1: A no. 1 and A no. 2 are 9.00 mm apart; the spacing is 10 mm.",
    ]);
    expect(problems(nestOf([a1, { ...a2, x: 426, y: 228 }, b1]))).toEqual([]);
    expect(problems(nestOf([a1, { ...a2, x: 423, y: 224 }, b1]))).toEqual([
      "Sheet 1: A no. 1 and A no. 2 are 5.00 mm apart; the spacing is 10 mm.",
    ]);
  });

  it("finds a box off the margin", () => {
    expect(problems(nestOf([{ ...a1, x: 5 }, a2, b1]))).toEqual([
      "Sheet 1: A no. 1 is 5.00 mm from the sheet's edge; the margin is 20 mm.",
    ]);
    expect(problems(nestOf([a1, { ...a2, x: 590 }, b1]))).toEqual([
      "Sheet 1: A no. 2 is 10.00 mm from the sheet's edge; the margin is 20 mm.",
    ]);
  });

  it("finds a part turned against its grain", () => {
    expect(problems(nestOf([a1, { ...a2, turnDegrees: 90 }, b1]))).toEqual([
      "Sheet 1: A no. 2 is turned against its grain.",
    ]);
  });

  it("finds what is missing, twice there, or not asked for", () => {
    expect(problems(nestOf([a1, a2]))).toEqual(["B no. 1 is there 0 times instead of once."]);
    expect(
      problems({
        sheets: [
          { placements: [a1, a2, b1], yield: 0 },
          { placements: [a1], yield: 0 },
        ],
        unplaced: [],
      }),
    ).toEqual(["A no. 1 is there 2 times instead of once."]);
    expect(problems(nestOf([a1, a2, b1, { ...b1, item: "C", x: 600, y: 300 }]))).toEqual([
      "C no. 1 was not asked for.",
    ]);
  });
});
