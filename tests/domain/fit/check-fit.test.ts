import { describe, expect, it } from "vitest";
import type { DrawnPath } from "~/domain/drawing";
import { checkFit, DEFAULT_LIMITS, type FitInput } from "~/domain/fit";
import { findParts } from "~/domain/parts";
import { drawingOf, drawn, hole, line, rectangle, ring } from "../parts/drawn";

/** 18 mm birch as a mill's data sheet gives it: 17.1 to 18.1 mm. A metric 4 × 8 ft sheet. */
const stock: FitInput["stock"] = {
  thickness: { min: 17.1, mean: 17.7, max: 18.1 },
  sheet: { width: 2440, height: 1220 },
  margin: 10,
};
const tools = { smallestDiameter: 6.35 };

const check = (paths: readonly DrawnPath[], rest: Partial<FitInput> = {}) =>
  checkFit({ report: findParts(drawingOf(paths), { layers: [] }), stock, tools, ...rest });
const summary = (paths: readonly DrawnPath[], rest: Partial<FitInput> = {}) =>
  check(paths, rest).map(({ code, severity }) => `${severity} ${code}`);

const panel = drawn(rectangle(0, 0, 600, 400));

describe("a correct drawing", () => {
  it("has no findings", () => {
    const cabinetSide = [
      panel,
      drawn(rectangle(50, 50, 18.3, 120)),
      drawn(rectangle(300, 50, 120, 80), "POCKET_D6"),
      drawn(hole(500, 100, 35), "CUP_35_D13"),
      ...[50, 82, 114].map((y) => drawn(hole(200, y, 5), "DRILL_5_D13")),
      line(300, 300, 400, 300, "ENGRAVE"),
    ];
    expect(summary(cabinetSide)).toEqual([]);
  });
});

describe("open outlines", () => {
  const openBy = (gap: number) => [
    drawn({
      closed: false,
      curves: ring([
        [700, 0],
        [800, 0],
        [800, 100],
        [700, 100],
      ]).curves.slice(0, 3),
    }),
    line(700, 100, 700, gap),
  ];

  it("one that nearly closes stops and says by how much", () => {
    const [finding] = check([panel, ...openBy(0.8)]);
    expect(finding).toMatchObject({ code: "open-outline", severity: "stop", remedy: "close-gap", limit: 2 });
    expect(finding.measured).toBeCloseTo(0.8, 9);
    expect(finding.words).toContain("0.80");
  });

  it("a bridged gap is a note, a wider one asked", () => {
    expect(summary([panel, ...openBy(0.15)])).toEqual(["note part-held-by-tabs", "note bridged-gap"]);
    expect(summary([panel, ...openBy(0.4)])).toEqual(["ask bridged-gap", "note part-held-by-tabs"]);
  });

  it("loose lines are asked, many at once", () => {
    expect(summary([panel, line(0, 500, 90, 500)])).toEqual(["ask open-outline"]);
    const hatch = Array.from({ length: 30 }, (_, i) => line(700 + i * 5, 0, 700 + i * 5, 80));
    const findings = check([panel, ...hatch]);
    expect(findings).toMatchObject([{ code: "open-outline", measured: 2400 }]);
    expect(findings[0].words).toContain("30 lines");
  });
});

describe("doubled lines", () => {
  it("are noted with their number", () => {
    expect(check([panel, panel])).toMatchObject([{ code: "doubled-lines", severity: "note", measured: 1 }]);
  });
});

describe("outlines that lie on each other", () => {
  it("are noted with how much is cut once", () => {
    const neighbour = drawn(rectangle(600, 100, 500, 200));
    expect(check([panel, neighbour])).toMatchObject([
      {
        code: "overlapping-lines",
        severity: "note",
        measured: 200,
        at: { x: 600, y: expect.closeTo(200, 9) },
      },
    ]);
  });
});

describe("outlines that cross", () => {
  it("are asked with the place, those that only touch are not", () => {
    const askew = drawn(rectangle(500, 300, 400, 300));
    expect(check([panel, askew])).toMatchObject([{ code: "crossing-outlines", severity: "ask" }]);
    const bow = drawn(
      ring([
        [0, 0],
        [600, 400],
        [600, 0],
        [0, 300],
      ]),
    );
    const [crossing] = check([bow]);
    // y = 2x/3 meets y = 300 - x/2 at x = 1800/7.
    expect(crossing).toMatchObject({ code: "crossing-outlines", severity: "ask" });
    expect(crossing.at?.x).toBeCloseTo(1800 / 7, 9);
    expect(crossing.at?.y).toBeCloseTo(1200 / 7, 9);
    const inner = drawn(hole(300, 200, 400));
    expect(summary([panel, inner])).toEqual([]);
  });
});

