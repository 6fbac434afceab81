import type { Drawing } from "../drawing";
import { type Box, boxIsEmpty, pathLength } from "../geometry";
import { nestOutlines } from "./containment";
import type { PartsReport } from "./part";
import type { Trace } from "./trace";

/**
 * All that is drawn, hidden layers included, before anything is set aside. `trace` is that of all paths, no
 * gap over the bridging tolerance closed. Outlines that equal each other or enclose nothing count as loops, but
 * not twice and not at all in the depths.
 */
export function measureDrawn(
  drawing: Drawing,
  { joined, outlines, duplicates }: Trace,
  extents: Box,
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
  const depths: Record<string, number> = {};
  for (const depth of nestOutlines(outlines).depth) depths[depth] = (depths[depth] ?? 0) + 1;
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
