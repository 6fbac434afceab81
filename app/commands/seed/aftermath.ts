import { db } from "~/db/client.server";
import { newId } from "~/db/new-id";
import { cancelOrder } from "~/flows/cancel-order.server";
import { holdOrder } from "~/flows/hold-order.server";
import { refundOrder } from "~/flows/refund-order.server";
import { remakePiece } from "~/flows/remake-piece.server";
import { undoMove } from "~/flows/undo-move.server";
import type { Verdict } from "~/flows/verdict";
import { listPaidCheckouts } from "~/models/checkouts.server";
import type { Order } from "~/models/orders.server";
import { listPieces } from "~/models/pieces.server";
import type { SeededOrder } from "./orders";
import type { SeededPeople } from "./people";

/** What happened to an order besides its way through the shop. */
export async function afterwards(
  order: Order,
  happened: NonNullable<SeededOrder["aftermath"]>,
  { operator, owner, trailer }: SeededPeople,
): Promise<void> {
  const verdict = await act(order, happened, { operator, owner, trailer });
  if (!verdict.ok) throw new Error(`${order.name}: ${verdict.words}`);
}

type Actors = Pick<SeededPeople, "operator" | "owner" | "trailer">;

async function act(
  { id: orderId, version }: Order,
  happened: NonNullable<SeededOrder["aftermath"]>,
  { operator, owner, trailer }: Actors,
): Promise<Verdict> {
  switch (happened) {
    case "hold":
      return holdOrder({
        actor: operator,
        orderId,
        version,
        reason: "The boards in this lot are warped; a new stack comes on Thursday.",
      });
    case "cancel":
      return cancelOrder({ actor: trailer, orderId, version, reason: "The window is kept as it is." });
    case "cancel-late":
      return cancelOrder({
        actor: owner,
        orderId,
        version,
        reason: "The kettle was never delivered; its sheet goes back to the rack.",
      });
    case "undo":
      return undoMove({
        actor: operator,
        orderId,
        version,
        reason: "Counted on the table: one sheet is still on the router.",
      });
    case "remake": {
      const piece = (await listPieces(db, orderId)).find(({ state }) => state === "good");
      if (!piece) throw new Error("There is no piece to make again.");
      return remakePiece({
        actor: operator,
        orderId,
        version,
        pieceId: piece.id,
        state: "spoiled",
        reason: "A void in the core opened along the edge.",
        payer: "supplier",
      });
    }
    case "refund": {
      const [checkout] = await listPaidCheckouts(db, orderId);
      if (!checkout) throw new Error("Nothing was paid.");
      return refundOrder({
        actor: owner,
        orderId,
        checkoutId: checkout.id,
        refundId: newId(),
        amount: 1_850,
        reason: "One tray came with a bruised corner.",
      });
    }
  }
}
