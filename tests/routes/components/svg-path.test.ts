import { describe, expect, it } from "vitest";
import { pathToSvg } from "~/components/drawing-viewer/svg-path";
import type { Arc, Curve, EllipseArc, Path } from "~/domain/geometry";

const closed = (...curves: Curve[]): Path => ({ curves, closed: true });
const arc = (start: number, sweep: number): Arc => ({
  kind: "arc",
  centre: { x: 0, y: 0 },
  radius: 10,
  start,
  sweep,
});

/** Steps of a path as numbers, by the SVG 1.1 grammar (8.3) as far as this writer uses it. */
function steps(d: string): { letter: string; numbers: number[] }[] {
  return [...d.matchAll(/([MLAZ])([^MLAZ]*)/g)].map(([, letter, rest]) => ({
    letter,
    numbers: rest.trim() === "" ? [] : rest.trim().split(/\s+/).map(Number),
  }));
}

/** Centre of an SVG arc by its end points, SVG 1.1 appendix F.6.5, radii large enough. */
function svgArcCentre(
  from: [number, number],
  [rx, ry, turn, large, sweep, x, y]: number[],
): [number, number] {
  const phi = (turn * Math.PI) / 180;
  const [cos, sin] = [Math.cos(phi), Math.sin(phi)];
  const dx = (from[0] - x) / 2;
  const dy = (from[1] - y) / 2;
  const px = cos * dx + sin * dy;
  const py = -sin * dx + cos * dy;
  const under = rx ** 2 * ry ** 2 - rx ** 2 * py ** 2 - ry ** 2 * px ** 2;
  const root =
    Math.sqrt(Math.max(0, under) / (rx ** 2 * py ** 2 + ry ** 2 * px ** 2)) * (large === sweep ? -1 : 1);
  const cx = (root * rx * py) / ry;
  const cy = (-root * ry * px) / rx;
  return [cos * cx - sin * cy + (from[0] + x) / 2, sin * cx + cos * cy + (from[1] + y) / 2];
}

describe("pathToSvg", () => {
  it("writes lines end to end and closes the path", () => {
    const square = closed(
      { kind: "line", from: { x: 0, y: 0 }, to: { x: 4, y: 0 } },
      { kind: "line", from: { x: 4, y: 0 }, to: { x: 4, y: 3 } },
      { kind: "line", from: { x: 4, y: 3 }, to: { x: 0, y: 0 } },
    );
    expect(pathToSvg(square)).toBe("M0 0L4 0L4 3L0 0Z");
  });

  it("writes a full circle as two halves, since an arc back to its start is left out by SVG", () => {
    expect(pathToSvg(closed(arc(0, 2 * Math.PI)))).toBe("M10 0A10 10 0 0 1 -10 0A10 10 0 0 1 10 0Z");
  });

  it("turns the other way for a clockwise arc", () => {
    expect(pathToSvg({ curves: [arc(0, -Math.PI / 2)], closed: false })).toBe("M10 0A10 10 0 0 0 0 -10");
  });

  it("joins a bridged gap by a line instead of leaving it open", () => {
    const gap = closed(
      { kind: "line", from: { x: 0, y: 0 }, to: { x: 4, y: 0 } },
      { kind: "line", from: { x: 4.1, y: 0 }, to: { x: 4, y: 3 } },
    );
    expect(pathToSvg(gap)).toBe("M0 0L4 0L4.1 0L4 3Z");
  });

  it("says nothing of an empty path", () => {
    expect(pathToSvg({ curves: [], closed: true })).toBe("");
  });

  for (const ratio of [0.4, -0.4]) {
    for (const sweep of [1.2, -1.2, 2.9, -5.5]) {
      it(`keeps the centre of an ellipse with ratio ${ratio} swept by ${sweep}`, () => {
        const ellipse: EllipseArc = {
          kind: "ellipse",
          centre: { x: 30, y: -12 },
          major: { x: 20, y: 9 },
          ratio,
          start: 0.7,
          sweep,
        };
        const [start, ...arcs] = steps(pathToSvg({ curves: [ellipse], closed: false }));
        let from = start.numbers as [number, number];
        for (const { letter, numbers } of arcs) {
          expect(letter).toBe("A");
          const [x, y] = svgArcCentre(from, numbers);
          // Coordinates are written to 1e-4 mm; the centre of a shallow arc moves by a few times that.
          expect(x).toBeCloseTo(30, 2);
          expect(y).toBeCloseTo(-12, 2);
          from = [numbers[5], numbers[6]];
        }
      });
    }
  }

  it("turns a spline into chords within the tolerance asked for", () => {
    // A parabola y = x (2 - x) as a quadratic Bezier: control points (0,0) (1,2) (2,0).
    const parabola: Curve = {
      kind: "spline",
      degree: 2,
      knots: [0, 0, 0, 1, 1, 1],
      control: [
        { x: 0, y: 0 },
        { x: 1, y: 2 },
        { x: 2, y: 0 },
      ],
      weights: null,
    };
    const chords = steps(pathToSvg({ curves: [parabola], closed: false }, 0.001));
    expect(chords.length).toBeGreaterThan(8);
    for (const { numbers } of chords) expect(numbers[1]).toBeCloseTo(numbers[0] * (2 - numbers[0]), 3);
  });
});
