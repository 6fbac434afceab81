import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import makerjs from "makerjs";
import { afterAll, beforeAll, describe, expect, it } from "vitest";

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(path.join(tmpdir(), "inspect-"));
});
afterAll(() => rmSync(folder, { recursive: true }));

function inspect(...given: string[]) {
  const run = spawnSync("node_modules/.bin/tsx", ["app/commands/inspect.ts", ...given], { encoding: "utf8" });
  return { code: run.status, out: run.stdout, words: run.stderr };
}

/** A plate of 12 by 8 with one hole, inch or millimetres as the reader is told, twice, the second turned a quarter. */
function writePlates(): string {
  const plate: makerjs.IModel = {
    models: { outline: new makerjs.models.Rectangle(12, 8) },
    paths: { hole: new makerjs.paths.Circle([3, 2], 1) },
  };
  const turned = makerjs.model.move(makerjs.model.rotate(makerjs.cloneObject(plate), 90), [40, 0]);
  const file = path.join(folder, "plates.dxf");
  writeFileSync(
    file,
    makerjs.exporter.toDXF({ models: { plate, turned } }, { units: makerjs.unitType.Inch }),
  );
  return file;
}

describe("inspect", () => {
  it("prints one JSON document of what is in a drawing", () => {
    const { code, out } = inspect(writePlates(), "--units", "in", "--thickness", "17.1,17.7,18.1");
    expect(code).toBe(0);
    const found = JSON.parse(out);
    expect(found.units).toMatchObject({ used: "in", how: "told", question: null });
    expect(found.drawn).toMatchObject({
      curves: 10,
      loops: 4,
      depths: { 0: 2, 1: 2 },
      openChains: 0,
      branches: 0,
    });
    expect(found.drawn.lengthMm).toBeCloseTo(2 * (40 + 2 * Math.PI) * 25.4, 3);
    expect(found.totals).toMatchObject({ parts: 2, distinctParts: 1, holes: 2 });
    expect(found.parts).toHaveLength(1);
    const [part] = found.parts;
    expect(part).toMatchObject({ id: "A", quantity: 2, mirrorOf: null, holes: 1 });
    expect(part.areaMm2).toBeCloseTo((96 - Math.PI) * 25.4 ** 2, 2);
    expect(part.smallestRectMm[0]).toBeCloseTo(304.8, 6);
    expect(part.copies.map(({ copy }: { copy: number }) => copy)).toEqual([1, 2]);
    expect(part.operations.map(({ kind }: { kind: string }) => kind)).toEqual(["outside", "cut-through"]);
    expect(found.findings).toEqual([]);
  });

  it("refuses what cannot be used with 2, a sentence and nothing on standard output", () => {
    const text = path.join(folder, "letter.dxf");
    writeFileSync(text, "Dear shop,\nplease cut my parts.\n");
    for (const given of [[text], [path.join(folder, "absent.dxf")], [], [text, "--units", "yards"]]) {
      const { code, out, words } = inspect(...given);
      expect(code).toBe(2);
      expect(out).toBe("");
      expect(words.trim()).not.toBe("");
    }
  });
});
