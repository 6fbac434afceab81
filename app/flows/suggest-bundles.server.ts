import type { Executor } from "~/db/client.server";
import { dayOf } from "~/domain/scheduling";
import {
  type FlatPiece,
  type ParcelLimits,
  parcelLimits,
  type SuggestedParcel,
  suggestParcels,
} from "~/domain/shipping";
import { panelKilograms } from "~/domain/units";
import { listPieces, type PieceWithPart } from "~/models/pieces.server";
import { currentSettings } from "~/models/settings.server";
import { listStockGroups, type StockedGroup } from "~/models/stock-groups.server";

interface OrderToPack {
  readonly id: string;
  readonly revisionId: string | null;
}

export interface Packing {
  /** The order's good pieces as they lie in a stack. */
  readonly pieces: readonly FlatPiece[];
  readonly limits: ParcelLimits;
}

/** The limits of parcel carriers today, in the shop's zone. */
export async function limitsToday(executor: Executor, now: Date): Promise<ParcelLimits> {
  const { shop } = await currentSettings(executor);
  const limits = parcelLimits("private", dayOf(now, shop.timeZone));
  if (!limits) throw new Error("No parcel limits are known for this day.");
  return limits;
}

/** What an order's parcels are made of: the size and weight of each good piece, by the lot it was cut from. */
export async function packingOf(executor: Executor, order: OrderToPack, now: Date): Promise<Packing> {
  const limits = await limitsToday(executor, now);
  if (order.revisionId === null) return { pieces: [], limits };
  const groups = await listStockGroups(executor, order.id, order.revisionId);
  const good = (await listPieces(executor, order.id)).filter((piece) => piece.state === "good");
  return { pieces: good.map((piece) => flatPiece(piece, groups)), limits };
}

/** How an order's good pieces would be packed, by piece ids. */
export async function suggestOrderParcels(
  executor: Executor,
  order: OrderToPack,
  now: Date,
): Promise<readonly SuggestedParcel[]> {
  const { pieces, limits } = await packingOf(executor, order, now);
  return suggestParcels(pieces, limits);
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
