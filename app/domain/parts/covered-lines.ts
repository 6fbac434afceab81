import Flatbush from "flatbush";
import { type Curve, curveBox, distancePointToCurve, pointAt } from "../geometry";
import type { Chain } from "./joining";
import type { Outline } from "./outline";

/** A line this near an outline all along lies on it, millimetres. */
const ON_IT = 0.001;
/** The middle first and the ends last: there other curves may meet in crowds. */
const PROBED_AT = [0.5, 0.25, 0.75, 0, 1];

export interface Uncovered {
  readonly open: readonly Chain[];
  /** Chains that lie on outlines from end to end: drawn a second time, as one side of a closed polyline is. */
  readonly covered: readonly Chain[];
}

/** Parts open chains from those that lie on outlines all along. */
export function partCovered(chains: readonly Chain[], outlines: readonly Outline[]): Uncovered {
  const curves = outlines.flatMap(({ path }) => path.curves);
  if (chains.length === 0 || curves.length === 0) return { open: chains, covered: [] };
  const index = new Flatbush(curves.length);
  for (const curve of curves) {
    const { minX, minY, maxX, maxY } = curveBox(curve);
    index.add(minX - ON_IT, minY - ON_IT, maxX + ON_IT, maxY + ON_IT);
  }
  index.finish();
  const lies = (curve: Curve): boolean =>
    PROBED_AT.every((t) => {
      const point = pointAt(curve, t);
      return index
        .search(point.x, point.y, point.x, point.y)
        .some((i) => distancePointToCurve(curves[i], point, ON_IT) <= ON_IT);
    });
  const open: Chain[] = [];
  const covered: Chain[] = [];
  for (const chain of chains) (chain.path.curves.every(lies) ? covered : open).push(chain);
  return { open, covered };
}
