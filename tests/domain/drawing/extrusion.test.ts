import { describe, expect, it } from "vitest";
import { objectAxes, type Vector } from "~/domain/drawing/extrusion";

describe("arbitrary axis algorithm (DXF Reference, the 1/64 test)", () => {
  const near = ({ x, y, z }: Vector) => ({
    x: expect.closeTo(x, 12),
    y: expect.closeTo(y, 12),
    z: expect.closeTo(z, 12),
  });
  const up = { x: 0, y: 0, z: 1 };
  const down = { x: 0, y: 0, z: -1 };
  const right = { x: 1, y: 0, z: 0 };
  const left = { x: -1, y: 0, z: 0 };
  const back = { x: 0, y: 1, z: 0 };

  it.each([
    { normal: up, x: right, y: back },
    { normal: down, x: left, y: back },
    { normal: right, x: back, y: up },
  ])("turns $normal into the axes $x and $y", ({ normal, x, y }) => {
    expect(objectAxes(normal)).toEqual({ x: near(x), y: near(y) });
  });
});
