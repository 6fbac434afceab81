import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type LayeredPath, writeDxf } from "~/domain/drawing";
import {
  type Curve,
  circle,
  curveLength,
  distance,
  endOf,
  type Path,
  pathArea,
  pathLength,
  pointAt,
  startOf,
} from "~/domain/geometry";
import { anyCurve, closedPath, fullEllipse, line, quarterCircleSpline, rectangle } from "../geometry/shapes";
import { read } from "./dxf-text";

const alone = (curve: Curve): Path => ({
  curves: [curve],
  closed: distance(startOf(curve), endOf(curve)) < 1e-9,
});
const again = (paths: readonly LayeredPath[]) => read(writeDxf(paths, "mm"));

describe("writing DXF", () => {
  it("uses the oldest form that holds the paths", () => {
    const plain = writeDxf([{ path: rectangle(10, 5), layer: "CUT" }], "mm");
    expect(plain).toContain("$ACADVER\n1\nAC1009\n");
    expect(plain).toContain("0\nPOLYLINE\n");
    const oval = writeDxf([{ path: closedPath(fullEllipse(10, 0.5)), layer: "CUT" }], "mm");
    expect(oval).toContain("$ACADVER\n1\nAC1015\n");
    const named = writeDxf([{ path: rectangle(10, 5), layer: "Cut 3 mm deep" }], "mm");
    expect(named).toContain("0\nLWPOLYLINE\n");
  });

  it.each(["mm", "cm", "m", "in", "ft"] as const)("declares %s", (unit) => {
    expect(read(writeDxf([], unit)).declared).toBe(unit);
  });

  it("reads back the same curves, layers and closedness", () => {
    const slot: Path = closedPath(
      line(0, 0, 30, 0),
      { kind: "arc", centre: { x: 30, y: 5 }, radius: 5, start: -Math.PI / 2, sweep: Math.PI },
      line(30, 10, 0, 10),
      { kind: "arc", centre: { x: 0, y: 5 }, radius: 5, start: Math.PI / 2, sweep: Math.PI },
    );
    const paths: LayeredPath[] = [
      { path: slot, layer: "OUTSIDE" },
      { path: closedPath(circle({ x: 10, y: 5 }, 2.5)), layer: "DRILL" },
      { path: { curves: [line(0, 0, 1, 1)], closed: false }, layer: "ENGRAVE" },
    ];
    const drawing = again(paths);
    expect(drawing.notes).toEqual([]);
    expect(drawing.paths.map(({ layer }) => layer)).toEqual(["OUTSIDE", "DRILL", "ENGRAVE"]);
    expect(drawing.paths.map(({ path }) => path.closed)).toEqual([true, true, false]);
    expect(pathArea(drawing.paths[0].path)).toBeCloseTo(300 + 25 * Math.PI, 9);
    expect(drawing.paths[0].path.curves.map(({ kind }) => kind)).toEqual(["line", "arc", "line", "arc"]);
    expect(drawing.paths[1].path).toEqual(paths[1].path);
  });

  it("writes curves that do not meet one by one", () => {
    const gapped: Path = { curves: [line(0, 0, 1, 0), line(1, 0.1, 2, 0)], closed: false };
    expect(again([{ path: gapped, layer: "0" }]).entities).toEqual({ LINE: 2 });
    const mixed = closedPath(quarterCircleSpline, line(0, 1, 0, 0), line(0, 0, 1, 0));
    expect(again([{ path: mixed, layer: "0" }]).entities).toEqual({ SPLINE: 1, LINE: 2 });
  });

  it("keeps any letters in a layer's name but those that none may have", () => {
    const paths = ["Découpe – 3 mm", "切る", "a/b:c"].map((layer) => ({ path: rectangle(1, 1), layer }));
    expect(again(paths).paths.map(({ layer }) => layer)).toEqual(["Découpe – 3 mm", "切る", "a_b_c"]);
  });

  it("brings any curve back to where it was", () => {
    fc.assert(
      fc.property(
        anyCurve.filter((curve) => curveLength(curve) > 1e-6),
        (curve) => {
          const drawing = again([{ path: alone(curve), layer: "0" }]);
          const back = drawing.paths[0].path.curves[0];
          expect(curveLength(back)).toBeCloseTo(curveLength(curve), 6);
          const forward =
            distance(startOf(back), startOf(curve)) < 1e-6 && distance(endOf(back), endOf(curve)) < 1e-6;
          const middle = pointAt(back, 0.3);
          expect(
            Math.min(distance(middle, pointAt(curve, 0.3)), distance(middle, pointAt(curve, 0.7))),
          ).toBeLessThan(forward ? 1e-6 : Infinity);
        },
      ),
      { numRuns: 200 },
    );
  });

  it("brings outlines with large arcs back at full length", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 6.28, noNaN: true }), fc.boolean(), (size, clockwise) => {
        const arc: Curve = {
          kind: "arc",
          centre: { x: 3, y: 4 },
          radius: 7,
          start: 1,
          sweep: clockwise ? -size : size,
        };
        const path = closedPath(arc, { kind: "line", from: endOf(arc), to: startOf(arc) });
        const drawing = again([{ path, layer: "0" }]);
        expect(pathLength(drawing.paths[0].path)).toBeCloseTo(pathLength(path), 8);
        expect(pathArea(drawing.paths[0].path)).toBeCloseTo(pathArea(path), 7);
      }),
    );
  });
});
