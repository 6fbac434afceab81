import { transact } from "~/db/client.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailHold } from "./order-mails.server";
import { answering, orRollBack, type Verdict } from "./verdict";

/** Stops an order where it stands, with a reason the builder is told; it goes on from there when released. */
export async function holdOrder(options: MoveOptions & { readonly reason: string }): Promise<Verdict<Moved>> {
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "hold", options));
      if (taken.repeated) return answerMove(taken.order);
      const { order, to, role } = taken;
      const { order: held } = orRollBack(
        await changeStage(tx, {
          order,
          to,
          act: "hold",
          by: { id: options.actor.id, role },
          reason: options.reason,
          requestId: options.requestId,
          change: { heldFrom: order.stage, holdReason: options.reason },
        }),
      );
      await mailHold(tx, { order: held, reason: options.reason });
      return answerMove(held);
    }),
  );
}
