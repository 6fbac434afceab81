import type { Box } from "~/domain/geometry";
import type { Placement } from "./nest";

/** A turn about the origin in degrees counter-clockwise, then a move: what carries a part's own frame onto the sheet. */
export interface PlacedFrame {
  readonly turnDegrees: number;
  readonly x: number;
  readonly y: number;
}

/** Carries a part whose outline has `box` in its own frame onto the place that its box was given on a sheet. */
export function frameOfPlacement(box: Box, { x, y, turnDegrees }: Placement): PlacedFrame {
  // A quarter turn takes (x, y) to (-y, x): the box's lower left corner is then (-maxY, minX).
  return turnDegrees === 0
    ? { turnDegrees, x: x - box.minX, y: y - box.minY }
    : { turnDegrees, x: x + box.maxY, y: y - box.minX };
}
