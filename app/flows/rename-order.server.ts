import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { changeOrder } from "~/models/order-writes.server";
import { findOrder } from "~/models/orders.server";
import { type Actor, scopeOfActor } from "./actor";
import { answerMove, type Moved } from "./move.server";
import { CHANGED, NO_ORDER, refuse, type Verdict } from "./verdict";

export interface RenameOrderOptions {
  readonly actor: Actor;
  readonly orderId: string;
  readonly version: number;
  readonly name: string;
  /** A run in cheap stock before the good panels are spent; kept as it is when left out. */
  readonly trial?: boolean;
}

const LONGEST_NAME = 80;

/** What the builder calls the order, and whether it is a trial; until it is quoted. */
export async function renameOrder(options: RenameOrderOptions): Promise<Verdict<Moved>> {
  const { actor, orderId, version, trial } = options;
  const name = options.name.trim();
  if (!mayDo(actor.roles, "order.edit")) return refuse("not-allowed", "This order is not yours to change.");
  if (name === "" || name.length > LONGEST_NAME)
    return refuse("invalid", `A name has 1 to ${LONGEST_NAME} characters.`);
  return transact(async (tx): Promise<Verdict<Moved>> => {
    const order = await findOrder(tx, orderId, scopeOfActor(actor));
    if (!order) return NO_ORDER;
    if (order.stage !== "draft")
      return refuse(
        "wrong-stage",
        "This order is quoted already. Take it back to draft before you change it.",
      );
    const changed = await changeOrder(tx, {
      orderId,
      version,
      change: trial === undefined ? { name } : { name, trial },
    });
    return changed ? answerMove(changed) : CHANGED;
  });
}
