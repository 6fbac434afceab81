import type { Drawing } from "../drawing";
import { type Box, boxIsEmpty, pathLength } from "../geometry";
import { nestOutlines } from "./containment";
import { distinctOutlines } from "./duplicates";
import { type JoinTolerances, joinPaths } from "./joining";
import { outlinesOf } from "./outline";
import type { PartsReport } from "./part";

/**
 * All that is drawn, hidden layers included, before anything is set aside. `duplicates` names for each path an
 * earlier equal one or -1; outlines that
 * equal each other or enclose nothing count as loops, but not twice and not at all in the depths.
 */
export function measureDrawn(
  drawing: Drawing,
  duplicates: Int32Array,
  extents: Box,
  tolerances: JoinTolerances,
  sameCurve: number,
): PartsReport["drawn"] {
  let length = 0;
  let uniqueLength = 0;
  let hiddenLength = 0;
  for (let i = 0; i < drawing.paths.length; i++) {
    const own = pathLength(drawing.paths[i].path);
    length += own;
    if (duplicates[i] < 0) uniqueLength += own;
    if (drawing.paths[i].hidden) hiddenLength += own;
  }
  const joined = joinPaths(
    drawing.paths.filter((_, i) => duplicates[i] < 0),
    tolerances,
  );
  const depths: Record<string, number> = {};
  for (const depth of nestOutlines(
    distinctOutlines(outlinesOf(joined.loops, tolerances.node).outlines, sameCurve),
  ).depth) {
    depths[depth] = (depths[depth] ?? 0) + 1;
  }
  return {
    curves: drawing.paths.length,
    length,
    uniqueLength,
    hiddenLength,
    loops: joined.loops.length,
    depths,
    openChains: joined.open.length,
    branches: joined.branches,
    extents: boxIsEmpty(extents) ? null : extents,
  };
}
