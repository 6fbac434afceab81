import { spawnSync } from "node:child_process";
import DxfParser from "dxf-parser";
import { describe, expect, it } from "vitest";
import { DAMAGE_NAMES, damagedDrawing } from "~/commands/drawings/damage";
import { generatedDrawing } from "~/commands/drawings/generated-drawing";
import { readDrawing, scaleDrawing } from "~/domain/drawing";
import { findParts } from "~/domain/parts";

const fuzz = (...given: string[]) =>
  spawnSync("node_modules/.bin/tsx", ["app/commands/fuzz.ts", ...given], { encoding: "utf8" });

describe("generated drawings", () => {
  const text = generatedDrawing(7, 100_000);

  it("are the same for a seed and as large as asked", () => {
    expect(text.length).toBeGreaterThanOrEqual(100_000);
    expect(generatedDrawing(7, 100_000)).toBe(text);
    expect(generatedDrawing(8, 100_000)).not.toBe(text);
  });

  it("are read as dxf-parser reads them, every panel a part", () => {
    const read = readDrawing(new TextEncoder().encode(text));
    if (!read.ok) throw new Error(read.reason);
    const entities = new DxfParser().parseSync(text)?.entities ?? [];
    const counts: Record<string, number> = {};
    for (const { type } of entities) counts[type] = (counts[type] ?? 0) + 1;
    expect(read.drawing.entities).toEqual(counts);
    const { parts, open } = findParts(scaleDrawing(read.drawing, "mm"), { layers: [] });
    expect(parts.reduce((sum, { quantity }) => sum + quantity, 0)).toBe(counts.TEXT);
    expect(open).toEqual([]);
  });
});

describe("damaged drawings", () => {
  it("are hurt in every way, differently for each seed and the same for one", () => {
    const made = Array.from({ length: 60 }, (_, seed) => damagedDrawing(seed));
    expect(new Set(made.map(({ damage }) => damage))).toEqual(new Set(DAMAGE_NAMES));
    expect(damagedDrawing(3)).toEqual(made[3]);
    expect(made[3].bytes).not.toEqual(made[4].bytes);
  });
});

describe("fuzz", () => {
  it("reads or refuses every damaged drawing, none hangs, throws or gives measures that are no numbers", () => {
    const { status, stdout, stderr } = fuzz("--runs", "200", "--seed", "50000", "--json");
    expect(stderr).toBe("");
    const { outcomes, damages, bad } = JSON.parse(stdout);
    expect(bad).toEqual([]);
    expect(outcomes.read + outcomes.refused).toBe(200);
    expect(Object.keys(damages)).toEqual(DAMAGE_NAMES);
    expect(status).toBe(0);
  }, 180_000);

  it("says in one sentence what it cannot use", () => {
    const { status, stdout, stderr } = fuzz("--runs", "many");
    expect({ status, stdout }).toEqual({ status: 2, stdout: "" });
    expect(stderr).toContain("whole numbers");
  });
});
