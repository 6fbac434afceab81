import type { Executor } from "~/db/client.server";
import type { Order } from "~/models/orders.server";
import { changeStage } from "./change-stage.server";
import { orRollBack } from "./verdict";

/** A quote that a person must look at before it can be paid waits for them, and says why. */
export async function sendToReview(tx: Executor, order: Order, reasons: readonly string[]): Promise<Order> {
  const { order: waiting } = orRollBack(
    await changeStage(tx, {
      order,
      to: "needs-review",
      act: "ask-review",
      by: { id: null, role: "system" },
      reason: `Because ${reasons.join("; ")}.`,
    }),
  );
  return waiting;
}
