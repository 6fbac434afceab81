import { flattenPath } from "../geometry";
import type { Feature, Part } from "../parts";
import { featurePlace } from "./feature-place";
import type { Finding, FitCase, FitRule } from "./finding";
import { inscribedWidth } from "./inscribed-width";

/** Chords of an opening's outline, and how exactly its width is measured, millimetres. */
const CHORD = 0.005;
const WIDTH_TOLERANCE = 0.01;

/**
 * Openings and pockets that the smallest mill does not enter stop; those that it only just enters are asked, and
 * so are round holes, which a drill may make. Holes known as drilled are left out.
 */
export const openingNarrowerThanTool: FitRule = (fit) =>
  fit.report.parts.flatMap((part) =>
    part.features.flatMap((feature) => {
      if (feature.kind === "drill" || feature.kind === "engrave" || !feature.path.closed) return [];
      const finding = check(part, feature, fit);
      return finding ? [finding] : [];
    }),
  );

/** A polygon of six even sides or more fills this share of the circle of its length. */
const ROUND_SHARE = 0.9;

/** A circle drawn as short lines, as some programs write it. */
const isFacetedCircle = ({ area, length }: Feature): boolean =>
  length > 0 && (4 * Math.PI * area) / (length * length) >= ROUND_SHARE;

function check(part: Part, feature: Feature, { tools, limits, say }: FitCase): Finding | null {
  const tool = tools.smallestDiameter;
  const limit = tool + limits.toolClearance;
  // No outline holds a smaller circle than twice its area over its length: most openings are settled here.
  if (feature.length > 0 && (2 * feature.area) / feature.length >= limit) return null;
  const width = feature.diameter ?? inscribedWidth(flattenPath(feature.path, CHORD), WIDTH_TOLERANCE);
  if (width >= limit - WIDTH_TOLERANCE) return null;
  const isRound = feature.diameter !== null || isFacetedCircle(feature);
  const isEntered = width >= tool - WIDTH_TOLERANCE;
  const where = `${feature.kind === "pocket" ? "A pocket" : isRound ? "A hole" : "An opening"} in part ${part.name} is ${say(width)} wide`;
  return {
    code: "opening-narrower-than-tool",
    severity: isEntered || isRound ? "ask" : "stop",
    part: part.id,
    copy: null,
    at: featurePlace(feature),
    measured: width,
    limit,
    words: isEntered
      ? `${where}, hardly more than the smallest tool, ${say(tool)}. It is cut in one pass, as wide as the tool.`
      : isRound
        ? `${where}, less than the smallest mill, ${say(tool)}. It can only be drilled: choose a drill's size or say that it is drilled.`
        : `${where}, less than the smallest tool, ${say(tool)}. Widen it to ${say(limit)}.`,
    remedy: null,
  };
}
