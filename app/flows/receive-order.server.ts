import { transact } from "~/db/client.server";
import { listParts } from "~/models/parts.server";
import { insertPieces, type NewPiece } from "~/models/pieces.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailStage } from "./order-mails.server";
import { answering, orRollBack, type Verdict } from "./verdict";

/** The shop takes a paid order in: from now on every copy of every part is a piece, n of N. */
export async function receiveOrder(options: MoveOptions): Promise<Verdict<Moved>> {
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "receive", options));
      if (taken.repeated) return answerMove(taken.order);
      const { order, to, role } = taken;
      if (order.revisionId === null) throw new Error(`Order ${order.reference} is paid without a revision.`);
      const parts = await listParts(tx, order.revisionId);
      await insertPieces(
        tx,
        parts.flatMap((part) =>
          Array.from(
            { length: part.quantity },
            (_, index): NewPiece => ({
              orderId: order.id,
              partId: part.id,
              stockGroupId: part.stockGroupId,
              number: index + 1,
              of: part.quantity,
              stage: "received",
            }),
          ),
        ),
      );
      const { order: received } = orRollBack(
        await changeStage(tx, {
          order,
          to,
          act: "receive",
          by: { id: options.actor.id, role },
          requestId: options.requestId,
        }),
      );
      await mailStage(tx, { order: received, from: order.stage });
      return answerMove(received);
    }),
  );
}