describe("parts that are nearly equal", () => {
  it("are pointed out with their difference, larger ones and mirrored twins are not", () => {
    const near = check([panel, drawn(rectangle(1000, 0, 600.3, 400))]);
    expect(near).toMatchObject([{ code: "near-equal-parts", severity: "note", part: "B" }]);
    // Laid middle on middle each end stands out by half of 0.3 mm.
    expect(near[0].measured).toBeGreaterThan(0.13);
    expect(near[0].measured).toBeLessThanOrEqual(0.3);
    expect(summary([panel, drawn(rectangle(1000, 0, 602, 400))])).toEqual([]);
  });
});

describe("copies and sets", () => {
  it("are asked where both multiply", () => {
    const twice = [panel, drawn(rectangle(1000, 0, 600, 400))];
    expect(check(twice, { sets: 3 })).toMatchObject([
      { code: "copies-times-quantity", severity: "ask", measured: 6 },
    ]);
    expect(summary(twice)).toEqual([]);
    expect(summary([panel], { sets: 3 })).toEqual([]);
  });
});

describe("size", () => {
  it("a part stops only when it goes on the sheet at no angle", () => {
    expect(summary([drawn(rectangle(0, 0, 2420, 1200))])).toEqual([]);
    expect(summary([drawn(rectangle(0, 0, 1200, 2420))])).toEqual([]);
    expect(summary([drawn(rectangle(0, 0, 2421, 1200))])).toEqual(["stop part-larger-than-sheet"]);
    // A strip longer than the sheet lies askew: 2500 long, 40 wide on 2420 × 1200 (diagonal 2701).
    expect(summary([drawn(rectangle(0, 0, 2500, 40))])).toEqual(["note part-held-by-tabs"]);
    expect(summary([drawn(rectangle(0, 0, 2700, 40))])).toEqual([
      "stop part-larger-than-sheet",
      "note part-held-by-tabs",
    ]);
  });

  it("a part is asked that is hard to hold", () => {
    expect(check([drawn(rectangle(0, 0, 300, 38))])).toMatchObject([
      { code: "part-too-small-to-hold", severity: "ask", measured: 38, limit: DEFAULT_LIMITS.narrowestPart },
    ]);
    expect(summary([drawn(rectangle(0, 0, 75, 75))])).toEqual(["ask part-too-small-to-hold"]);
    expect(summary([drawn(rectangle(0, 0, 80, 80))])).toEqual(["note part-held-by-tabs"]);
  });

  it("a part that vacuum alone does not hold is noted", () => {
    // 36 in² and 100 mm: common practice, no source.
    expect(check([drawn(rectangle(0, 0, 180, 110))])).toMatchObject([
      { code: "part-held-by-tabs", severity: "note", measured: 19_800, limit: 36 * 25.4 ** 2 },
    ]);
    expect(check([drawn(rectangle(0, 0, 400, 99))])).toMatchObject([
      { code: "part-held-by-tabs", measured: 99, limit: 100 },
    ]);
    expect(summary([drawn(rectangle(0, 0, 240, 100))])).toEqual([]);
  });

  it("parts under half an inch or over twenty feet make the unit doubtful", () => {
    expect(summary([drawn(rectangle(0, 0, 12, 8))])).toContain("ask unit-implausible");
    expect(summary([drawn(rectangle(0, 0, 6100, 600))])).toContain("ask unit-implausible");
    expect(summary([drawn(rectangle(0, 0, 1830, 600))])).toEqual([]);
  });
});

