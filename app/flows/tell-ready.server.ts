import { transact } from "~/db/client.server";
import { checkMove } from "~/domain/orders";
import { recordAct } from "~/models/audit.server";
import { recordEvent } from "~/models/events.server";
import { findOrder } from "~/models/orders.server";
import { listPieces } from "~/models/pieces.server";
import { type Actor, scopeOfActor } from "./actor";
import { refusalOfMove } from "./move.server";
import { factsOfOrder } from "./order-facts.server";
import { mailReadyToCollect } from "./order-mails.server";
import { packingOf } from "./suggest-bundles.server";
import { answering, NO_ORDER, Refused, refuse, type Verdict } from "./verdict";

/** The act under which a ready notice stands in the audit. */
export const READY_ACT = "tell-ready";

/** Tells the builder that the pile waits, once it is paid, complete and counted. Told again only on purpose. */
export async function tellReady({
  actor,
  orderId,
  requestId,
  now = new Date(),
}: {
  readonly actor: Actor;
  readonly orderId: string;
  /** The same request tells once. */
  readonly requestId: string;
  readonly now?: Date;
}): Promise<Verdict> {
  return answering(() =>
    transact(async (tx) => {
      const order = await findOrder(tx, orderId, scopeOfActor(actor));
      if (!order) return NO_ORDER;
      const verdict = checkMove("ship", await factsOfOrder(tx, order, now), actor.roles);
      if (!verdict.ok) throw new Refused(refusalOfMove(verdict));
      if (order.delivery !== "pick-up")
        throw new Refused(refuse("wrong-stage", "This order goes out by the carrier."));
      const good = (await listPieces(tx, order.id)).filter(({ state }) => state === "good");
      const uncounted = good.filter(({ countedAt }) => countedAt === null).length;
      if (uncounted > 0)
        throw new Refused(
          refuse("incomplete", `Count the pile first: ${uncounted} of ${good.length} are not counted.`),
        );
      const { pieces } = await packingOf(tx, order, now);
      const weights = pieces.map(({ kilograms }) => kilograms);
      await mailReadyToCollect(tx, {
        order,
        requestId,
        pieces: good.length,
        kilograms: weights.reduce((sum, one) => sum + one, 0),
        heaviest: Math.max(...weights),
      });
      await recordAct(tx, { actorId: actor.id, act: READY_ACT, subject: { kind: "order", id: order.id } });
      await recordEvent(tx, { orderId: order.id, kind: "shipping", data: { ready: true } });
      return { ok: true as const };
    }),
  );
}
