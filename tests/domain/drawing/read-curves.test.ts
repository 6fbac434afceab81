import { describe, expect, it } from "vitest";
import type { Drawing } from "~/domain/drawing";
import { type Curve, curveBox, endOf, pathArea, pathBox, pointAt, startOf } from "~/domain/geometry";
import {
  circleEntity,
  DOWNWARD,
  dxf,
  type Groups,
  lightPolyline,
  lineEntity,
  read,
  readEntities,
  totalLength,
} from "./dxf-text";

const onlyCurve = (drawing: Drawing): Curve => {
  expect(drawing.ignored).toEqual([]);
  expect(drawing.paths).toHaveLength(1);
  expect(drawing.paths[0].path.curves).toHaveLength(1);
  return drawing.paths[0].path.curves[0];
};
const near = (x: number, y: number, digits = 9) => ({
  x: expect.closeTo(x, digits),
  y: expect.closeTo(y, digits),
});

const QUARTER_BULGE = 0.41421356;

describe("lines, arcs and circles", () => {
  it("reads a line in either order of its codes", () => {
    expect(onlyCurve(readEntities(lineEntity(1, 2, 4, 6)))).toEqual({
      kind: "line",
      from: { x: 1, y: 2 },
      to: { x: 4, y: 6 },
    });
    const mixed: Groups = [
      [0, "LINE"],
      [8, "0"],
      [10, 1],
      [11, 4],
      [20, 2],
      [21, 6],
    ];
    expect(onlyCurve(readEntities(mixed))).toEqual({
      kind: "line",
      from: { x: 1, y: 2 },
      to: { x: 4, y: 6 },
    });
  });

  it("reads arcs counter-clockwise, through zero too", () => {
    const arc: Groups = [
      [0, "ARC"],
      [8, "0"],
      [10, 5],
      [20, 5],
      [40, 2],
      [50, 350],
      [51, 20],
    ];
    expect(onlyCurve(readEntities(arc))).toMatchObject({ sweep: expect.closeTo((30 * Math.PI) / 180, 12) });
  });

  it("reads a circle as a closed path", () => {
    const drawing = readEntities(circleEntity(3, 4, 5));
    expect(drawing.paths[0].path.closed).toBe(true);
    expect(totalLength(drawing)).toBeCloseTo(10 * Math.PI, 12);
  });
});

