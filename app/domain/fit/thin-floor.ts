import type { Feature } from "../parts";
import { featurePlace } from "./feature-place";
import type { FitCase, FitRule } from "./finding";

/** A hinge cup's diameter, millimetres, and how exactly it must be met. */
const CUP_DIAMETER = 35;
const CUP_SLACK = 0.5;

/** Floors left under pockets and hinge cups where the stock is thinnest. Other drilled holes may go as deep as they like. */
export const thinFloor: FitRule = (fit) =>
  fit.report.parts.flatMap((part) =>
    part.features.flatMap((feature) => {
      const floor = floorOf(feature, fit);
      if (floor === null || floor <= 0) return [];
      const isCup = isHingeCup(feature);
      const { limits, say } = fit;
      const asked = isCup ? limits.thinCupFloor : limits.thinFloor;
      const stopped = isCup ? limits.thinnestCupFloor : limits.thinnestFloor;
      if (floor >= asked) return [];
      const isStop = floor < stopped;
      const name = isCup ? "The hinge cup" : "A pocket";
      return [
        {
          code: "thin-floor",
          severity: isStop ? ("stop" as const) : ("ask" as const),
          part: part.id,
          copy: null,
          at: featurePlace(feature),
          measured: floor,
          limit: isStop ? stopped : asked,
          words: isStop
            ? `${name} in part ${part.name} leaves a floor of ${say(floor)}, under ${say(stopped)}. Make it shallower.`
            : `${name} in part ${part.name} leaves a floor of ${say(floor)}, under ${say(asked)}. It may drum or print through: is that meant?`,
          remedy: null,
        },
      ];
    }),
  );

const isHingeCup = ({ diameter }: Feature): boolean =>
  diameter !== null && Math.abs(diameter - CUP_DIAMETER) <= CUP_SLACK;

/** What is left at the thinnest spot of the stock; null where nothing is cut to a depth that leaves a floor to speak of. */
function floorOf(feature: Feature, { stock }: FitCase): number | null {
  const { kind, depth } = feature;
  if (depth === null || (kind !== "pocket" && !(kind === "drill" && isHingeCup(feature)))) return null;
  return "leave" in depth ? depth.leave : stock.thickness.min - depth.depth;
}
