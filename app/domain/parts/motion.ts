import { type Point, rotate } from "../geometry";

/** A turn about the origin, radians counter-clockwise, then a move. */
export interface Motion {
  readonly turn: number;
  readonly move: Point;
}

export const moved = (point: Point, { turn, move }: Motion): Point => {
  const turned = rotate(point, turn);
  return { x: turned.x + move.x, y: turned.y + move.y };
};

export const undone = (point: Point, { turn, move }: Motion): Point =>
  rotate({ x: point.x - move.x, y: point.y - move.y }, -turn);

/** The motion that turns by `turn` and carries `from` to `to`. */
export function motionCarrying(from: Point, to: Point, turn: number): Motion {
  const turned = rotate(from, turn);
  return { turn, move: { x: to.x - turned.x, y: to.y - turned.y } };
}
