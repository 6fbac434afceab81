import { describe, expect, it } from "vitest";
import { findParts, unitQuestion } from "~/domain/parts";
import { drawingOf, drawn, rectangle } from "./drawn";

/** Rectangles that are `sizes` long in millimetres. */
const partsOf = (...sizes: number[]) => {
  let x = 0;
  const paths = sizes.map((size) => {
    const path = drawn(rectangle(x, 0, size, size / 2));
    x += size * 1.5;
    return path;
  });
  return findParts(drawingOf(paths), { layers: [] });
};

describe("the question of a drawing's unit", () => {
  it("is none where a declared unit gives parts that come from sheets", () => {
    expect(unitQuestion(partsOf(600, 30), { declared: "mm", used: "mm" })).toBeNull();
    expect(unitQuestion(partsOf(600), { declared: "in", used: "in" })).toBeNull();
  });

  it("gives both readings, longest and smallest part, where none is declared", () => {
    const question = unitQuestion(partsOf(24, 6), { declared: null, used: "mm" });
    expect(question).toMatchObject({
      why: "undeclared",
      readings: [
        { unit: "mm", longest: 24, smallest: 6, plausible: true },
        {
          unit: "in",
          longest: expect.closeTo(609.6, 9),
          smallest: expect.closeTo(152.4, 9),
          plausible: true,
        },
      ],
    });
    expect(question?.words).toContain("24");
    expect(question?.words).toContain("609.6");
  });

  it("is the same in whatever unit the undeclared drawing was read", () => {
    // 24 inches, read as inches.
    const { readings } = unitQuestion(partsOf(609.6), { declared: null, used: "in" }) ?? { readings: [] };
    expect(readings[0].longest).toBeCloseTo(24, 9);
    expect(readings[1].longest).toBeCloseTo(609.6, 9);
  });

  it.each([
    ["a part of 0.4 mm", 0.4, "mm"],
    ["a part of 30 m", 30_000, "mm"],
    ["a part of 30 m in feet", 30_000, "ft"],
  ] as const)("doubts a declared unit that gives %s", (_, size, declared) => {
    const question = unitQuestion(partsOf(size), { declared, used: declared });
    expect(question?.why).toBe("implausible");
    expect(question?.readings.map(({ unit }) => unit)).toEqual(
      declared === "ft" ? ["ft", "mm", "in"] : ["mm", "in"],
    );
    expect(question?.readings[0]).toMatchObject({ longest: expect.closeTo(size, 6), plausible: false });
  });

  it("asks of a drawing without parts only where nothing is declared", () => {
    const none = findParts(drawingOf([]), { layers: [] });
    expect(unitQuestion(none, { declared: null, used: "mm" })).toMatchObject({
      why: "undeclared",
      readings: [],
    });
    expect(unitQuestion(none, { declared: "mm", used: "mm" })).toBeNull();
  });
});
