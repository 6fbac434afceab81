/**
 * A move from rest to rest: speed up, run, slow down. Any unit of length, as long as all three share it
 * and seconds; acceleration and braking are equal.
 */
export interface RestToRest {
  readonly distance: number;
  /** Length per second. */
  readonly feed: number;
  /** Length per second per second. */
  readonly acceleration: number;
}

/** The shortest move that touches full feed, v²/a. */
export const distanceToReachFeed = (feed: number, acceleration: number): number => feed ** 2 / acceleration;

/** The highest speed the move reaches: the feed, or √(d·a) where it is too short for that. */
export const peakSpeed = ({ distance, feed, acceleration }: RestToRest): number =>
  Math.min(feed, Math.sqrt(distance * acceleration));

/** Seconds: d/v + v/a where the feed is reached, 2√(d/a) otherwise. Zero for no distance. */
export function moveTime({ distance, feed, acceleration }: RestToRest): number {
  return distance >= distanceToReachFeed(feed, acceleration)
    ? distance / feed + feed / acceleration
    : 2 * Math.sqrt(distance / acceleration);
}
