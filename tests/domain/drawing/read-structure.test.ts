import { describe, expect, it } from "vitest";
import { type Drawing, scaleDrawing } from "~/domain/drawing";
import { pathBox, pointAt } from "~/domain/geometry";
import {
  circleEntity,
  DOWNWARD,
  dxf,
  type Groups,
  insertEntity,
  lineEntity,
  read,
  readEntities,
  totalLength,
} from "./dxf-text";

const centres = ({ paths }: Drawing) =>
  paths.flatMap(({ path }) =>
    path.curves.map((curve) => (curve.kind === "arc" ? [curve.centre.x, curve.centre.y] : [])),
  );
const near = (x: number, y: number) => [expect.closeTo(x, 9), expect.closeTo(y, 9)];

describe("blocks", () => {
  const hole = { name: "HOLE", entities: circleEntity(0, 0, 2) };

  it("places an array of 2 columns and 3 rows", () => {
    const entities = insertEntity("HOLE", 0, 0, [70, 2], [71, 3], [44, 100], [45, 50]);
    // DXF Reference, INSERT codes 70, 71, 44, 45.
    expect(centres(read(dxf({ blocks: [hole], entities })))).toEqual([
      near(0, 0),
      near(100, 0),
      near(0, 50),
      near(100, 50),
      near(0, 100),
      near(100, 100),
    ]);
  });

  it("subtracts the base, scales, turns and moves, in that order", () => {
    const block = { name: "B", base: [1, 1] as const, entities: circleEntity(3, 2, 0.5) };
    const entities = insertEntity("B", 10, 20, [41, 2], [42, -2], [50, 90]);
    // (3, 2) - (1, 1) = (2, 1); scaled (4, -2); turned a quarter (2, 4); moved (12, 24).
    const drawing = read(dxf({ blocks: [block], entities }));
    expect(centres(drawing)).toEqual([near(12, 24)]);
    expect(drawing.paths[0].path.curves[0]).toMatchObject({ kind: "arc", radius: expect.closeTo(1, 12) });
    expect(drawing.paths[0].source).toEqual({ type: "CIRCLE", entity: 0, block: "B" });
  });

  it("turns an insert over with its extrusion, and a circle into an ellipse under uneven scale", () => {
    const flipped = read(
      dxf({
        blocks: [{ name: "B", entities: circleEntity(3, 1, 1) }],
        entities: insertEntity("b", 10, 0, ...DOWNWARD),
      }),
    );
    expect(centres(flipped)).toEqual([near(-13, 1)]);
    const stretched = read(dxf({ blocks: [hole], entities: insertEntity("HOLE", 0, 0, [41, 2]) }));
    expect(pathBox(stretched.paths[0].path)).toMatchObject({
      maxX: expect.closeTo(4, 9),
      maxY: expect.closeTo(2, 9),
    });
  });

  it("nests blocks and mirrors within mirrors", () => {
    const inner = { name: "INNER", entities: circleEntity(1, 0, 0.25) };
    const outer = { name: "OUTER", entities: insertEntity("INNER", 10, 0, [41, -1]) };
    const drawing = read(dxf({ blocks: [outer, inner], entities: insertEntity("OUTER", 100, 0, [41, -1]) }));
    // 1 -> -1 + 10 = 9 -> -9 + 100 = 91.
    expect(centres(drawing)).toEqual([near(91, 0)]);
  });

  it("lists an insert of a block that is not there", () => {
    const { ignored } = readEntities(insertEntity("NOWHERE", 0, 0));
    expect(ignored).toEqual([{ type: "INSERT", layer: "0", count: 1, why: "damaged" }]);
  });

  it("keeps blocks with names the language itself uses", () => {
    const drawing = read(
      dxf({ blocks: [{ ...hole, name: "__proto__" }], entities: insertEntity("__proto__", 5, 5) }),
    );
    expect(centres(drawing)).toEqual([near(5, 5)]);
  });

  it("counts modelspace entities before blocks are expanded", () => {
    const drawing = read(
      dxf({ blocks: [hole], entities: [...insertEntity("HOLE", 0, 0), ...lineEntity(0, 0, 1, 0)] }),
    );
    expect(drawing.entities).toEqual({ INSERT: 1, LINE: 1 });
  });
});

