import { OUTSIDE, onLayer, polygon, type Shape, type Span, type Spot } from "./draft";

export interface TenonedPanel {
  /** Without the tenons; its lower left corner is the origin. */
  readonly width: number;
  readonly height: number;
  /** How far the tenons stand out. */
  readonly length: number;
  /** Where they stand on each edge, in rising order. */
  readonly left?: readonly Span[];
  readonly right?: readonly Span[];
  readonly top?: readonly Span[];
  readonly bottom?: readonly Span[];
}

const isSame = ([x, y]: Spot, [otherX, otherY]: Spot): boolean => x === otherX && y === otherY;

/** The outline of a panel with tenons on its edges, counter-clockwise. */
export function tenonedOutline({
  width,
  height,
  length,
  left = [],
  right = [],
  top = [],
  bottom = [],
}: TenonedPanel): Shape {
  const points: Spot[] = [
    [0, 0],
    ...bottom.flatMap(([from, to]): Spot[] => [
      [from, 0],
      [from, -length],
      [to, -length],
      [to, 0],
    ]),
    [width, 0],
    ...right.flatMap(([from, to]): Spot[] => [
      [width, from],
      [width + length, from],
      [width + length, to],
      [width, to],
    ]),
    [width, height],
    ...top.toReversed().flatMap(([from, to]): Spot[] => [
      [to, height],
      [to, height + length],
      [from, height + length],
      [from, height],
    ]),
    [0, height],
    ...left.toReversed().flatMap(([from, to]): Spot[] => [
      [0, to],
      [-length, to],
      [-length, from],
      [0, from],
    ]),
  ];
  const distinct = points.filter((point, i) => !isSame(point, points[(i + 1) % points.length]));
  return onLayer(OUTSIDE, polygon(distinct));
}
