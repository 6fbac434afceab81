import * as fc from "fast-check";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { readDrawing, writeDxf } from "~/domain/drawing";
import type { Curve } from "~/domain/geometry";
import {
  bytesOf,
  circleEntity,
  dxf,
  type Groups,
  insertEntity,
  lightPolyline,
  lineEntity,
  lines,
  read,
  readEntities,
  totalLength,
} from "./dxf-text";

/** The same cases in every run. */
fc.configureGlobal({ seed: 20260101 });

/** Everything the reader knows, so that damage can strike anywhere. */
const everything = dxf({
  header: [
    [9, "$ACADVER"],
    [1, "AC1015"],
    [9, "$INSUNITS"],
    [70, 4],
  ],
  layers: [
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
  ],
  blocks: [{ name: "HOLE", entities: circleEntity(0, 0, 2) }],
  entities: [
    ...lineEntity(0, 0, 100, 0, "Cut"),
    ...circleEntity(50, 50, 5),
    ...lightPolyline([
      [0, 0, 0.5],
      [10, 0],
      [10, 10],
    ]),
    [0, "ARC"],
    [8, "Cut"],
    [10, 5],
    [20, 5],
    [40, 2],
    [50, 350],
    [51, 20],
    [0, "POLYLINE"],
    [8, "Cut"],
    [66, 1],
    [70, 1],
    ...[
      [0, 0],
      [30, 0],
      [30, 20],
    ].flatMap(
      ([x, y]): Groups => [
        [0, "VERTEX"],
        [8, "Cut"],
        [10, x],
        [20, y],
      ],
    ),
    [0, "SEQEND"],
    [0, "ELLIPSE"],
    [8, "Off"],
    [10, 0],
    [20, 0],
    [11, 10],
    [21, 0],
    [40, 0.5],
    [41, 0],
    [42, 3],
    [0, "SPLINE"],
    [8, "Cut"],
    [70, 8],
    [71, 2],
    ...[0, 0, 0, 1, 1, 1].map((knot) => [40, knot] as const),
    ...[
      [0, 0],
      [5, 9],
      [10, 0],
    ].flatMap(
      ([x, y]): Groups => [
        [10, x],
        [20, y],
        [30, 0],
      ],
    ),
    ...insertEntity("HOLE", 10, 10, [70, 3], [44, 20]),
    [0, "TEXT"],
    [8, "Cut"],
    [10, 0],
    [20, 0],
    [40, 3],
    [1, "SIDE"],
  ],
});

const spoken: unknown[] = [];
beforeEach(() => {
  for (const channel of ["log", "info", "warn", "debug"] as const) {
    vi.spyOn(console, channel).mockImplementation((...words) => {
      spoken.push(words);
    });
  }
});
afterEach(() => {
  vi.restoreAllMocks();
  expect(spoken.splice(0), "the reader must keep quiet").toEqual([]);
});

describe("a file cut short", () => {
  it("is read as far as it goes and says so, at every fiftieth", () => {
    const whole = read(everything);
    let before = 0;
    for (let i = 1; i < 50; i++) {
      const result = readDrawing(bytesOf(everything.slice(0, Math.floor((everything.length * i) / 50))));
      if (!result.ok) throw new Error(result.reason);
      expect(result.drawing.notes.join(" ")).toMatch(/cut short|end mark is missing/);
      expect(result.drawing.paths.length).toBeGreaterThanOrEqual(before);
      expect(result.drawing.paths.length).toBeLessThanOrEqual(whole.paths.length);
      before = result.drawing.paths.length;
    }
    expect(before).toBeGreaterThan(whole.paths.length / 2);
  });

  it("never takes half a number for a whole one, wherever the cut falls", () => {
    const text = dxf({ entities: lineEntity(0, 0, 12345.678, 0) });
    for (let end = text.indexOf("ENTITIES") + 9; end < text.length; end++) {
      const { paths } = read(text.slice(0, end));
      for (const { path } of paths)
        expect(path.curves).toEqual([{ kind: "line", from: { x: 0, y: 0 }, to: { x: 12345.678, y: 0 } }]);
    }
  });

  it("leaves a cut outline open", () => {
    const outline = dxf({
      entities: lightPolyline([
        [0, 0],
        [10, 0],
        [10, 10],
        [0, 10],
      ]),
    });
    const cut = outline.slice(0, outline.lastIndexOf("10\n0\n20\n10\n"));
    const { paths, notes } = read(cut);
    expect(paths[0].path.closed).toBe(false);
    expect(paths[0].path.curves).toHaveLength(2);
    expect(notes).toEqual([
      "The file is cut short: it was read as far as it goes, and what came after is missing.",
    ]);
  });

  it("says that only the end mark is missing when it is", () => {
    const { notes, paths } = read(everything.replace("0\nEOF\n", ""));
    expect(notes).toEqual(["The file's end mark is missing; everything drawn was read."]);
    expect(paths).toEqual(read(everything).paths);
  });
});

