import type { Feature } from "../parts";
import { featurePlace } from "./feature-place";
import type { FitRule } from "./finding";

/**
 * Pockets that come out at the far face where the stock is thinnest, or that leave more than there is. A drill
 * that does is asked: a hole through may be what is meant.
 */
export const pocketDeeperThanStock: FitRule = ({ report, stock, say }) =>
  report.parts.flatMap((part) =>
    part.features.flatMap((feature) => {
      const reached = depthOf(feature);
      if (reached === null) return [];
      const { min, max } = stock.thickness;
      const limit = reached.leaves ? max : min;
      if (reached.value < limit) return [];
      const name = feature.kind === "drill" ? "A drilled hole" : "A pocket";
      return [
        {
          code: "pocket-deeper-than-stock",
          severity: feature.kind === "drill" ? ("ask" as const) : ("stop" as const),
          part: part.id,
          copy: null,
          at: featurePlace(feature),
          measured: reached.value,
          limit,
          words: reached.leaves
            ? `${name} in part ${part.name} is to leave ${say(reached.value)}; the stock is ${say(max)} at most. Nothing would be cut.`
            : `${name} in part ${part.name} is ${say(reached.value)} deep; the stock is ${say(min)} at its thinnest. It would come through: make it shallower or cut it through.`,
          remedy: null,
        },
      ];
    }),
  );

/** How deep a pocket or hole goes, or how much it leaves; null for what goes through or says nothing. */
function depthOf({ kind, depth }: Feature): { readonly value: number; readonly leaves: boolean } | null {
  if ((kind !== "pocket" && kind !== "drill") || depth === null) return null;
  return "leave" in depth ? { value: depth.leave, leaves: true } : { value: depth.depth, leaves: false };
}
