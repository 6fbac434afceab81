import { flattenPath, interiorPoint, type Point } from "../geometry";
import { pointInPolygon, stretchAcross } from "./level-line";
import type { Outline } from "./outline";
import type { Feature } from "./part";

/** Chords for a point well inside, millimetres. */
const CHORD = 0.05;
/** With more openings than this, level lines are tried in place of measuring the distance to all. */
const MANY_OPENINGS = 100;
const LEVELS = 15;

/** A point in a part's material: inside its outline, in none of its openings, away from the edges where that is found cheaply. */
export function pointInMaterial(outer: Outline, openings: readonly Feature[]): Point {
  const found =
    openings.length <= MANY_OPENINGS
      ? interiorPoint(
          outer.path,
          openings.map(({ path }) => path),
          CHORD,
        )
      : onWidestStretch(outer, openings);
  return found ?? pointInPolygon(outer.polygon) ?? outer.polygon[0];
}

/** The middle of the widest stretch of material on some level lines. */
function onWidestStretch({ polygon, box }: Outline, openings: readonly Feature[]): Point | null {
  let best: { readonly at: Point; readonly width: number } | null = null;
  for (let i = 0; i < LEVELS; i++) {
    const level = box.minY + ((i + 0.4821) / LEVELS) * (box.maxY - box.minY);
    const met = openings.filter((opening) => opening.box.minY <= level && opening.box.maxY >= level);
    const found = stretchAcross([polygon, ...met.map(({ path }) => flattenPath(path, CHORD))], level);
    if (found && found.width > (best?.width ?? 0)) best = found;
  }
  return best?.at ?? null;
}
