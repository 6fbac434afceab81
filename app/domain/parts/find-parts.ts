import type { Drawing, DrawnPath } from "../drawing";
import { boxExtent, boxHeight, boxUnion, boxWidth, EMPTY_BOX, pathBox } from "../geometry";
import { AsideList } from "./aside-list";
import { groupCongruent } from "./congruence";
import { distinctOutlines, findDuplicates } from "./duplicates";
import { type Chain, joinPaths } from "./joining";
import { bareUnitOf } from "./layer-names";
import { measureDrawn } from "./measure-drawn";
import { openChainOf } from "./open-chain";
import { DRILL_SIZES, joiningGroups, layerReader } from "./operations";
import { type Outline, outlinesOf } from "./outline";
import { lengthWithoutOverlaps } from "./overlaps";
import type { Bridge, LayerRule, PartsReport } from "./part";
import { partsOfKinds } from "./parts-of-kinds";
import { makePieces } from "./pieces";

/** What the builder wants cut after all, of what is set aside of itself. */
export interface Restored {
  readonly what: "frame" | "text" | "hidden" | "note";
  readonly layer: string;
}

export interface FindPartsRules {
  /** What the builder said of layers; the others are read by their name, then by geometry. */
  readonly layers: readonly LayerRule[];
  readonly restored?: readonly Restored[];
  /** Gaps between dangling ends bridged and listed, millimetres. */
  readonly bridgeTolerance?: number;
  /** Gaps bridged and asked, millimetres. */
  readonly askTolerance?: number;
  /** Diameters that a hole is drilled at where its layer says nothing, millimetres. */
  readonly drillSizes?: readonly number[];
  /** How much equal parts may differ, millimetres. */
  readonly equalTolerance?: number;
}

const DEFAULTS = { bridgeTolerance: 0.2, askTolerance: 0.5, equalTolerance: 0.05, drillSizes: DRILL_SIZES };
/** Shares of the drawing's extent within which curves are the same, and ends one node. */
const SAME_CURVE = 1e-6;
const SAME_NODE = 1e-7;

/**
 * The parts in a drawing in millimetres: what is drawn is counted, duplicates, hidden layers, notes and frames
 * are set aside, the rest is joined into outlines, and equal parts are counted together.
 */
export function findParts(drawing: Drawing, rules: FindPartsRules): PartsReport {
  const settings = { ...DEFAULTS, ...rules };
  const restored = rules.restored ?? [];
  const reader = layerReader(rules.layers, bareUnitOf(drawing));
  const isRestored = (what: Restored["what"], layer: string) =>
    restored.some((one) => one.what === what && one.layer === layer);

  const extents = drawing.paths.reduce((box, { path }) => boxUnion(box, pathBox(path)), EMPTY_BOX);
  const extent = boxExtent(extents);
  const duplicates = findDuplicates(drawing.paths, extent * SAME_CURVE);

  const why = (path: DrawnPath): "hidden" | "text" | "note" | null => {
    if (path.hidden && !isRestored("hidden", path.layer)) return "hidden";
    const what = reader(path.layer)?.what ?? null;
    return what !== null && !isRestored(what, path.layer) ? what : null;
  };
  const aside = new AsideList();
  const cut: DrawnPath[] = [];
  for (let i = 0; i < drawing.paths.length; i++) {
    const path = drawing.paths[i];
    const what = why(path);
    if (what) aside.add(what, path);
    else cut.push(path);
    if (duplicates[i] >= 0 && !what) aside.add("duplicate", path);
  }
  for (const { layer } of drawing.texts) aside.count("text", layer);

  const through: Outline[] = [];
  const worked: Outline[] = [];
  const engraved: Chain[] = [];
  const open: Chain[] = [];
  const bridges: Bridge[] = [];
  const joinTolerances = {
    node: extent * SAME_NODE,
    bridge: settings.bridgeTolerance,
    ask: settings.askTolerance,
  };
  for (const [group, places] of joiningGroups(cut, reader)) {
    const drawn = places.map((i) => cut[i]);
    const repeated = findDuplicates(drawn, extent * SAME_CURVE);
    const joined = joinPaths(
      drawn.filter((_, i) => repeated[i] < 0),
      joinTolerances,
    );
    const { outlines, flat } = outlinesOf(joined.loops, joinTolerances.node);
    const distinct = distinctOutlines(outlines, extent * SAME_CURVE);
    if (group === "through") through.push(...distinct);
    else worked.push(...distinct);
    if (group.startsWith("engrave")) engraved.push(...joined.open, ...flat);
    else open.push(...joined.open, ...flat);
    bridges.push(...joined.bridges);
  }

  const { pieces, frames, strays } = makePieces(through, worked, engraved, {
    reader,
    drillSizes: settings.drillSizes,
    keepsFrame: ({ layer }) => isRestored("frame", layer),
  });
  for (const frame of frames) aside.add("frame", frame);

  const parts = partsOfKinds(groupCongruent(pieces, settings.equalTolerance), drawing.texts);
  const box = pieces.reduce((all, { outer }) => boxUnion(all, outer.box), EMPTY_BOX);
  return {
    parts,
    open: [...open, ...strays].map(openChainOf),
    bridges,
    setAside: aside.list(),
    duplicates: duplicates.reduce((count, earlier) => count + (earlier >= 0 ? 1 : 0), 0),
    drawn: measureDrawn(drawing, duplicates, extents, { ...joinTolerances, ask: 0 }, extent * SAME_CURVE),
    totals: {
      parts: pieces.length,
      distinctParts: parts.length,
      holes: parts.reduce((sum, part) => sum + part.holes * part.quantity, 0),
      area: parts.reduce((sum, part) => sum + part.area * part.quantity, 0),
      cutLength: lengthWithoutOverlaps(
        pieces.flatMap(({ outer, features }) => [outer.path, ...features.map(({ path }) => path)]),
      ),
      box: { width: boxWidth(box), height: boxHeight(box) },
    },
  };
}
