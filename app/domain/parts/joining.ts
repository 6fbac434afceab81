import type { DrawnPath } from "../drawing";
import { type Curve, distance, interpolate, type Path, type Point, pathLength, reversePath } from "../geometry";
import { faceBoundaries } from "./faces";
import { clusterPoints, type Pair, pairsWithin } from "./near-points";
import type { Bridge } from "./part";
import { PlanarGraph, type Step } from "./planar-graph";

export interface JoinTolerances {
  /** Ends nearer than this are one node. Millimetres, as all of these. */
  readonly node: number;
  /** Dangling ends up to this far apart are bridged and listed. */
  readonly bridge: number;
  /** Dangling ends up to this far apart are bridged and asked; at most `bridge` switches asking off. */
  readonly ask: number;
}

/** Paths joined end to end. `members` are the places of the joined paths in the input. */
export interface Chain {
  readonly path: Path;
  /** The layer that most of its length is drawn on. */
  readonly layer: string;
  readonly length: number;
  readonly members: readonly number[];
}

export interface Joined {
  readonly loops: readonly Chain[];
  readonly open: readonly Chain[];
  readonly bridges: readonly Bridge[];
  /** Nodes where more than two ends meet. */
  readonly branches: number;
}

