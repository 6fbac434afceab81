import { distance } from "../geometry";
import { type Chain, pathEnd, pathStart } from "./joining";
import type { OpenChain } from "./part";

/** An open chain as it is reported, pinned at its start; a closed outline that stands in no part has no gap. */
export function openChainOf({ path, layer, length }: Chain): OpenChain {
  const at = pathStart(path);
  return { layer, length, gap: path.closed ? 0 : distance(at, pathEnd(path)), at, curves: path.curves };
}