describe("openings and the smallest tool", () => {
  const opened = (width: number) => [panel, drawn(rectangle(100, 100, 120, width))];

  it("stop where it does not enter, are asked where it only just does", () => {
    const [finding] = check(opened(6));
    expect(finding).toMatchObject({ code: "opening-narrower-than-tool", severity: "stop", part: "A" });
    expect(finding.measured).toBeCloseTo(6, 1);
    expect(finding.limit).toBeCloseTo(6.35 + 0.254, 9);
    expect(summary(opened(6.4))).toEqual(["ask opening-narrower-than-tool"]);
    expect(summary(opened(6.7))).toEqual([]);
  });

  it("are measured where they are widest", () => {
    // A keyhole: 4 mm slot below a 20 mm square.
    const keyhole = ring([
      [100, 100],
      [104, 100],
      [104, 140],
      [112, 140],
      [112, 160],
      [92, 160],
      [92, 140],
      [100, 140],
    ]);
    expect(summary([panel, drawn(keyhole)])).toEqual([]);
    // An L of two 5 mm arms fills a wide rectangle and yet is entered nowhere.
    const angle = ring([
      [100, 100],
      [180, 100],
      [180, 105],
      [105, 105],
      [105, 180],
      [100, 180],
    ]);
    expect(summary([panel, drawn(angle)])).toEqual(["stop opening-narrower-than-tool"]);
  });

  it("round holes are asked: a drill may make them; a drill's own size is drilled", () => {
    expect(summary([panel, drawn(hole(100, 100, 4.5))])).toEqual(["ask opening-narrower-than-tool"]);
    expect(summary([panel, drawn(hole(100, 100, 5))])).toEqual([]);
    const faceted = ring(
      Array.from({ length: 12 }, (_, i) => [
        100 + 2 * Math.cos((i * Math.PI) / 6),
        100 + 2 * Math.sin((i * Math.PI) / 6),
      ]),
    );
    expect(summary([panel, drawn(faceted)])).toEqual(["ask opening-narrower-than-tool"]);
  });
});

describe("pockets in the stock as measured", () => {
  const pocketed = (layer: string) => [panel, drawn(rectangle(100, 100, 120, 80), layer)];

  it("stop where they come through at its thinnest", () => {
    expect(check(pocketed("POCKET_D17.2"))).toMatchObject([
      { code: "pocket-deeper-than-stock", severity: "stop", measured: 17.2, limit: 17.1 },
    ]);
    expect(summary(pocketed("POCKET_LEAVE_19MM"))).toEqual(["stop pocket-deeper-than-stock"]);
  });

  it("stop on a floor under 0.10 in, ask under 0.25 in", () => {
    const [stopped] = check(pocketed("POCKET_D15"));
    expect(stopped).toMatchObject({ code: "thin-floor", severity: "stop", limit: 2.54 });
    expect(stopped.measured).toBeCloseTo(2.1, 9);
    expect(summary(pocketed("POCKET_D12"))).toEqual(["ask thin-floor"]);
    expect(summary(pocketed("POCKET_D10"))).toEqual([]);
    expect(summary(pocketed("POCKET_LEAVE_6MM"))).toEqual(["ask thin-floor"]);
    expect(summary(pocketed("POCKET_LEAVE_6.5MM"))).toEqual([]);
  });

  it("hinge cups have their own floor", () => {
    const cup = (depth: string) => [panel, drawn(hole(100, 100, 35), `CUP_35_${depth}`)];
    expect(summary(cup("D13"))).toEqual([]);
    expect(summary(cup("D14.5"))).toEqual(["ask thin-floor"]);
    expect(summary(cup("D16"))).toEqual(["stop thin-floor"]);
  });

  it("without a depth are asked", () => {
    expect(summary(pocketed("POCKET"))).toEqual(["ask pocket-depth-unknown"]);
  });
});

describe("a rectangle that only might be a frame", () => {
  it("is asked and stays", () => {
    const inside = [
      drawn(rectangle(0, 0, 900, 700)),
      drawn(rectangle(20, 20, 800, 600)),
      drawn(rectangle(100, 100, 90, 90)),
    ];
    expect(summary(inside)).toEqual(["ask possible-frame", "note part-held-by-tabs"]);
  });
});

describe("thresholds and units", () => {
  it("are settings", () => {
    expect(
      summary([drawn(rectangle(0, 0, 300, 38))], {
        limits: { narrowestPart: 30, smallestPartArea: 0, tabbedPartArea: 0, tabbedPartWidth: 30 },
      }),
    ).toEqual([]);
  });

  it("lengths are written in the viewer's unit", () => {
    const [finding] = check([drawn(rectangle(0, 0, 2540, 1270))], { shown: "in" });
    expect(finding.words).toContain("100.000\u2009in by 50.000\u2009in");
  });

  it("what stops comes first", () => {
    const severities = check([panel, panel, drawn(hole(50, 50, 4.5)), drawn(rectangle(100, 100, 90, 5))]).map(
      ({ severity }) => severity,
    );
    expect(severities).toEqual(["stop", "ask", "note"]);
  });
});