describe("missing and foreign marks", () => {
  it("needs no ENDSEC, ENDTAB, ENDBLK or SEQEND", () => {
    const whole = read(everything);
    for (const mark of ["ENDSEC", "ENDTAB", "ENDBLK", "SEQEND"]) {
      const without = read(everything.replaceAll(`0\n${mark}\n`, ""));
      expect(without.paths).toEqual(whole.paths);
      expect(without.layers).toEqual(whole.layers);
    }
  });

  it("reads layers round records that do not belong there", () => {
    const text = everything.replace(
      "0\nENDTAB\n",
      "0\nVPORT\n2\n*ACTIVE\n12\n5\n22\n5\n0\nLAYER\n2\nLate\n62\n-1\n",
    );
    expect(read(text).layers).toContainEqual({ name: "Late", hidden: true, count: 0 });
  });

  it("believes no vertex count", () => {
    for (const count of ["1000000000", "-5", "0", "x"]) {
      expect(read(everything.replace("90\n3\n", `90\n${count}\n`)).paths).toEqual(read(everything).paths);
    }
  });

  it("drops comments wherever they stand, and unknown codes", () => {
    const written = everything.trimEnd().split("\n");
    const commented = written
      .flatMap((line, i) => {
        if (i % 2 === 1) return [line];
        if (line === "20") return ["999", "a comment", line];
        return line === "8" ? ["290", "2", "777", "x", line] : [line];
      })
      .join("\n");
    expect(read(commented).paths).toEqual(read(everything).paths);
  });

  it("passes over lines out of step and says how many", () => {
    const { paths, notes } = read(everything.replace("0\nCIRCLE\n", "0\nCIRCLE\nstray words\n"));
    expect(paths).toEqual(read(everything).paths);
    expect(notes).toEqual(["1 lines out of step were passed over."]);
  });

  it("reads a file of nothing but entities, and one of nothing", () => {
    const bare = lines([
      [0, "SECTION"],
      [2, "ENTITIES"],
      ...lineEntity(0, 0, 3, 4),
      [0, "ENDSEC"],
      [0, "EOF"],
    ]);
    expect(totalLength(read(bare))).toBe(5);
    expect(
      read(
        lines([
          [0, "SECTION"],
          [2, "HEADER"],
          [0, "ENDSEC"],
          [0, "EOF"],
        ]),
      ).notes,
    ).toEqual(["The file has no section of drawn entities."]);
  });
});

