import { describe, expect, it } from "vitest";
import { guessLayerRules } from "~/domain/parts";
import { readLayerName } from "~/domain/parts/layer-names";
import { drawingOf, drawn, rectangle } from "./drawn";

/** Names as the trade writes them, one layer per operation with the depth in the name (common practice, no source). */
describe("layer names", () => {
  it.each([
    ["OUTSIDE", "outside", null],
    ["Outside Profile", "outside", null],
    ["INSIDE", "cut-through", null],
    ["POCKET_D0.250IN", "pocket", { depth: 6.35 }],
    ["pocket 1/4in", "pocket", { depth: 6.35 }],
    ['POCKET_1/4"', "pocket", { depth: 6.35 }],
    ["POCKET_LEAVE_6MM", "pocket", { leave: 6 }],
    ["Pocket 6mm", "pocket", { depth: 6 }],
    ["POCKET", "pocket", null],
    ["SLOT_THRU", "cut-through", null],
    ["POCKET_THRU", "cut-through", null],
    ["DRILL_5_D13", "drill", { depth: 13 }],
    ["DRILL_5", "drill", null],
    ["CUP_35_D13", "drill", { depth: 13 }],
    ["ENGRAVE", "engrave", null],
    ["ENGRAVE_TEXT_D0.5", "engrave", { depth: 0.5 }],
    ["GRAIN", "set-aside", null],
    ["NOCUT", "set-aside", null],
    ["DO NOT CUT", "set-aside", null],
    ["DONOTCUT", "set-aside", null],
    ["NOPRINT_TEXT", "set-aside", null],
    ["Notes", "set-aside", null],
    ["PLY18-POCKET-INSIDE_10.0MM", "pocket", { depth: 10 }],
    ["9mmDEEP_INSIDE", "pocket", { depth: 9 }],
    ["DADO 6.35mm deep", "pocket", { depth: 6.35 }],
  ])("%s", (name, kind, depth) => {
    expect(readLayerName(name, 1)).toMatchObject({ kind, depth });
  });

  it.each(["0", "Layer 1", "PART D 18", "FLOOR_1", "PLY_18MM", "CUPBOARD", "HATCH", "Default", "D", "INSET"])(
    "%s says nothing",
    (name) => {
      expect(readLayerName(name, 1)).toBeNull();
    },
  );

  it("a full-length R12 name may end in the beginning of a word", () => {
    const name = "CABINET_LEFT_SIDE_BIRCH18_POCKE";
    expect(name).toHaveLength(31);
    expect(readLayerName(name, 1)).toMatchObject({ kind: "pocket" });
    expect(readLayerName("SIDE_POCKE", 1)).toBeNull();
  });

  it("a number without a unit is in inches where the file is", () => {
    const paths = [drawn(rectangle(0, 0, 9, 9), "POCKET_D0.25"), drawn(rectangle(20, 0, 9, 9), "0")];
    expect(guessLayerRules(drawingOf(paths, { declared: "in" }))).toEqual([
      { layer: "POCKET_D0.25", kind: "pocket", depth: { depth: 6.35 } },
    ]);
    expect(guessLayerRules(drawingOf(paths))).toEqual([
      { layer: "POCKET_D0.25", kind: "pocket", depth: { depth: 0.25 } },
    ]);
  });
});
