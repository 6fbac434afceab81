import { type Executor, transact } from "~/db/client.server";
import { type PieceStage, SHOP_STAGES, stageFromPieces } from "~/domain/orders";
import { listNestsOfOrder, listRunsOfPieces } from "~/models/nests.server";
import type { Order } from "~/models/orders.server";
import { markHandedOver } from "~/models/parcels.server";
import { listPieces, movePieces, removePieces, setCounted, setParcel } from "~/models/pieces.server";
import { clearRuns } from "~/models/runs.server";
import { listMovesBackwards, type StageMove } from "~/models/stage-moves.server";
import { listStockGroups, reserveGroup } from "~/models/stock-groups.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { settleNest } from "./settle-nest.server";
import { answering, CHANGED, orRollBack, Refused, refuse, type Verdict } from "./verdict";

/** Acts that can be taken back by an undo; others have an act of their own that takes them back. */
const UNDONE_BY_UNDO = new Set(["receive", "cut", "remove-tabs", "ship"]);
const OTHERWISE: Readonly<Record<string, string>> = {
  nest: "Drop the nest instead: its sheets may hold pieces of other orders.",
  "drop-nest": "Nest the order again instead.",
  remake: "A piece that was marked stays marked; it is made again.",
  hold: "Release the order instead.",
};

/**
 * Takes back the last act on an order, one step, with a reason: its pieces go back to where they stood. What is
 * undone stays in the history.
 */
export async function undoMove(
  options: MoveOptions & {
    readonly reason: string;
    /** Only if this is the last act; anything done since is left as it is. */
    readonly only?: string | undefined;
  },
): Promise<Verdict<Moved & { undone: string }>> {
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, ["undo", "undo-ship"], options));
      if (taken.repeated) return { ...answerMove(taken.order), undone: "" };
      const { order, name, role } = taken;
      const last = await lastStanding(tx, order);
      if (!last || !UNDONE_BY_UNDO.has(last.act))
        throw new Refused(
          refuse("wrong-stage", (last && OTHERWISE[last.act]) ?? "There is no step to take back."),
        );
      if (options.only !== undefined && last.id !== options.only)
        throw new Refused(refuse("wrong-stage", "Something else was done on this order since."));
      const ids = last.pieceIds ?? [];
      const back =
        last.act === "receive" ? null : { ids, from: pieceStage(last.to), to: pieceStage(last.from) };
      if (back && (await movePieces(tx, back)) !== ids.length) throw new Refused(CHANGED);
      await takeBack(tx, order, last);
      const to = back ? (stageFromPieces(await listPieces(tx, order.id)) ?? order.stage) : ("paid" as const);
      const { order: after } = orRollBack(
        await changeStage(tx, {
          order,
          to,
          act: name,
          by: { id: options.actor.id, role },
          reason: options.reason,
          requestId: options.requestId,
          undoes: last.id,
          ...(back ? { pieces: back } : {}),
          ...(last.act === "ship" ? { change: { shippedAt: null } } : {}),
        }),
      );
      return { ...answerMove(after), undone: last.act };
    }),
  );
}

/** The last act that no later one takes back; releases and holds in between do not count. */
async function lastStanding(tx: Executor, order: Order): Promise<StageMove | undefined> {
  const moves = await listMovesBackwards(tx, order.id);
  const undone = new Set(moves.map((move) => move.undoes));
  return moves.find(
    (move) => move.undoes === null && !undone.has(move.id) && move.act !== "hold" && move.act !== "release",
  );
}

function pieceStage(stage: string): PieceStage {
  const found = SHOP_STAGES.find((one) => one === stage);
  if (!found) throw new Error(`${stage} is no stage of a piece.`);
  return found;
}

/** What went with the act beside the pieces' stages. */
async function takeBack(tx: Executor, order: Order, last: StageMove): Promise<void> {
  const ids = last.pieceIds ?? [];
  if (last.act === "receive") await removePieces(tx, order.id);
  if (last.act === "ship") await markHandedOver(tx, order.id, null);
  if (last.act === "remove-tabs") {
    await setCounted(tx, { orderId: order.id, ids, at: null, by: null });
    await setParcel(tx, ids, null);
  }
  if (last.act !== "cut") return;
  await clearRuns(tx, await listRunsOfPieces(tx, ids));
  for (const nest of await listNestsOfOrder(tx, order.id)) await settleNest(tx, nest.id);
  if (order.revisionId === null) return;
  for (const group of await listStockGroups(tx, order.id, order.revisionId))
    await reserveGroup(tx, group, new Date());
}
