import { transact } from "~/db/client.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailStage } from "./order-mails.server";
import { answering, orRollBack, type Verdict } from "./verdict";

/** Ends a hold: the order goes on from where it stood. */
export async function releaseOrder(options: MoveOptions): Promise<Verdict<Moved>> {
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "release", options));
      if (taken.repeated) return answerMove(taken.order);
      const { order, to, role } = taken;
      const { order: released } = orRollBack(
        await changeStage(tx, {
          order,
          to,
          act: "release",
          by: { id: options.actor.id, role },
          reason: options.reason,
          requestId: options.requestId,
          change: { heldFrom: null, holdReason: null },
        }),
      );
      await mailStage(tx, { order: released, from: order.stage });
      return answerMove(released);
    }),
  );
}
