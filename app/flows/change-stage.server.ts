import type { Executor } from "~/db/client.server";
import type { PieceStage, Role, Stage } from "~/domain/orders";
import { recordEvent } from "~/models/events.server";
import { changeOrder, type OrderChange } from "~/models/order-writes.server";
import type { Order } from "~/models/orders.server";
import { insertStageMove } from "~/models/stage-moves.server";
import { CHANGED, type Verdict } from "./verdict";

export interface StageChange {
  readonly order: Order;
  /** The order's stage afterwards; may be the one it has, when only pieces moved. */
  readonly to: Stage;
  readonly act: string;
  readonly by: { readonly id: string | null; readonly role: Role | "system" };
  readonly reason?: string | null | undefined;
  readonly requestId?: string | null | undefined;
  readonly undoes?: string | null | undefined;
  /** When pieces moved: which, and between which of their own stages. The audit row then names these. */
  readonly pieces?: { readonly ids: readonly string[]; readonly from: PieceStage; readonly to: PieceStage };
  /** When the order stays on hold and what it goes on to changes underneath. */
  readonly underHold?: { readonly from: Stage; readonly to: Stage };
  /** What else changes on the order with it. */
  readonly change?: OrderChange;
}

/**
 * Changes an order's stage, its audit row and what live pages are told, in the caller's transaction. Refuses when
 * somebody changed the order since it was read.
 */
export async function changeStage(tx: Executor, move: StageChange): Promise<Verdict<{ order: Order }>> {
  const { order, to, pieces } = move;
  const changed = await changeOrder(tx, {
    orderId: order.id,
    version: order.version,
    change: { ...move.change, stage: to },
  });
  if (!changed) return CHANGED;
  const recorded = await insertStageMove(tx, {
    orderId: order.id,
    pieceIds: pieces ? [...pieces.ids] : null,
    from: pieces?.from ?? move.underHold?.from ?? order.stage,
    to: pieces?.to ?? move.underHold?.to ?? to,
    act: move.act,
    actorId: move.by.id,
    actorRole: move.by.role,
    reason: move.reason ?? null,
    undoes: move.undoes ?? null,
    requestId: move.requestId ?? null,
  });
  if (!recorded) return CHANGED;
  if (pieces)
    await recordEvent(tx, {
      orderId: order.id,
      kind: "pieces",
      data: { from: pieces.from, to: pieces.to, count: pieces.ids.length },
    });
  if (order.stage !== to)
    await recordEvent(tx, { orderId: order.id, kind: "stage", data: { from: order.stage, to } });
  return { ok: true, order: changed };
}
