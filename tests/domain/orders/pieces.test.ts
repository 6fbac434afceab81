import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { allReached, type PieceFacts, progressOf, SHOP_STAGES, stageFromPieces } from "~/domain/orders";

const STATES = ["good", "spoiled", "missing", "cancelled"] as const;
const piece = (stage: PieceFacts["stage"], more: Partial<PieceFacts> = {}): PieceFacts => ({
  stage,
  state: "good",
  remakeOf: null,
  ...more,
});
const anyPiece: fc.Arbitrary<PieceFacts> = fc.record({
  stage: fc.constantFrom(...SHOP_STAGES),
  state: fc.constantFrom(...STATES),
  remakeOf: fc.constantFrom(null, "piece-1"),
});

describe("the stage of an order follows from its pieces", () => {
  test.each<[string, PieceFacts[], string | null]>([
    ["no pieces, no stage", [], null],
    ["all have it", [piece("cut"), piece("cut")], "cut"],
    ["the last one counts", [piece("tabs-removed"), piece("nested"), piece("cut")], "nested"],
    ["a spoiled piece is not waited for", [piece("cut"), piece("nested", { state: "spoiled" })], "cut"],
    ["nor a missing one", [piece("cut"), piece("cut", { state: "missing" })], "cut"],
    ["nor a cancelled one", [piece("cut"), piece("received", { state: "cancelled" })], "cut"],
    [
      "a remake holds back nobody's progress",
      [piece("tabs-removed"), piece("received", { remakeOf: "piece-1" })],
      "tabs-removed",
    ],
    ["but it holds shipping", [piece("shipped"), piece("cut", { remakeOf: "piece-1" })], "tabs-removed"],
    ["which is reached with it", [piece("shipped"), piece("shipped", { remakeOf: "piece-1" })], "shipped"],
    [
      "remakes alone speak for themselves",
      [piece("cut", { state: "spoiled" }), piece("nested", { remakeOf: "piece-1" })],
      "nested",
    ],
    ["all lost, no stage", [piece("cut", { state: "spoiled" })], null],
  ])("%s", (_, pieces, stage) => {
    expect(stageFromPieces(pieces)).toBe(stage);
  });

  test("whatever the order of the pieces", () => {
    fc.assert(
      fc.property(fc.array(anyPiece, { maxLength: 8 }), (pieces) => {
        expect(stageFromPieces(pieces.toReversed())).toBe(stageFromPieces(pieces));
      }),
    );
  });

  test("is never beyond what each first piece has reached, and shipped only when every good piece is", () => {
    fc.assert(
      fc.property(fc.array(anyPiece, { minLength: 1, maxLength: 8 }), (pieces) => {
        const stage = stageFromPieces(pieces);
        const good = pieces.filter(({ state }) => state === "good");
        if (stage === null) {
          expect(good).toEqual([]);
          return;
        }
        for (const one of good.filter(({ remakeOf }) => remakeOf === null))
          expect(SHOP_STAGES.indexOf(one.stage)).toBeGreaterThanOrEqual(SHOP_STAGES.indexOf(stage));
        expect(stage === "shipped").toBe(good.every((one) => one.stage === "shipped"));
      }),
    );
  });
});

describe("progress", () => {
  test("counts good pieces that have reached a stage, remakes among them", () => {
    const pieces = [
      piece("tabs-removed"),
      piece("cut"),
      piece("cut", { state: "spoiled" }),
      piece("received", { remakeOf: "piece-1" }),
    ];
    expect(progressOf(pieces)).toEqual([
      { stage: "received", reached: 3, of: 3 },
      { stage: "nested", reached: 2, of: 3 },
      { stage: "cut", reached: 2, of: 3 },
      { stage: "tabs-removed", reached: 1, of: 3 },
      { stage: "shipped", reached: 0, of: 3 },
    ]);
  });

  test("never rises along the stages", () => {
    fc.assert(
      fc.property(fc.array(anyPiece, { maxLength: 8 }), (pieces) => {
        const counts = progressOf(pieces).map(({ reached }) => reached);
        expect(counts).toEqual(counts.toSorted((one, other) => other - one));
      }),
    );
  });
});

test("all have reached a stage only when there is a piece at all", () => {
  expect(allReached([], "received")).toBe(false);
  expect(allReached([piece("cut", { state: "spoiled" })], "received")).toBe(false);
  expect(allReached([piece("cut"), piece("shipped")], "cut")).toBe(true);
  expect(allReached([piece("cut"), piece("nested", { remakeOf: "piece-1" })], "cut")).toBe(false);
});
