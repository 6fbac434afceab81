import { transact } from "~/db/client.server";
import { type PieceStage, stageFromPieces } from "~/domain/orders";
import { listNestsOfOrder } from "~/models/nests.server";
import { listPieces, movePieces as writePieces } from "~/models/pieces.server";
import { listStockGroups, releaseGroup } from "~/models/stock-groups.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailStage } from "./order-mails.server";
import { settleNest } from "./settle-nest.server";
import { answering, CHANGED, orRollBack, Refused, refuse, type Verdict } from "./verdict";

/** Acts on pieces, and between which of their stages each moves them. Nesting and shipping have flows of their own. */
export const PIECE_ACTS = {
  cut: { from: "nested", to: "cut" },
  "remove-tabs": { from: "cut", to: "tabs-removed" },
} as const satisfies Record<string, { from: PieceStage; to: PieceStage }>;
export type PieceAct = keyof typeof PIECE_ACTS;

export interface MovePiecesOptions extends MoveOptions {
  readonly act: PieceAct;
  /** `all` moves every good piece that stands where the act begins: "all good". */
  readonly pieceIds: readonly string[] | "all";
}

/** Moves pieces of one order on by one stage; the order's stage follows from all of its pieces. */
export async function movePieces(options: MovePiecesOptions): Promise<Verdict<Moved & { moved: number }>> {
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, options.act, options));
      if (taken.repeated) return { ...answerMove(taken.order), moved: 0 };
      const { order, role } = taken;
      const { from, to } = PIECE_ACTS[options.act];
      const standing = (await listPieces(tx, order.id)).filter(
        (piece) => piece.stage === from && piece.state === "good",
      );
      const chosen =
        options.pieceIds === "all"
          ? standing
          : standing.filter((piece) => options.pieceIds.includes(piece.id));
      if (chosen.length === 0)
        throw new Refused(refuse("wrong-stage", `No piece of this order is ${from} now.`));
      if (options.pieceIds !== "all" && chosen.length !== options.pieceIds.length) throw new Refused(CHANGED);
      const ids = chosen.map((piece) => piece.id);
      const moved = await writePieces(tx, { ids, from, to });
      const { order: after } = orRollBack(
        await changeStage(tx, {
          order,
          to: stageFromPieces(await listPieces(tx, order.id)) ?? order.stage,
          act: options.act,
          by: { id: options.actor.id, role },
          reason: options.reason,
          requestId: options.requestId,
          pieces: { ids, from, to },
        }),
      );
      for (const nest of await listNestsOfOrder(tx, order.id)) await settleNest(tx, nest.id);
      if (after.stage !== order.stage) await mailStage(tx, { order: after, from: order.stage });
      if (after.stage === "cut" && after.revisionId !== null)
        for (const group of await listStockGroups(tx, after.id, after.revisionId))
          await releaseGroup(tx, group);
      return { ...answerMove(after), moved };
    }),
  );
}