describe("numbers", () => {
  it.each([
    "nan",
    "NaN",
    "inf",
    "Infinity",
    "-Infinity",
    "1e400",
    "1e300",
    "",
    "abc",
    "0x10",
    "1,2,3",
    "1.5.2",
  ])("lists an entity with the number %j as damaged", (text) => {
    const drawing = readEntities(
      [
        [0, "LINE"],
        [8, "Cut"],
        [10, text],
        [20, 0],
        [11, 5],
        [21, 0],
      ],
      lineEntity(0, 0, 1, 0),
    );
    expect(drawing.ignored).toEqual([{ type: "LINE", layer: "Cut", count: 1, why: "damaged" }]);
    expect(totalLength(drawing)).toBe(1);
  });

  it("mends a decimal comma and a Fortran exponent, and says so", () => {
    const drawing = readEntities(
      [
        [0, "LINE"],
        [8, "0"],
        [10, "0,5"],
        [20, 0],
        [11, "2,75"],
        [21, 0],
      ],
      [
        [0, "LINE"],
        [8, "0"],
        [10, 0],
        [20, 0],
        [11, "1.5D+2"],
        [21, "0.0d0"],
      ],
    );
    expect(totalLength(drawing)).toBe(152.25);
    expect(drawing.notes).toEqual([
      "Numbers of 2 entities were written with a comma or the letter D and were mended.",
    ]);
  });

  it("lists an insert whose scales throw it out of reach", () => {
    const chain = Array.from({ length: 30 }, (_, i) => ({
      name: `C${i}`,
      entities: i === 0 ? circleEntity(1, 1, 1) : insertEntity(`C${i - 1}`, 0, 0, [41, 1e10], [42, 1e10]),
    }));
    const drawing = read(dxf({ blocks: chain, entities: insertEntity("C29", 0, 0) }));
    expect(drawing.paths).toEqual([]);
    expect(drawing.ignored).toEqual([{ type: "INSERT", layer: "0", count: 1, why: "damaged" }]);
  });

  it("lists what lacks a number, has no size or no vertices", () => {
    const drawing = readEntities(
      [
        [0, "LINE"],
        [8, "0"],
        [10, 1],
        [20, 1],
        [11, 4],
      ],
      circleEntity(0, 0, 0),
      circleEntity(0, 0, -3),
      lightPolyline([]),
      [
        [0, "POLYLINE"],
        [8, "0"],
        [70, 1],
        [0, "SEQEND"],
      ],
      [
        [0, "VERTEX"],
        [8, "0"],
        [10, 1],
        [20, 1],
      ],
      lineEntity(2, 2, 2, 2),
    );
    expect(drawing.paths).toEqual([]);
    expect(
      Object.fromEntries(drawing.ignored.map(({ type, count, why }) => [`${type} ${why}`, count])),
    ).toEqual({
      "LINE damaged": 1,
      "LINE not-a-curve": 1,
      "CIRCLE damaged": 2,
      "LWPOLYLINE damaged": 1,
      "POLYLINE damaged": 1,
      "VERTEX not-a-curve": 1,
    });
  });
});

describe("any damage", () => {
  const groups = everything.trimEnd().split("\n");

  it("neither throws, hangs nor speaks: lines lost, doubled, swapped or overwritten", () => {
    const anyLine = fc.nat({ max: groups.length - 1 });
    const blow = fc.oneof(
      fc.record({ act: fc.constantFrom("drop", "double", "swap"), at: anyLine, text: fc.constant("") }),
      fc.record({
        act: fc.constant("write"),
        at: anyLine,
        text: fc.oneof(
          fc.constantFrom(
            "0",
            "10",
            "SECTION",
            "ENDSEC",
            "EOF",
            "POLYLINE",
            "1e9",
            "-1",
            "999999999",
            "",
            "NaN",
          ),
          fc.string(),
        ),
      }),
    );
    fc.assert(
      fc.property(fc.array(blow, { minLength: 1, maxLength: 6 }), (blows) => {
        const damaged = [...groups];
        for (const { act, at, text } of blows) {
          if (act === "drop") damaged.splice(at, 1);
          else if (act === "double") damaged.splice(at, 0, damaged[at] ?? "");
          else if (act === "swap")
            [damaged[at], damaged[at + 1]] = [damaged[at + 1] ?? "", damaged[at] ?? ""];
          else damaged[at] = text;
        }
        const result = readDrawing(bytesOf(damaged.join("\n")));
        if (!result.ok) return expect(result.reason).toMatch(/\.$/);
        for (const { path } of result.drawing.paths) expect(path.curves.every(isSound)).toBe(true);
        return undefined;
      }),
      { numRuns: 1000 },
    );
  });

  it("neither throws nor hangs on any bytes after an opening", () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 400 }), (noise) => {
        const opening = bytesOf("0\nSECTION\n2\nENTITIES\n0\nLWPOLYLINE\n90\n1000000000\n");
        expect(readDrawing(new Uint8Array([...opening, ...noise])).ok).toBe(true);
      }),
      { numRuns: 500 },
    );
  });
});

const isSound = (curve: Curve): boolean => {
  const numbers = JSON.stringify(curve);
  return !numbers.includes("null,") && !/NaN|Infinity/.test(numbers);
};

describe("large files", () => {
  it("are read whole", () => {
    const count = 160_000;
    const curves = Array.from(
      { length: count },
      (_, i): Curve => ({ kind: "line", from: { x: i, y: i % 7 }, to: { x: i + 1, y: (i + 1) % 7 } }),
    );
    const drawing = read(bytesOf(writeDxf([{ layer: "CUT", path: { closed: false, curves } }], "mm")));
    expect(drawing.paths.reduce((sum, { path }) => sum + path.curves.length, 0)).toBe(count);
  });
});
