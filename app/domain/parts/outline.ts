import {
  type Box,
  boxExtent,
  flattenPath,
  type Path,
  type Point,
  pathArea,
  pathBox,
  reversePath,
} from "../geometry";
import type { Chain } from "./joining";
import { widestStretch } from "./level-line";

/** A closed outline with what is asked of it again and again. Counter-clockwise. */
export interface Outline {
  readonly path: Path;
  readonly layer: string;
  readonly length: number;
  /** Enclosed, positive. */
  readonly area: number;
  readonly box: Box;
  /** Chords of the path; for containment only, never for measures. */
  readonly polygon: readonly Point[];
  /** The drawn paths it is joined from, by their place in the drawing. */
  readonly members: readonly number[];
}

/** Chords for containment: two thousandths of the outline's extent, at most 0.05 mm. */
const chordTolerance = (box: Box): number => Math.min(0.05, Math.max(1e-9, boxExtent(box) * 2e-3));

function outlineOf(chain: Chain): Outline {
  const area = pathArea(chain.path);
  const box = pathBox(chain.path);
  const path = area < 0 ? reversePath(chain.path) : chain.path;
  const { layer, length, members } = chain;
  return {
    path,
    layer,
    length,
    area: Math.abs(area),
    box,
    polygon: flattenPath(path, chordTolerance(box)),
    members,
  };
}

/** Whether a closed outline encloses something wider than `sliver`, even where it crosses itself. */
const enclosesArea = ({ polygon }: Outline, sliver: number): boolean => {
  const stretch = widestStretch(polygon);
  return stretch !== null && stretch.width > sliver;
};

/** Closed chains that enclose something as outlines, and those that do not: lines drawn there and back. */
export function outlinesOf(
  loops: readonly Chain[],
  sliver: number,
): { readonly outlines: Outline[]; readonly flat: Chain[] } {
  const outlines: Outline[] = [];
  const flat: Chain[] = [];
  for (const loop of loops) {
    const outline = outlineOf(loop);
    if (enclosesArea(outline, sliver)) outlines.push(outline);
    else flat.push(loop);
  }
  return { outlines, flat };
}

/** The diameter where the outline is one full circle, drawn as one arc or as several about one centre. */
export function circleDiameter(path: Path, tolerance: number): number | null {
  const [first] = path.curves;
  if (first?.kind !== "arc") return null;
  let sweep = 0;
  for (const curve of path.curves) {
    if (curve.kind !== "arc") return null;
    const off = Math.hypot(curve.centre.x - first.centre.x, curve.centre.y - first.centre.y);
    if (off > tolerance || Math.abs(curve.radius - first.radius) > tolerance) return null;
    sweep += curve.sweep;
  }
  return Math.abs(Math.abs(sweep) - 2 * Math.PI) <= 1e-3 ? 2 * first.radius : null;
}
