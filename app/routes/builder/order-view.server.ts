import type { Person } from "~/auth/guards.server";
import { db } from "~/db/client.server";
import { MAIN_LINE, type Stage } from "~/domain/orders";
import { newestEventId } from "~/models/events.server";
import type { Order } from "~/models/orders.server";
import { findNewestRevision } from "~/models/revisions.server";
import { currentSettings } from "~/models/settings.server";
import { listStageMoves } from "~/models/stage-moves.server";
import { draftView } from "./draft-view.server";
import { frozenView } from "./frozen-view.server";

/** An order as its builder's page shows it. Instants are ISO strings, money integer cents, lengths millimetres. */
export async function orderView(order: Order, person: Person) {
  const now = new Date();
  /* Read first: whatever happens while the rest is read is told to the page once it is there. */
  const eventId = await newestEventId(db, order.id);
  const moves = await listStageMoves(db, order.id);
  const frozen = order.stage === "draft" ? null : await frozenView(order, person.roles, now);
  const content = frozen ?? (await draftView(order, person));
  const { shop, upload } = await currentSettings(db);
  const reached: Partial<Record<Stage, string>> = { draft: order.createdAt.toISOString() };
  for (const { to, createdAt } of moves) reached[to] ??= createdAt.toISOString();
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    stage: order.stage,
    version: order.version,
    trial: order.trial,
    holdReason: order.holdReason,
    reviewAsked: order.reviewAsked,
    delivery: order.delivery,
    shipTo: order.shipTo,
    eventId,
    /** Made here, so that the same act sent twice moves once. */
    requestId: crypto.randomUUID(),
    nextRevision: ((await findNewestRevision(db, order.id))?.number ?? 0) + 1,
    shop: { name: shop.name, email: shop.email, phone: shop.phone, address: shop.address },
    upload,
    rule: {
      stage: order.stage,
      heldFrom: order.heldFrom,
      reached,
      further: frozen?.pieces ? furtherThan(order, frozen.pieces.progress) : 0,
      promisedFor: order.promisedFor?.toISOString() ?? null,
      shippedAt: order.shippedAt?.toISOString() ?? null,
      now: now.toISOString(),
    },
    moves: moves.map(({ id, from, to, act, actorRole, reason, undoes, createdAt }) => ({
      id,
      from,
      to,
      act,
      by: actorRole,
      reason,
      undone: undoes !== null,
      at: createdAt.toISOString(),
    })),
    content,
  };
}
export type OrderView = Awaited<ReturnType<typeof orderView>>;

/** Share of the pieces that have reached the stage after the order's own. */
function furtherThan(
  order: Order,
  progress: readonly { readonly stage: Stage; readonly reached: number; readonly of: number }[],
): number {
  const standing = order.stage === "on-hold" ? order.heldFrom : order.stage;
  const line: readonly (Stage | null)[] = MAIN_LINE;
  const next = line[line.indexOf(standing) + 1];
  const there = progress.find(({ stage }) => stage === next);
  return there && there.of > 0 ? there.reached / there.of : 0;
}
