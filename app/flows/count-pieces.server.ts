import { transact } from "~/db/client.server";
import { mayDo } from "~/domain/orders";
import { recordEvent } from "~/models/events.server";
import { findOrder } from "~/models/orders.server";
import { listPieces, setCounted } from "~/models/pieces.server";
import { type Actor, scopeOfActor } from "./actor";
import { answering, NO_ORDER, Refused, refuse, type Verdict } from "./verdict";

export interface CountPiecesOptions {
  readonly actor: Actor;
  readonly orderId: string;
  /** `all` counts every piece that is ready: the pile was counted at once. */
  readonly pieceIds: readonly string[] | "all";
  /** False takes a piece out of the count again. */
  readonly counted: boolean;
  readonly now?: Date;
}

/** The clerk counts pieces into an order's pile. Saying it twice counts once. */
export async function countPieces(
  options: CountPiecesOptions,
): Promise<Verdict<{ readonly counted: number; readonly expected: number }>> {
  const { actor, orderId, pieceIds, counted, now = new Date() } = options;
  if (!mayDo(actor.roles, "shipping.edit"))
    return refuse("not-allowed", "Counting into the pile is the clerk's.");
  return answering(() =>
    transact(async (tx) => {
      const order = await findOrder(tx, orderId, scopeOfActor(actor));
      if (!order) return NO_ORDER;
      if (order.stage === "shipped") throw new Refused(refuse("wrong-stage", "The pile has left the shop."));
      const good = (await listPieces(tx, order.id)).filter(({ state }) => state === "good");
      const ready = good.filter(({ stage }) => stage === "tabs-removed");
      const chosen = pieceIds === "all" ? ready : ready.filter(({ id }) => pieceIds.includes(id));
      if (pieceIds !== "all" && chosen.length < pieceIds.length)
        throw new Refused(
          refuse("wrong-stage", "A piece of these is not from this order's bench: its tabs are not off yet."),
        );
      const changing = chosen.filter(({ countedAt }) => (countedAt !== null) !== counted);
      await setCounted(tx, {
        orderId: order.id,
        ids: changing.map(({ id }) => id),
        at: counted ? now : null,
        by: counted ? actor.id : null,
      });
      if (changing.length > 0)
        await recordEvent(tx, { orderId: order.id, kind: "shipping", audience: "staff", data: { counted } });
      const before = good.filter(({ countedAt }) => countedAt !== null).length;
      return {
        ok: true as const,
        counted: before + (counted ? changing.length : -changing.length),
        expected: good.length,
      };
    }),
  );
}
