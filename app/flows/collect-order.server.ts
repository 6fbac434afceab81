import { db, transact } from "~/db/client.server";
import { newId } from "~/db/new-id";
import { signatureSvg } from "~/documents/signature";
import { insertCollection } from "~/models/collections.server";
import { findOrder } from "~/models/orders.server";
import { listPieces } from "~/models/pieces.server";
import { storage } from "~/services/clients.server";
import { scopeOfActor } from "./actor";
import { leaveShop } from "./leave-shop.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { answering, NO_ORDER, orRollBack, Refused, refuse, type Verdict } from "./verdict";

export interface CollectOrderOptions extends MoveOptions {
  /** Of who takes it, as typed. */
  readonly name: string;
  /** The strokes drawn, each a row of points in a field of 600 by 200. */
  readonly strokes: readonly (readonly (readonly [number, number])[])[];
}

/** Fewer points than this are a slip of the finger, not a signature. */
const LEAST_POINTS = 8;

/** The builder fetches a paid, complete and counted order, and signs for it. */
export async function collectOrder(options: CollectOrderOptions): Promise<Verdict<Moved>> {
  const { actor, orderId, strokes } = options;
  const name = options.name.trim();
  if (!name) return refuse("incomplete", "Who takes it? Type the name.");
  if (strokes.reduce((points, stroke) => points + stroke.length, 0) < LEAST_POINTS)
    return refuse("incomplete", "A signature is missing.");
  if (!(await findOrder(db, orderId, scopeOfActor(actor)))) return NO_ORDER;
  const signatureKey = `signatures/${newId()}.svg`;
  await storage.put(signatureKey, new TextEncoder().encode(signatureSvg(strokes)), "image/svg+xml");
  const collected = await answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "ship", options));
      if (taken.repeated) return { ...answerMove(taken.order), wasNew: false };
      const { order } = taken;
      if (order.delivery !== "pick-up")
        throw new Refused(refuse("wrong-stage", "This order goes out by the carrier."));
      const good = (await listPieces(tx, order.id)).filter(({ state }) => state === "good");
      const uncounted = good.filter(({ countedAt }) => countedAt === null).length;
      if (uncounted > 0)
        throw new Refused(
          refuse("incomplete", `Count the pile first: ${uncounted} of ${good.length} are not counted.`),
        );
      await insertCollection(tx, { orderId: order.id, name, signatureKey, handedBy: actor.id });
      const at = options.now ?? new Date();
      const left = await leaveShop(tx, { taken, options, parcels: [], at });
      return { ...answerMove(left), wasNew: true };
    }),
  );
  if (!collected.ok) {
    await storage.remove(signatureKey);
    return collected;
  }
  if (!collected.wasNew) await storage.remove(signatureKey);
  return answerMove(collected.order);
}
