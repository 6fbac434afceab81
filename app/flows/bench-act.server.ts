import { z } from "zod";
import { db } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { listPiecesById } from "~/models/pieces.server";
import { listMovesByRequest } from "~/models/stage-moves.server";
import type { Actor } from "./actor";
import { movePieces } from "./move-pieces.server";
import { remakePiece } from "./remake-piece.server";
import { undoMove } from "./undo-move.server";
import { refuse, type Verdict } from "./verdict";

/** What the tabs-off bench sends; its own id lets it be sent again after a broken line. */
export const benchActSchema = z.discriminatedUnion("kind", [
  z.object({
    kind: z.literal("good"),
    requestId: z.uuid(),
    pieceIds: z.array(z.string()).min(1).max(2000),
  }),
  z.object({
    kind: z.literal("lost"),
    requestId: z.uuid(),
    pieceId: z.string(),
    state: z.enum(["spoiled", "missing"]),
    cause: z.string().trim().min(3).max(500),
    payer: z.enum(["shop", "builder", "carrier", "supplier"]),
  }),
  z.object({ kind: z.literal("undo"), requestId: z.uuid(), of: z.uuid() }),
]);
export type BenchAct = z.output<typeof benchActSchema>;

/**
 * Does one act of the bench, on pieces of however many orders: tabs off and good, lost and made again, or the last
 * "good" taken back. The same act sent twice is done once.
 */
export async function benchAct(actor: Actor, act: BenchAct): Promise<Verdict<{ readonly changed: number }>> {
  if (!mayDo(actor.roles, "piece.move")) return refuse("not-allowed", "The bench is the operator's.");
  switch (act.kind) {
    case "good":
      return takeTabsOff(actor, act.requestId, act.pieceIds);
    case "lost":
      return loseOne(actor, act);
    case "undo":
      return takeBack(actor, act);
  }
}

async function takeTabsOff(
  actor: Actor,
  requestId: string,
  pieceIds: readonly string[],
): Promise<Verdict<{ changed: number }>> {
  const pieces = await listPiecesById(db, pieceIds);
  if (pieces.length < pieceIds.length) return refuse("not-found", "There is no such piece.");
  const off = ({ stage }: { stage: string }) => stage === "tabs-removed" || stage === "shipped";
  const stuck = pieces.find((piece) => piece.state !== "good" || !(off(piece) || piece.stage === "cut"));
  if (stuck)
    return refuse(
      "wrong-stage",
      `${stuck.part.label} ${stuck.number} of ${stuck.of} is ${stuck.state === "good" ? stuck.stage : stuck.state}: it is not for the bench.`,
    );
  let changed = 0;
  for (const orderId of new Set(pieces.map((piece) => piece.orderId))) {
    const ids = pieces
      .filter((piece) => piece.orderId === orderId && piece.stage === "cut")
      .map(({ id }) => id);
    if (ids.length === 0) continue;
    const moved = await movePieces({
      actor,
      orderId,
      version: null,
      act: "remove-tabs",
      pieceIds: ids,
      requestId,
    });
    if (!moved.ok) return moved;
    changed += moved.moved;
  }
  return { ok: true, changed };
}

async function loseOne(
  actor: Actor,
  { requestId, pieceId, state, cause, payer }: Extract<BenchAct, { kind: "lost" }>,
): Promise<Verdict<{ changed: number }>> {
  const [piece] = await listPiecesById(db, [pieceId]);
  if (!piece) return refuse("not-found", "There is no such piece.");
  const remade = await remakePiece({
    actor,
    orderId: piece.orderId,
    version: null,
    requestId,
    pieceId,
    state,
    reason: cause,
    payer,
  });
  return remade.ok ? { ok: true, changed: 1 } : remade;
}

async function takeBack(
  actor: Actor,
  { requestId, of }: Extract<BenchAct, { kind: "undo" }>,
): Promise<Verdict<{ changed: number }>> {
  const moves = (await listMovesByRequest(db, of)).filter(({ act }) => act === "remove-tabs");
  if (moves.length === 0) return refuse("not-found", "There is nothing to take back.");
  let changed = 0;
  for (const move of moves) {
    const undone = await undoMove({
      actor,
      orderId: move.orderId,
      version: null,
      requestId,
      reason: "Taken back at the bench.",
      only: move.id,
    });
    if (!undone.ok) return undone;
    changed += move.pieceIds?.length ?? 0;
  }
  return { ok: true, changed };
}
