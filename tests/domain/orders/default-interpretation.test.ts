import { describe, expect, test } from "vitest";
import { type Interpretation, interpretationSchema, interpretFiles, type LayerChoice } from "~/domain/orders";

const sha = (digit: string) => digit.repeat(64);
const rule = (layer: string, kind: LayerChoice["kind"]): LayerChoice => ({ layer, kind, depth: null });
const chosen: Interpretation = {
  files: [
    { sha256: sha("a"), unit: "in", layers: [rule("CUT", "engrave")], materialId: "m", lotId: null, sets: 4 },
    { sha256: sha("b"), unit: "mm", layers: [], materialId: "m", lotId: null, sets: 2 },
  ],
  parts: [
    { sha256: sha("a"), letter: "A", name: "Side", grain: "along-y" },
    { sha256: sha("b"), letter: "A", name: "Gone", grain: "free" },
  ],
  sanding: "arrises",
  leaveTabs: true,
};

describe("interpretation of files", () => {
  test("before anything is chosen, unit and stock are open and layers are as supposed, the later supposition first", () => {
    const fresh = interpretFiles(
      [
        {
          sha256: sha("a"),
          supposed: [rule("CUT", "outside"), rule("DOTS", "drill"), rule("CUT", "cut-through")],
        },
      ],
      undefined,
    );
    expect(fresh).toEqual({
      files: [
        {
          sha256: sha("a"),
          unit: null,
          layers: [rule("CUT", "cut-through"), rule("DOTS", "drill")],
          materialId: null,
          lotId: null,
          sets: 1,
        },
      ],
      parts: [],
      sanding: "none",
      leaveTabs: false,
    });
    expect(interpretationSchema.parse(fresh)).toEqual(fresh);
  });

  test("what was chosen stands over what is supposed, and a new file joins with defaults", () => {
    const both = interpretFiles(
      [
        { sha256: sha("a"), supposed: [rule("CUT", "outside"), rule("DOTS", "drill")] },
        { sha256: sha("c"), supposed: [] },
      ],
      chosen,
    );
    expect(both.files).toEqual([
      { ...chosen.files[0], layers: [rule("CUT", "engrave"), rule("DOTS", "drill")] },
      { sha256: sha("c"), unit: null, layers: [], materialId: null, lotId: null, sets: 1 },
    ]);
    expect(both).toMatchObject({ sanding: "arrises", leaveTabs: true });
  });

  test("of a file that is gone nothing is left", () => {
    const left = interpretFiles([{ sha256: sha("a"), supposed: [] }], chosen);
    expect(left.files.map(({ sha256 }) => sha256)).toEqual([sha("a")]);
    expect(left.parts).toEqual([chosen.parts[0]]);
  });
});
