import { transact } from "~/db/client.server";
import { stageFromPieces } from "~/domain/orders";
import { listNestsOfOrder, releasePlacements } from "~/models/nests.server";
import { insertPieces, listPieces, losePiece, type Piece } from "~/models/pieces.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailShortage } from "./order-mails.server";
import { settleNest } from "./settle-nest.server";
import { answering, orRollBack, Refused, refuse, type Verdict } from "./verdict";

export interface RemakePieceOptions extends MoveOptions {
  readonly pieceId: string;
  readonly state: "spoiled" | "missing";
  /** The cause: what happened to it. */
  readonly reason: string;
  readonly payer: NonNullable<Piece["payer"]>;
}

/**
 * A piece is spoiled or missing: it leaves the count, and another of the same part waits for the next nest. The
 * others go on; only shipping waits for the remake.
 */
export async function remakePiece(options: RemakePieceOptions): Promise<Verdict<Moved>> {
  const { pieceId, state, reason, payer } = options;
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "remake", options));
      if (taken.repeated) return answerMove(taken.order);
      const { order, role } = taken;
      const piece = (await listPieces(tx, order.id)).find((one) => one.id === pieceId);
      if (!piece) throw new Refused(refuse("not-found", "There is no such piece."));
      if (piece.stage === "received") throw new Refused(refuse("wrong-stage", "This piece is not made yet."));
      if (!(await losePiece(tx, piece.id, state)))
        throw new Refused(refuse("wrong-stage", `This piece is ${piece.state} already.`));
      const nests = await listNestsOfOrder(tx, order.id);
      if (piece.stage === "nested") await releasePlacements(tx, [piece.id]);
      await insertPieces(tx, [
        {
          orderId: order.id,
          partId: piece.partId,
          stockGroupId: piece.stockGroupId,
          number: piece.number,
          of: piece.of,
          stage: "received",
          remakeOf: piece.id,
          cause: reason,
          payer,
        },
      ]);
      const { order: after } = orRollBack(
        await changeStage(tx, {
          order,
          to: stageFromPieces(await listPieces(tx, order.id)) ?? order.stage,
          act: "remake",
          by: { id: options.actor.id, role },
          reason: `${piece.part.label} ${piece.number} of ${piece.of} ${state}: ${reason}`,
          requestId: options.requestId,
          pieces: { ids: [piece.id], from: piece.stage, to: "received" },
        }),
      );
      for (const nest of nests) await settleNest(tx, nest.id);
      await mailShortage(tx, {
        order: after,
        pieceId: piece.id,
        partLabel: piece.part.label,
        partName: piece.part.name,
        number: piece.number,
        of: piece.of,
        state,
        cause: reason,
        payer,
      });
      return answerMove(after);
    }),
  );
}
