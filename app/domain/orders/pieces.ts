import { type PieceStage, SHOP_STAGES } from "./stage";

/** A piece as the stage of its order needs it. */
export interface PieceFacts {
  readonly stage: PieceStage;
  readonly state: "good" | "spoiled" | "missing" | "cancelled";
  /** The piece it replaces. */
  readonly remakeOf: string | null;
}

const rank = (stage: PieceStage): number => SHOP_STAGES.indexOf(stage);
const earliest = (pieces: readonly PieceFacts[]): PieceStage | null =>
  pieces.reduce<PieceStage | null>(
    (least, { stage }) => (least === null || rank(stage) < rank(least) ? stage : least),
    null,
  );

/**
 * The stage that all of an order's pieces have reached; null when it has none. A remake does not hold the others'
 * progress, but it holds shipping: `shipped` is reached only when every good piece has left.
 */
export function stageFromPieces(pieces: readonly PieceFacts[]): PieceStage | null {
  const good = pieces.filter((piece) => piece.state === "good");
  const first = good.filter((piece) => piece.remakeOf === null);
  const reached = earliest(first.length > 0 ? first : good);
  if (reached === "shipped" && earliest(good) !== "shipped") return "tabs-removed";
  return reached;
}

/** How many good pieces have reached each shop stage, the ones before it included. */
export function progressOf(
  pieces: readonly PieceFacts[],
): readonly { readonly stage: PieceStage; readonly reached: number; readonly of: number }[] {
  const good = pieces.filter((piece) => piece.state === "good");
  return SHOP_STAGES.map((stage) => ({
    stage,
    reached: good.filter((piece) => rank(piece.stage) >= rank(stage)).length,
    of: good.length,
  }));
}

/** Every good piece, remakes included, has reached the stage, and there is at least one. */
export function allReached(pieces: readonly PieceFacts[], stage: PieceStage): boolean {
  const good = pieces.filter((piece) => piece.state === "good");
  return good.length > 0 && good.every((piece) => rank(piece.stage) >= rank(stage));
}
