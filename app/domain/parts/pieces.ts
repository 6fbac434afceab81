import { curveLength, type Point, pathBox, pointAt } from "../geometry";
import { nestOutlines } from "./containment";
import { findFrames, isCounterbore } from "./frames";
import type { Chain } from "./joining";
import { pointInPolygon } from "./level-line";
import { counterboreFeature, engravedLine, featureOfOutline, type LayerReader } from "./operations";
import type { Outline } from "./outline";
import { OutlineIndex } from "./outline-index";
import type { Feature } from "./part";

/** One physical piece as drawn: an outline with what is cut inside it. */
export interface Piece {
  readonly outer: Outline;
  readonly features: readonly Feature[];
}

export interface Pieces {
  readonly pieces: readonly Piece[];
  readonly frames: readonly Outline[];
  /** Engraved outlines and lines that stand in no part. */
  readonly strays: readonly Chain[];
}

export interface PieceRules {
  readonly reader: LayerReader;
  readonly drillSizes: readonly number[];
  /** Whether a rectangle that would be set aside as a frame is to be cut all the same. */
  readonly keepsFrame: (outline: Outline) => boolean;
}

/**
 * Parts from outlines. `through` are those cut through or of unknown operation: frames are set aside, then
 * those at even depth are parts and those at odd depth openings in the part round them. `worked` are pockets,
 * drills and engraving; they belong to the innermost part round them, and pockets and drills outside of all are
 * taken as through. `engraved` are open lines.
 */
export function makePieces(
  through: readonly Outline[],
  worked: readonly Outline[],
  engraved: readonly Chain[],
  rules: PieceRules,
): Pieces {
  const frameAt = findFrames(through, nestOutlines(through));
  const frames = through.filter((outline, i) => frameAt.has(i) && !rules.keepsFrame(outline));
  const framed = new Set(frames);
  const unframed = through.filter((outline) => !framed.has(outline));

  const strays: Chain[] = [];
  const homeless: Outline[] = [];
  const housed: Outline[] = [];
  const unframedIndex = new OutlineIndex(unframed);
  for (const outline of worked) {
    const inside = pointInPolygon(outline.polygon);
    if (inside && unframedIndex.smallestRound(inside) !== null) housed.push(outline);
    else if (rules.reader(outline.layer)?.kind === "engrave") strays.push(outline);
    else homeless.push(outline);
  }

  const outlines = [...unframed, ...homeless];
  const { outers, features } = sortByDepth(outlines, rules);
  const places = new OutlineIndex(outers.map((i) => outlines[i]));
  const addAt = (point: Point | null, feature: Feature): boolean => {
    const place = point && places.smallestRound(point);
    if (place === null) return false;
    features.get(outers[place])?.push(feature);
    return true;
  };
  for (const outline of housed) {
    const feature = featureOfOutline(outline, rules.reader, rules.drillSizes);
    if (!addAt(pointInPolygon(outline.polygon), feature)) strays.push(outline);
  }
  for (const chain of engraved) {
    const depth = rules.reader(chain.layer)?.depth ?? null;
    const feature = engravedLine({ ...chain, box: pathBox(chain.path) }, depth);
    if (!addAt(middleOfLongest(chain), feature)) strays.push(chain);
  }
  return {
    pieces: outers.map((i) => ({ outer: outlines[i], features: features.get(i) ?? [] })),
    frames,
    strays,
  };
}

/** Places of the parts among the outlines, and the openings of each. */
function sortByDepth(outlines: readonly Outline[], rules: PieceRules) {
  const { parent, depth } = nestOutlines(outlines);
  const children = new Map<number, number[]>();
  for (let i = 0; i < outlines.length; i++) {
    const held = children.get(parent[i]);
    if (held) held.push(i);
    else children.set(parent[i], [i]);
  }
  const isWide = (i: number) => depth[i] % 2 === 1 && isCounterbore(outlines, i, children.get(i) ?? []);
  const isOuter = (i: number) =>
    depth[i] % 2 === 0 && !(parent[i] >= 0 && isWide(parent[i]) && !children.has(i));
  const outers: number[] = [];
  const features = new Map<number, Feature[]>();
  for (let i = 0; i < outlines.length; i++) {
    if (!isOuter(i)) continue;
    outers.push(i);
    features.set(i, []);
  }
  for (let i = 0; i < outlines.length; i++) {
    if (features.has(i)) continue;
    const host = depth[i] % 2 === 1 ? parent[i] : parent[parent[i]];
    const feature = isWide(i)
      ? counterboreFeature(outlines[i])
      : featureOfOutline(outlines[i], rules.reader, rules.drillSizes);
    features.get(host)?.push(feature);
  }
  return { outers, features };
}

/** A point of the chain: the middle of its longest curve. */
function middleOfLongest({ path }: Chain): Point {
  const longest = path.curves.reduce((best, curve) =>
    curveLength(curve) > curveLength(best) ? curve : best,
  );
  return pointAt(longest, 0.5);
}