describe("polylines", () => {
  // 100 x 50 with 10 mm corners: area 100·50 - (4 - π)·10², perimeter 2·(80 + 30) + 2π·10.
  const rounded: [number, number, number?][] = [
    [10, 0],
    [90, 0, QUARTER_BULGE],
    [100, 10],
    [100, 40, QUARTER_BULGE],
    [90, 50],
    [10, 50, QUARTER_BULGE],
    [0, 40],
    [0, 10, QUARTER_BULGE],
  ];

  it("reads a rounded rectangle with bulges", () => {
    const drawing = readEntities(lightPolyline(rounded));
    expect(pathArea(drawing.paths[0].path)).toBeCloseTo(4914.1593, 3);
    expect(totalLength(drawing)).toBeCloseTo(282.8319, 3);
  });

  it("reads the same from the old form", () => {
    const old: Groups = [
      [0, "POLYLINE"],
      [8, "0"],
      [66, 1],
      [70, 1],
      ...rounded.flatMap(
        ([x, y, bulge]): Groups => [
          [0, "VERTEX"],
          [8, "0"],
          [10, x],
          [20, y],
          ...(bulge === undefined ? [] : ([[42, bulge]] as const)),
        ],
      ),
      [0, "SEQEND"],
    ];
    expect(readEntities(old).paths[0].path).toEqual(readEntities(lightPolyline(rounded)).paths[0].path);
  });

  it("reads two half-circle bulges as a full circle", () => {
    const drawing = readEntities(
      lightPolyline([
        [0, 0, 1],
        [10, 0, 1],
      ]),
    );
    expect(pathArea(drawing.paths[0].path)).toBeCloseTo(78.53982, 5);
    expect(totalLength(drawing)).toBeCloseTo(31.41593, 5);
  });

  it("keeps all vertices round codes it does not know, and without a count", () => {
    const withIds: Groups = [
      [0, "LWPOLYLINE"],
      [8, "0"],
      [70, 1],
      ...[
        [0, 0],
        [4, 0],
        [4, 3],
      ].flatMap(
        ([x, y], i): Groups => [
          [10, x],
          [20, y],
          [91, i + 1],
        ],
      ),
    ];
    expect(totalLength(readEntities(withIds))).toBe(12);
  });

  it("leaves out control points of a spline-fit polyline", () => {
    const vertex = (x: number, y: number, flags: number): Groups => [
      [0, "VERTEX"],
      [8, "0"],
      [10, x],
      [20, y],
      [70, flags],
    ];
    const fitted: Groups = [
      [0, "POLYLINE"],
      [8, "0"],
      [66, 1],
      [70, 4],
      ...vertex(5, 50, 16),
      ...vertex(0, 0, 8),
      ...vertex(10, 0, 8),
      [0, "SEQEND"],
    ];
    expect(totalLength(readEntities(fitted))).toBe(10);
  });

  it("knows an open polyline whose ends meet as closed", () => {
    expect(
      readEntities(
        lightPolyline(
          [
            [0, 0],
            [4, 0],
            [4, 3],
            [0, 0],
          ],
          0,
        ),
      ).paths[0].path.closed,
    ).toBe(true);
    expect(
      readEntities(
        lightPolyline(
          [
            [0, 0],
            [4, 0],
            [4, 3],
          ],
          0,
        ),
      ).paths[0].path.closed,
    ).toBe(false);
  });
});

describe("extrusion toward the underside (arbitrary axis algorithm: (x, y) becomes (-x, y))", () => {
  it("turns circles and arcs over", () => {
    expect(onlyCurve(readEntities(circleEntity(30, 4, 5, ...DOWNWARD)))).toMatchObject({
      centre: near(-30, 4),
    });
    const arc: Groups = [[0, "ARC"], [8, "0"], [10, 0], [20, 0], [40, 1], [50, 0], [51, 90], ...DOWNWARD];
    const curve = onlyCurve(readEntities(arc));
    expect(startOf(curve)).toEqual(near(-1, 0));
    expect(endOf(curve)).toEqual(near(0, 1));
    expect(pointAt(curve, 0.5)).toEqual(near(-Math.SQRT1_2, Math.SQRT1_2));
  });

  it("turns polylines and their bulges over", () => {
    const drawing = readEntities(
      lightPolyline(
        [
          [0, 0, 0.5],
          [10, 0],
        ],
        0,
        ...DOWNWARD,
      ),
    );
    expect(pathBox(drawing.paths[0].path)).toMatchObject({
      minX: expect.closeTo(-10, 9),
      minY: expect.closeTo(-2.5, 9),
    });
  });

  it("leaves a line where it is and turns an ellipse's sweep, both being in world coordinates", () => {
    expect(onlyCurve(readEntities([...lineEntity(1, 2, 4, 6), ...DOWNWARD]))).toMatchObject({
      from: { x: 1, y: 2 },
    });
    const ellipse: Groups = [
      [0, "ELLIPSE"],
      [8, "0"],
      [10, 20],
      [20, 0],
      [11, 10],
      [21, 0],
      [40, 0.5],
      [41, 0],
      [42, Math.PI / 2],
      ...DOWNWARD,
    ];
    const curve = onlyCurve(readEntities(ellipse));
    expect(startOf(curve)).toEqual(near(30, 0));
    expect(endOf(curve)).toEqual(near(20, -5));
  });

  it("sets aside what is drawn in a plane at an angle, and lines that rise", () => {
    const tilted = readEntities(circleEntity(0, 0, 5, [210, 1], [220, 0], [230, 0]));
    expect(tilted.ignored).toEqual([{ type: "CIRCLE", layer: "0", count: 1, why: "three-dimensional" }]);
    const rising = readEntities([...lineEntity(0, 0, 10, 0), [31, 5]]);
    expect(rising.ignored).toEqual([{ type: "LINE", layer: "0", count: 1, why: "three-dimensional" }]);
    const raised = readEntities([...lineEntity(0, 0, 10, 0), [30, 5], [31, 5]]);
    expect(totalLength(raised)).toBe(10);
  });
});

