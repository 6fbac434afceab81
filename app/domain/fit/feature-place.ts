import { interiorPoint, type Point, pointAt } from "../geometry";
import type { Feature } from "../parts";

/** Chords good enough for a place on the drawing, millimetres. */
const CHORD = 0.05;

/** Where a finding about a feature is pinned: inside it, or on it where it encloses nothing. */
export function featurePlace({ path }: Feature): Point {
  return (path.closed ? interiorPoint(path, [], CHORD) : null) ?? pointAt(path.curves[0], 0);
}
