import type { Drawing, DrawnPath } from "../drawing";
import { boxExtent, boxHeight, boxUnion, boxWidth, EMPTY_BOX, pathBox } from "../geometry";
import { groupCongruent, type Kind } from "./congruence";
import { partCovered } from "./covered-lines";
import type { Chain } from "./joining";
import { bareUnitOf } from "./layer-names";
import { measureDrawn } from "./measure-drawn";
import { findNearKinds } from "./near-equal";
import { openChainOf } from "./open-chain";
import { DRILL_SIZES, joiningGroups, type LayerReader, layerReader, THROUGH } from "./operations";
import type { Outline } from "./outline";
import { findOverlaps, lengthWithoutOverlaps } from "./overlaps";
import type { Bridge, LayerRule, Part, PartsReport } from "./part";
import { partsOfKinds } from "./parts-of-kinds";
import { makePieces, type Piece } from "./pieces";
import { findCrossings } from "./segment-crossings";
import { isRestored, type Restored, sortOut } from "./sort-out";
import { splitOverlaps } from "./split-overlaps";
import { type Trace, type TraceTolerances, tracePaths } from "./trace";

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
  /** Parts that differ by less are pointed out, millimetres. */
  readonly nearTolerance?: number;
}

const DEFAULTS = {
  bridgeTolerance: 0.2,
  askTolerance: 0.5,
  equalTolerance: 0.05,
  nearTolerance: 0.5,
  drillSizes: DRILL_SIZES,
};
/** Crossings listed at most: a drawing with more is drawn so throughout. */
const MOST_CROSSINGS = 20;
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
  const extents = drawing.paths.reduce((box, { path }) => boxUnion(box, pathBox(path)), EMPTY_BOX);
  const extent = boxExtent(extents);
  const tolerances: TraceTolerances = {
    node: extent * SAME_NODE,
    same: extent * SAME_CURVE,
    bridge: settings.bridgeTolerance,
    ask: settings.askTolerance,
  };

  const all = tracePaths(drawing.paths, tolerances);
  const { cut, aside } = sortOut(drawing, reader, restored, all.duplicates);
  const traced = traceGroups(drawing, cut, reader, tolerances, all);
  const { pieces, frames, strays } = makePieces(traced.through, traced.worked, traced.engraved, {
    reader,
    drillSizes: settings.drillSizes,
    keepsFrame: ({ layer }) => isRestored(restored, "frame", layer),
  });
  for (const frame of frames) aside.add("frame", frame);
  for (const chain of traced.covered) aside.add("duplicate", chain);

  const kinds = groupCongruent(pieces, settings.equalTolerance);
  const parts = partsOfKinds(kinds, drawing.texts);
  const framed = new Set(frames);
  return {
    parts,
    open: [...traced.open, ...strays].map(openChainOf),
    bridges: traced.bridges,
    setAside: aside.list(),
    duplicates: all.duplicates.reduce((count, earlier) => count + (earlier >= 0 ? 1 : 0), 0),
    overlaps: findOverlaps(pieces.flatMap(throughCuts)),
    crossings: crossingsOf(traced.through.filter((outline) => !framed.has(outline))),
    nearEqual: nearEqualOf(kinds, parts, settings),
    drawn: measureDrawn(drawing, withoutAsking(drawing, all, tolerances), extents),
    totals: totalsOf(parts, pieces),
  };
}

interface Traced {
  readonly through: Outline[];
  readonly worked: Outline[];
  readonly engraved: Chain[];
  readonly open: Chain[];
  readonly covered: Chain[];
  readonly bridges: Bridge[];
}

/** Without spreading: a large drawing has more outlines than a call may have arguments. */
function addAll<T>(list: T[], more: readonly T[]): void {
  for (const one of more) list.push(one);
}

/** Outlines and lines of what is to be cut, joined within groups of layers that belong together. */
function traceGroups(
  drawing: Drawing,
  cut: readonly DrawnPath[],
  reader: LayerReader,
  tolerances: TraceTolerances,
  all: Trace,
): Traced {
  const traced: Traced = { through: [], worked: [], engraved: [], open: [], covered: [], bridges: [] };
  for (const [group, places] of joiningGroups(cut, reader)) {
    const own = places.map((i) => cut[i]);
    const split = splitOverlaps(own);
    const isWhole = split === own && places.length === drawing.paths.length;
    const trace = isWhole ? all : tracePaths(split, tolerances);
    const { joined, outlines, flat } = trace;
    const { open, covered } = partCovered(joined.open, outlines);
    addAll(group === THROUGH ? traced.through : traced.worked, outlines);
    const lines = group.startsWith("engrave") ? traced.engraved : traced.open;
    addAll(lines, open);
    addAll(lines, flat);
    addAll(traced.covered, covered);
    addAll(traced.bridges, joined.bridges);
  }
  return traced;
}

/** The trace with only those gaps closed that need no asking. */
const withoutAsking = (drawing: Drawing, all: Trace, tolerances: TraceTolerances): Trace =>
  all.joined.bridges.some(({ asked }) => asked) ? tracePaths(drawing.paths, { ...tolerances, ask: 0 }) : all;

const crossingsOf = (outlines: readonly Outline[]): PartsReport["crossings"] =>
  findCrossings(outlines, MOST_CROSSINGS).map(({ one, other, at }) => ({
    layer: outlines[one].layer,
    at,
    itself: one === other,
  }));

function nearEqualOf(
  kinds: readonly Kind[],
  parts: readonly Part[],
  { equalTolerance, nearTolerance }: typeof DEFAULTS,
): PartsReport["nearEqual"] {
  const placeOf = new Map(parts.map(({ outer }, place) => [outer, place]));
  return findNearKinds(kinds, equalTolerance, nearTolerance).flatMap(({ one, other, difference }) => {
    const places = [one, other].flatMap((kind) => placeOf.get(kinds[kind].first.outer.path) ?? []);
    const [first, second] = places.sort((p, q) => p - q).map((place) => parts[place].id);
    return [{ one: first, other: second, difference }];
  });
}

const throughCuts = ({ outer, features }: Piece): readonly Pick<Outline, "layer" | "path">[] => [
  outer,
  ...features.filter(({ kind }) => kind === "cut-through"),
];

function totalsOf(parts: readonly Part[], pieces: readonly Piece[]): PartsReport["totals"] {
  const box = pieces.reduce((all, { outer }) => boxUnion(all, outer.box), EMPTY_BOX);
  return {
    parts: pieces.length,
    distinctParts: parts.length,
    holes: parts.reduce((sum, part) => sum + part.holes * part.quantity, 0),
    area: parts.reduce((sum, part) => sum + part.area * part.quantity, 0),
    cutLength: lengthWithoutOverlaps(
      pieces.flatMap(({ outer, features }) => [outer.path, ...features.map(({ path }) => path)]),
    ),
    box: { width: boxWidth(box), height: boxHeight(box) },
  };
}