describe("ellipses and splines", () => {
  it("reads a whole ellipse", () => {
    const ellipse: Groups = [
      [0, "ELLIPSE"],
      [8, "0"],
      [10, 0],
      [20, 0],
      [11, 10],
      [21, 0],
      [40, 0.5],
      [41, 0],
      [42, 6.283185],
    ];
    const drawing = readEntities(ellipse);
    expect(drawing.paths[0].path.closed).toBe(true);
    // π a b, and the perimeter by numeric integration.
    expect(pathArea(drawing.paths[0].path)).toBeCloseTo(157.0796, 4);
    expect(totalLength(drawing)).toBeCloseTo(48.4422, 4);
  });

  const spline = (
    flags: number,
    degree: number,
    knots: number[],
    control: [number, number][],
    weights: number[] = [],
  ): Groups => [
    [0, "SPLINE"],
    [8, "0"],
    [70, flags],
    [71, degree],
    ...knots.map((knot) => [40, knot] as const),
    ...weights.map((weight) => [41, weight] as const),
    ...control.flatMap(
      ([x, y]): Groups => [
        [10, x],
        [20, y],
        [30, 0],
      ],
    ),
  ];

  it("honours weights", () => {
    const curve = onlyCurve(
      readEntities(
        spline(
          12,
          2,
          [0, 0, 0, 1, 1, 1],
          [
            [1, 0],
            [1, 1],
            [0, 1],
          ],
          [1, Math.SQRT1_2, 1],
        ),
      ),
    );
    // Textbook NURBS quarter circle; without weights (0.75, 0.75).
    expect(pointAt(curve, 0.5)).toEqual(near(Math.SQRT1_2, Math.SQRT1_2));
  });

  it("reads a cubic by its control points", () => {
    const curve = onlyCurve(
      readEntities(
        spline(
          8,
          3,
          [0, 0, 0, 0, 1, 1, 1, 1],
          [
            [0, 0],
            [0, 10],
            [10, 10],
            [10, 0],
          ],
        ),
      ),
    );
    // Bernstein polynomials.
    expect(pointAt(curve, 0.5)).toEqual(near(5, 7.5));
  });

  it("takes a straight spline for lines, and one without knots for a clamped one", () => {
    const straight = readEntities(
      spline(
        8,
        1,
        [0, 0, 1, 2, 2],
        [
          [0, 0],
          [3, 4],
          [3, 10],
        ],
      ),
    );
    expect(straight.paths[0].path.curves.map(({ kind }) => kind)).toEqual(["line", "line"]);
    expect(totalLength(straight)).toBe(11);
    expect(
      pointAt(
        onlyCurve(
          readEntities(
            spline(
              8,
              2,
              [],
              [
                [0, 0],
                [1, 2],
                [2, 0],
              ],
            ),
          ),
        ),
        0.5,
      ),
    ).toEqual(near(1, 1));
  });

  it("unrolls a closed spline that gives each control point once", () => {
    const square: [number, number][] = [
      [1, 0],
      [0, 1],
      [-1, 0],
      [0, -1],
    ];
    const drawing = readEntities(spline(3, 2, [0, 1, 2, 3, 4], square));
    expect(drawing.paths[0].path.closed).toBe(true);
    // Uniform quadratic: passes the middles of the control polygon's sides, touching them.
    const box = curveBox(drawing.paths[0].path.curves[0]);
    expect(box.maxX).toBeCloseTo(0.75, 9);
    expect(box.minY).toBeCloseTo(-0.75, 9);
  });

  it("draws a smooth curve through fit points", () => {
    const points = Array.from({ length: 33 }, (_, i) => (i / 32) * 2 * Math.PI);
    const fit: Groups = [
      [0, "SPLINE"],
      [8, "0"],
      [70, 9],
      [71, 3],
      [74, 32],
      ...points.slice(0, -1).flatMap(
        (angle): Groups => [
          [11, 10 * Math.cos(angle)],
          [21, 10 * Math.sin(angle)],
        ],
      ),
    ];
    const drawing = readEntities(fit);
    expect(drawing.paths[0].path.closed).toBe(true);
    // Through 32 points of a circle a periodic cubic errs by the fourth power of the step.
    expect(totalLength(drawing)).toBeCloseTo(20 * Math.PI, 2);
    expect(pathArea(drawing.paths[0].path)).toBeCloseTo(100 * Math.PI, 1);
    const pair = readEntities([
      [0, "SPLINE"],
      [8, "0"],
      [70, 8],
      [71, 3],
      [11, 0],
      [21, 0],
      [11, 3],
      [21, 4],
    ]);
    expect(totalLength(pair)).toBeCloseTo(5, 9);
  });

  it("leaves from fit points along given tangents", () => {
    const curve = onlyCurve(
      readEntities([
        [0, "SPLINE"],
        [8, "0"],
        [70, 8],
        [71, 3],
        [12, 0],
        [22, 1],
        [13, 0],
        [23, -1],
        [11, 0],
        [21, 0],
        [11, 10],
        [21, 0],
      ]),
    );
    // Cubic Hermite of unit speeds over the chord 10: height t(1 - t)·10 at the middle.
    expect(pointAt(curve, 0.5)).toEqual(near(5, 2.5));
  });

  it("takes a span too short for a slope for none", () => {
    const hill: [number, number][] = [
      [0, 0],
      [20, 15],
      [40, 0],
      [60, 15],
    ];
    const sliver = readEntities(spline(8, 2, [0, 0, 0, 1e-320, 1, 1, 1], hill));
    const plain = readEntities(spline(8, 2, [0, 0, 0, 0, 1, 1, 1], hill));
    expect(totalLength(sliver)).toBeGreaterThan(0);
    expect(totalLength(sliver)).toBeCloseTo(totalLength(plain), 9);
  });

  it("lists splines that make no curve", () => {
    const bad = [
      spline(
        8,
        3,
        [0, 0, 0, 0, 1, 1, 1],
        [
          [0, 0],
          [0, 10],
          [10, 10],
          [10, 0],
        ],
      ),
      spline(
        8,
        3,
        [0, 0, 0, 0, 1, 1, 1, 0.5],
        [
          [0, 0],
          [0, 10],
          [10, 10],
          [10, 0],
        ],
      ),
      spline(
        8,
        3,
        [0, 0, 0, 0, 1, 1, 1, 1],
        [
          [0, 0],
          [0, 10],
          [10, 10],
          [10, 0],
        ],
        [1, 0, 1, 1],
      ),
      spline(8, 3, [], []),
    ];
    for (const entity of bad)
      expect(readEntities(entity).ignored).toEqual([
        { type: "SPLINE", layer: "0", count: 1, why: "damaged" },
      ]);
  });
});

describe("units and header", () => {
  // DXF Reference, INSUNITS.
  it.each([
    [0, null],
    [1, "in"],
    [2, "ft"],
    [4, "mm"],
    [5, "cm"],
    [6, "m"],
    [8, null],
  ])("takes $INSUNITS %i for %s", (code, unit) => {
    expect(
      read(
        dxf({
          header: [
            [9, "$INSUNITS"],
            [70, code],
          ],
          entities: [],
        }),
      ).declared,
    ).toBe(unit);
  });

  it("says so when the unit is another", () => {
    const { notes } = read(
      dxf({
        header: [
          [9, "$INSUNITS"],
          [70, 14],
        ],
        entities: [],
      }),
    );
    expect(notes).toEqual(["The file says that it is drawn in decimetres."]);
  });
});
