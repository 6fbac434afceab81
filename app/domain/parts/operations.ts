import type { DrawnPath } from "../drawing";
import type { Box, Path } from "../geometry";
import { type LayerReading, readLayerName } from "./layer-names";
import { circleDiameter, type Outline } from "./outline";
import type { Depth, Feature, LayerRule } from "./part";

/** Diameters of the drills that a shop keeps, millimetres (common practice, no source). */
export const DRILL_SIZES: readonly number[] = [3, 4, 5, 6, 8, 10, 35];
/** A drawn circle is that drill's when its diameter is this near, millimetres. */
const DRILL_SLACK = 0.05;
/** Curves of one circle may differ by this much in centre and radius, millimetres. */
export const ROUND_SLACK = 0.01;

/** What is known of a layer before geometry is asked: what the builder said, else what its name says, else null. */
export type LayerReader = (layer: string) => LayerReading | null;

export function layerReader(rules: readonly LayerRule[], bareUnit: number): LayerReader {
  const told = new Map(rules.map((rule) => [rule.layer, rule]));
  const known = new Map<string, LayerReading | null>();
  return (layer) => {
    const held = known.get(layer);
    if (held !== undefined) return held;
    const rule = told.get(layer);
    const reading: LayerReading | null = rule
      ? { kind: rule.kind, depth: rule.depth, what: rule.kind === "set-aside" ? "note" : null }
      : readLayerName(layer, bareUnit);
    known.set(layer, reading);
    return reading;
  };
}

/** The group of outlines and openings. */
export const THROUGH = "through";

/**
 * Paths that may be joined to each other: outlines and all whose layer says nothing form one group; pockets of
 * one depth, drills and engraving each their own, so that a pocket's edge on an outline is no branch.
 */
export function joiningGroups(paths: readonly DrawnPath[], reader: LayerReader): Map<string, number[]> {
  const groups = new Map<string, number[]>();
  for (let i = 0; i < paths.length; i++) {
    const reading = reader(paths[i].layer);
    const kind = reading?.kind ?? "outside";
    // What was set aside and is restored is cut like any other line.
    const isThrough = kind === "outside" || kind === "cut-through" || kind === "set-aside";
    const key = isThrough ? THROUGH : `${kind} ${JSON.stringify(reading?.depth ?? null)}`;
    const held = groups.get(key);
    if (held) held.push(i);
    else groups.set(key, [i]);
  }
  return groups;
}

interface Drawn {
  readonly path: Path;
  readonly layer: string;
  readonly length: number;
  readonly area: number;
  readonly box: Box;
}

const featureOf = (kind: Feature["kind"], drawn: Drawn, depth: Depth, diameter: number | null): Feature => ({
  kind,
  layer: drawn.layer,
  path: drawn.path,
  depth,
  diameter,
  length: drawn.length,
  area: drawn.area,
  box: drawn.box,
});

/** A closed outline inside a part, by its layer; where the layer says nothing a circle of a drill's size is drilled and all else cut through. */
export function featureOfOutline(
  outline: Outline,
  reader: LayerReader,
  drillSizes: readonly number[],
): Feature {
  const reading = reader(outline.layer);
  const diameter = circleDiameter(outline.path, ROUND_SLACK);
  switch (reading?.kind) {
    case "pocket":
    case "engrave":
      return featureOf(reading.kind, outline, reading.depth, diameter);
    case "drill":
      if (diameter !== null) return featureOf("drill", outline, reading.depth, diameter);
      return featureOf(reading.depth ? "pocket" : "cut-through", outline, reading.depth, null);
    case "cut-through":
      return featureOf("cut-through", outline, null, diameter);
    default: {
      const isDrill =
        diameter !== null && drillSizes.some((size) => Math.abs(size - diameter) <= DRILL_SLACK);
      return featureOf(isDrill ? "drill" : "cut-through", outline, null, diameter);
    }
  }
}

/** The wide circle of a countersunk or counterbored hole: a pocket of a depth that only the builder knows. */
export const counterboreFeature = (outline: Outline): Feature =>
  featureOf("pocket", outline, null, circleDiameter(outline.path, ROUND_SLACK));

/** An open line that is engraved. */
export const engravedLine = (drawn: Omit<Drawn, "area">, depth: Depth): Feature =>
  featureOf("engrave", { ...drawn, area: 0 }, depth, null);

/** Whether the feature takes material away through the whole thickness. */
export const isThrough = (feature: Feature): boolean =>
  (feature.kind === "cut-through" || feature.kind === "drill") && feature.depth === null;
