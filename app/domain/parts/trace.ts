import type { DrawnPath } from "../drawing";
import { distinctOutlines, findDuplicates } from "./duplicates";
import { type Chain, type Joined, type JoinTolerances, joinPaths } from "./joining";
import { type Outline, outlinesOf } from "./outline";

export interface TraceTolerances extends JoinTolerances {
  /** Curves nearer than this everywhere are the same, millimetres. */
  readonly same: number;
}

/** Paths once joined, with the outlines that they make. */
export interface Trace {
  readonly joined: Joined;
  /** Those that enclose something, each once. */
  readonly outlines: readonly Outline[];
  /** Closed chains that enclose nothing. */
  readonly flat: readonly Chain[];
  /** For each path the place of an earlier equal one, or -1; only those with -1 are joined. */
  readonly duplicates: Int32Array;
}

/** Leaves out what is drawn twice, joins the rest and takes the outlines. */
export function tracePaths(paths: readonly DrawnPath[], tolerances: TraceTolerances): Trace {
  const duplicates = findDuplicates(paths, tolerances.same);
  const joined = joinPaths(
    paths.filter((_, i) => duplicates[i] < 0),
    tolerances,
  );
  const { outlines, flat } = outlinesOf(joined.loops, tolerances.node);
  return { joined, outlines: distinctOutlines(outlines, tolerances.same), flat, duplicates };
}
