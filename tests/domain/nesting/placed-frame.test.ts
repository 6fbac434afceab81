import { describe, expect, it } from "vitest";
import { boxOfPoints, rotate } from "~/domain/geometry";
import { frameOfPlacement } from "~/domain/nesting";

const corners = [
  { x: 130, y: -40 },
  { x: 530, y: -40 },
  { x: 530, y: 160 },
  { x: 130, y: 160 },
];

describe("carrying a part onto its place", () => {
  for (const turnDegrees of [0, 90] as const) {
    it(`puts its box's lower left corner there after ${turnDegrees} degrees`, () => {
      const frame = frameOfPlacement(boxOfPoints(corners), { item: "A", copy: 1, x: 20, y: 30, turnDegrees });
      const placed = boxOfPoints(
        corners.map((corner) => {
          const turned = rotate(corner, (frame.turnDegrees * Math.PI) / 180);
          return { x: turned.x + frame.x, y: turned.y + frame.y };
        }),
      );
      const [width, height] = turnDegrees === 0 ? [400, 200] : [200, 400];
      expect(placed.minX).toBeCloseTo(20, 9);
      expect(placed.minY).toBeCloseTo(30, 9);
      expect(placed.maxX).toBeCloseTo(20 + width, 9);
      expect(placed.maxY).toBeCloseTo(30 + height, 9);
    });
  }
});
