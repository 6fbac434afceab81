import type { Executor } from "~/db/client.server";
import { type Role, stageFromPieces } from "~/domain/orders";
import type { Order } from "~/models/orders.server";
import { type LabelledParcel, markHandedOver, standingLabel } from "~/models/parcels.server";
import { listPieces, movePieces } from "~/models/pieces.server";
import { changeStage } from "./change-stage.server";
import type { MoveOptions } from "./move.server";
import { mailStage } from "./order-mails.server";
import { orRollBack } from "./verdict";

/** An order whose leaving has been decided leaves: its pieces are shipped, and the builder is told, in one transaction. */
export async function leaveShop(
  tx: Executor,
  {
    taken: { order, role },
    options,
    parcels,
    at,
  }: {
    taken: { readonly order: Order; readonly role: Role };
    options: MoveOptions;
    parcels: readonly LabelledParcel[];
    at: Date;
  },
): Promise<Order> {
  const ids = (await listPieces(tx, order.id))
    .filter((piece) => piece.state === "good" && piece.stage === "tabs-removed")
    .map(({ id }) => id);
  await markHandedOver(tx, order.id, at);
  await movePieces(tx, { ids, from: "tabs-removed", to: "shipped" });
  const { order: shipped } = orRollBack(
    await changeStage(tx, {
      order,
      to: stageFromPieces(await listPieces(tx, order.id)) ?? order.stage,
      act: "ship",
      by: { id: options.actor.id, role },
      requestId: options.requestId,
      pieces: { ids, from: "tabs-removed", to: "shipped" },
      change: { shippedAt: at },
    }),
  );
  await mailStage(tx, {
    order: shipped,
    from: order.stage,
    parcels: parcels.map((parcel) => {
      const label = standingLabel(parcel);
      return {
        number: parcel.number,
        tracking: label?.trackingNumber ?? null,
        service: label?.service ?? null,
      };
    }),
  });
  return shipped;
}
