import { transact } from "~/db/client.server";
import { stageFromPieces } from "~/domain/orders";
import { dayOf } from "~/domain/scheduling";
import { type FlatPiece, parcelLimits, type SuggestedParcel, suggestParcels } from "~/domain/shipping";
import { panelKilograms } from "~/domain/units";
import { listParcels, markHandedOver, type NewParcel, replaceParcels } from "~/models/parcels.server";
import { listPieces, movePieces, type PieceWithPart, setParcel } from "~/models/pieces.server";
import { currentSettings } from "~/models/settings.server";
import { listStockGroups, type StockedGroup } from "~/models/stock-groups.server";
import { changeStage } from "./change-stage.server";
import { answerMove, type Moved, type MoveOptions, takeMove } from "./move.server";
import { mailStage } from "./order-mails.server";
import { answering, orRollBack, type Verdict } from "./verdict";

type Tx = Parameters<Parameters<typeof transact>[0]>[0];

/**
 * Hands a complete and paid order over, to the carrier or to the builder who picks it up: its pieces packed as
 * suggested, in parcels written down.
 */
export async function shipOrder(options: MoveOptions): Promise<Verdict<Moved & { parcels: number }>> {
  return answering(() =>
    transact(async (tx) => {
      const taken = orRollBack(await takeMove(tx, "ship", options));
      if (taken.repeated)
        return { ...answerMove(taken.order), parcels: (await listParcels(tx, taken.order.id)).length };
      const { order, role } = taken;
      const at = new Date();
      const pieces = (await listPieces(tx, order.id)).filter((piece) => piece.state === "good");
      const packed = await suggestOrderParcels(tx, order, at);
      const parcels = await replaceParcels(tx, {
        orderId: order.id,
        packedBy: options.actor.id,
        packed: packed.map(parcelRow),
      });
      for (const [index, parcel] of parcels.entries())
        await setParcel(tx, packed[index]?.pieces ?? [], parcel.id);
      await markHandedOver(tx, order.id, at);
      const ids = pieces.map((piece) => piece.id);
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
      await mailStage(tx, { order: shipped, from: order.stage });
      return { ...answerMove(shipped), parcels: parcels.length };
    }),
  );
}

const parcelRow = ({ length, width, height, kilograms }: SuggestedParcel): NewParcel => ({
  length,
  width,
  height,
  weight: kilograms,
});

/** How an order's good pieces would be packed, by piece ids. */
export async function suggestOrderParcels(
  executor: Tx,
  order: { readonly id: string; readonly revisionId: string | null },
  now: Date,
): Promise<readonly SuggestedParcel[]> {
  if (order.revisionId === null) return [];
  const groups = await listStockGroups(executor, order.id, order.revisionId);
  const pieces = (await listPieces(executor, order.id)).filter((piece) => piece.state === "good");
  const { shop } = await currentSettings(executor);
  const limits = parcelLimits("private", dayOf(now, shop.timeZone));
  if (!limits) throw new Error("No parcel limits are known for this day.");
  return suggestParcels(
    pieces.map((piece) => flatPiece(piece, groups)),
    limits,
  );
}

function flatPiece(piece: PieceWithPart, groups: readonly StockedGroup[]): FlatPiece {
  const group = groups.find((one) => one.id === piece.stockGroupId);
  if (!group) throw new Error(`Piece ${piece.id} names a stock group of another revision.`);
  const { part } = piece;
  const nominal = group.material.nominalThickness;
  return {
    id: piece.id,
    width: part.width,
    height: part.height,
    thickness: group.lot?.thicknessMax ?? nominal,
    kilograms: panelKilograms(part.area, group.lot?.thicknessMean ?? nominal, group.material.density),
  };
}