describe("blocks that would never end", () => {
  const bomb = (levels: number) =>
    Array.from({ length: levels }, (_, level) => ({
      name: `L${level}`,
      entities:
        level === 0
          ? lineEntity(0, 0, 1, 0)
          : insertEntity(`L${level - 1}`, 0, 0, [70, 100], [71, 100], [44, 1], [45, 1]),
    }));

  it("leaves out an array of arrays, whole, and goes on", () => {
    const drawing = read(
      dxf({ blocks: bomb(10), entities: [...insertEntity("L9", 0, 0), ...lineEntity(0, 0, 5, 0)] }),
    );
    expect(drawing.ignored).toEqual([{ type: "INSERT", layer: "0", count: 1, why: "too-many" }]);
    expect(totalLength(drawing)).toBe(5);
  });

  it("counts a bomb without anything in it too", () => {
    const empty = bomb(10).map((block, level) => (level === 0 ? { ...block, entities: [] } : block));
    expect(read(dxf({ blocks: empty, entities: insertEntity("L9", 0, 0) })).ignored[0].why).toBe("too-many");
  });

  it("places an array that is large but not too large", () => {
    expect(read(dxf({ blocks: bomb(2), entities: insertEntity("L1", 0, 0) })).paths).toHaveLength(10_000);
  });

  it("stops at a block that holds itself, alone or in a ring", () => {
    const self = { name: "A", entities: [...circleEntity(0, 0, 1), ...insertEntity("A", 1, 0)] };
    const alone = read(dxf({ blocks: [self], entities: insertEntity("A", 0, 0) }));
    expect(alone.paths).toHaveLength(1);
    expect(alone.ignored).toEqual([{ type: "INSERT", layer: "0", count: 1, why: "too-deep" }]);
    const ring = ["A", "B", "C"].map((name, i) => ({
      name,
      entities: [...circleEntity(0, 0, 1), ...insertEntity(["B", "C", "A"][i], 1, 0)],
    }));
    const round = read(dxf({ blocks: ring, entities: insertEntity("A", 0, 0) }));
    expect(round.paths).toHaveLength(3);
    expect(round.ignored.map(({ why }) => why)).toEqual(["too-deep"]);
  });

  it("stops at a chain of thousands of blocks", () => {
    const chain = Array.from({ length: 5000 }, (_, i) => ({
      name: `C${i}`,
      entities: i === 0 ? circleEntity(0, 0, 1) : insertEntity(`C${i - 1}`, 1, 0),
    }));
    const drawing = read(dxf({ blocks: chain, entities: insertEntity("C4999", 0, 0) }));
    expect(drawing.ignored.map(({ why }) => why)).toEqual(["too-deep"]);
    const fair = read(dxf({ blocks: chain, entities: insertEntity("C20", 0, 0) }));
    expect(centres(fair)).toEqual([near(20, 0)]);
  });
});

describe("layers", () => {
  const layers: Groups[] = [
    [
      [2, "Cut"],
      [70, 0],
      [62, 7],
    ],
    [
      [2, "Off"],
      [70, 0],
      [62, -3],
    ],
    [
      [2, "Frozen"],
      [70, 1],
      [62, 3],
    ],
    [
      [2, "Locked"],
      [70, 4],
      [62, 3],
    ],
  ];

  it("marks what is on layers that are off or frozen", () => {
    const names = ["CUT", "off", "Frozen", "Locked", "Undeclared"];
    const drawing = read(dxf({ layers, entities: names.flatMap((name, i) => lineEntity(0, i, 1, i, name)) }));
    expect(drawing.paths.map(({ layer, hidden }) => [layer, hidden])).toEqual([
      ["Cut", false],
      ["Off", true],
      ["Frozen", true],
      ["Locked", false],
      ["Undeclared", false],
    ]);
    expect(drawing.layers).toContainEqual({ name: "Off", hidden: true, count: 1 });
  });

  it("gives things on layer 0 of a block the insert's layer, and hides all of an insert on a frozen one", () => {
    const block = { name: "B", entities: [...lineEntity(0, 0, 1, 0, "0"), ...lineEntity(0, 1, 1, 1, "Cut")] };
    const on = (layer: string) =>
      read(
        dxf({
          layers,
          blocks: [block],
          entities: [
            [0, "INSERT"],
            [8, layer],
            [2, "B"],
            [10, 0],
            [20, 0],
          ],
        }),
      ).paths.map(({ layer: name, hidden }) => [name, hidden]);
    expect(on("Cut")).toEqual([
      ["Cut", false],
      ["Cut", false],
    ]);
    expect(on("Off")).toEqual([
      ["Off", true],
      ["Cut", false],
    ]);
    expect(on("Frozen")).toEqual([
      ["Frozen", true],
      ["Cut", true],
    ]);
  });

  it("lists what is on paper, and keeps texts", () => {
    const text: Groups = [
      [0, "TEXT"],
      [8, "Notes"],
      [10, 3],
      [20, 4],
      [40, 2.5],
      [1, "%%c35 \\U+00E9t\\U+00E9"],
    ];
    const paragraphs: Groups = [
      [0, "MTEXT"],
      [8, "Notes"],
      [10, 0],
      [20, 0],
      [40, 5],
      [3, "{\\fArial|b0;Side "],
      [1, "left}\\P2 off"],
    ];
    const drawing = readEntities([...lineEntity(0, 0, 1, 0), [67, 1]], text, paragraphs, [
      [0, "HATCH"],
      [8, "Notes"],
    ]);
    expect(drawing.paths).toEqual([]);
    expect(drawing.texts).toEqual([
      { text: "⌀35 été", at: { x: 3, y: 4 }, height: 2.5, layer: "Notes" },
      { text: "Side left\n2 off", at: { x: 0, y: 0 }, height: 5, layer: "Notes" },
    ]);
    expect(drawing.ignored).toEqual([
      { type: "TEXT", layer: "Notes", count: 1, why: "not-a-curve" },
      { type: "MTEXT", layer: "Notes", count: 1, why: "not-a-curve" },
      { type: "HATCH", layer: "Notes", count: 1, why: "not-a-curve" },
      { type: "LINE", layer: "0", count: 1, why: "paper-space" },
    ]);
  });
});

describe("letters", () => {
  const named = (layer: Uint8Array, header: Groups) => {
    const [before, after] = dxf({ header, entities: lineEntity(0, 0, 1, 0, "#") }).split("#");
    return new Uint8Array([
      ...new TextEncoder().encode(before),
      ...layer,
      ...new TextEncoder().encode(after),
    ]);
  };

  it("reads the code page the header names, and UTF-8 from 2007 on", () => {
    // Windows-1251 writes "Рез" as D0 E5 E7.
    const cyrillic = named(new Uint8Array([0xd0, 0xe5, 0xe7]), [
      [9, "$ACADVER"],
      [1, "AC1015"],
      [9, "$DWGCODEPAGE"],
      [3, "ANSI_1251"],
    ]);
    expect(read(cyrillic).paths[0].layer).toBe("Рез");
    expect(read(cyrillic).notes).toEqual([]);
    const modern = named(new TextEncoder().encode("Découpe"), [
      [9, "$ACADVER"],
      [1, "AC1027"],
      [9, "$DWGCODEPAGE"],
      [3, "ANSI_1252"],
    ]);
    expect(read(modern).paths[0].layer).toBe("Découpe");
  });

  it("says which letters it assumed", () => {
    const latin = read(named(new Uint8Array([0x44, 0xe9]), []));
    expect(latin.paths[0].layer).toBe("Dé");
    expect(latin.notes).toEqual([
      "The file does not say how its letters are coded; windows-1252 was assumed.",
    ]);
  });

  it("takes a byte order mark and any line ends", () => {
    const text = dxf({ entities: lineEntity(0, 0, 3, 4) });
    for (const written of [
      `\ufeff${text}`,
      text.replaceAll("\n", "\r\n"),
      text.replaceAll("\n", "\r"),
      `\n\n${text}`,
    ]) {
      expect(totalLength(read(written))).toBe(5);
      expect(read(written).notes).toEqual([]);
    }
  });
});

describe("scaling to millimetres", () => {
  it("grows curves and texts by the unit, once", () => {
    const text: Groups = [
      [0, "TEXT"],
      [8, "0"],
      [10, 1],
      [20, 2],
      [40, 0.5],
      [1, "A"],
    ];
    const inches = readEntities(circleEntity(1, 2, 3), text);
    const drawing = scaleDrawing(inches, "in");
    expect(drawing.unit).toBe("mm");
    expect(centres(drawing)).toEqual([near(25.4, 50.8)]);
    expect(totalLength(drawing)).toBeCloseTo(6 * Math.PI * 25.4, 9);
    expect(drawing.texts[0]).toMatchObject({ at: { x: 25.4, y: 50.8 }, height: 12.7 });
    expect(scaleDrawing(drawing, "in")).toBe(drawing);
    expect(pointAt(scaleDrawing(inches, "mm").paths[0].path.curves[0], 0)).toEqual({ x: 4, y: 2 });
  });
});
