import { db } from "~/db/client.server";
import { type PackingBox, type PackingList, packingListPages } from "~/documents/packing-list.server";
import { printPages } from "~/documents/print-pages.server";
import { labelAddress } from "~/domain/shipping";
import type { Order } from "~/models/orders.server";
import { type LabelledParcel, listParcels, standingLabel } from "~/models/parcels.server";
import { findAddressee, findNames } from "~/models/people.server";
import { listPieces, type PieceWithPart } from "~/models/pieces.server";
import { findRevision } from "~/models/revisions.server";
import { currentSettings } from "~/models/settings.server";
import { listStockGroups } from "~/models/stock-groups.server";
import { environment } from "~/server/environment.server";
import { lineForBox, monthMade } from "./box-stocks.server";
import type { PrintedFile } from "./printed-file";
import { packingOf } from "./suggest-bundles.server";

/**
 * The packing list of an order: one to each box; for a pick-up one for the pile. Undefined while no parcel is closed.
 */
export async function printPackingList(order: Order): Promise<PrintedFile | undefined> {
  const parcels = await listParcels(db, order.id);
  const pickUp = order.delivery === "pick-up";
  const revision = order.revisionId && (await findRevision(db, order.id, order.revisionId));
  if (!revision || (!pickUp && parcels.length === 0)) return undefined;
  const list = await packingList(order, revision.number, pickUp ? [null] : parcels);
  return {
    fileName: `${order.reference}-packing-list.pdf`,
    bytes: await printPages(packingListPages(list), {
      title: `Packing list ${order.reference}`,
      at: parcels[0]?.packedAt ?? revision.frozenAt,
    }),
  };
}

async function packingList(
  order: Order,
  revision: number,
  boxes: readonly (LabelledParcel | null)[],
): Promise<PackingList> {
  const { shop } = await currentSettings(db);
  const builder = await findAddressee(db, order.builderId);
  const packedBy = boxes[0]?.packedBy ?? null;
  const packedAt = boxes[0]?.packedAt ?? null;
  const names = packedBy === null ? new Map<string, string>() : await findNames(db, [packedBy]);
  const pickUp = order.delivery === "pick-up";
  return {
    shopName: shop.name,
    shopAddress: shop.address.filter((one) => one !== shop.name),
    shopEmail: shop.email,
    shopPhone: shop.phone,
    reference: order.reference,
    orderName: order.name,
    revision,
    shipTo: pickUp || !order.shipTo ? [builder?.name ?? ""] : labelAddress(order.shipTo),
    pickUp,
    packer: packedBy === null ? null : (names.get(packedBy) ?? null),
    packedOn: packedAt ? packedAt.toLocaleDateString("en-CA", { timeZone: shop.timeZone }) : "",
    boxes: await packingBoxes(order, boxes, shop),
    url: `${environment.APP_URL}/orders/${order.id}`,
  };
}

async function packingBoxes(
  order: Order,
  boxes: readonly (LabelledParcel | null)[],
  shop: { readonly name: string; readonly timeZone: string },
): Promise<PackingBox[]> {
  const good = (await listPieces(db, order.id)).filter(({ state }) => state === "good");
  const groups = order.revisionId === null ? [] : await listStockGroups(db, order.id, order.revisionId);
  const { pieces: flat } = await packingOf(db, order, new Date());
  const weights = new Map(flat.map(({ id, kilograms }) => [id, kilograms]));
  const made = await monthMade(db, order.id, shop.timeZone);
  const isHere = (piece: PieceWithPart, box: LabelledParcel | null) =>
    box === null ? piece.stage === "tabs-removed" || piece.stage === "shipped" : piece.parcelId === box.id;
  return boxes.map((box, index) => {
    const inside = good.filter((piece) => isHere(piece, box));
    const stocks = groups.filter(({ id }) => inside.some(({ stockGroupId }) => stockGroupId === id));
    const { line, missing } = lineForBox(stocks, shop.name, made);
    return {
      number: index + 1,
      of: boxes.length,
      closed: box && { length: box.length, width: box.width, height: box.height, kilograms: box.weight },
      trackingNumber: (box && standingLabel(box)?.trackingNumber) ?? null,
      formaldehyde: line,
      missingPapers: missing,
      rows: [...new Set(inside.map(({ partId }) => partId))].flatMap((partId) => {
        const ordered = good.filter((piece) => piece.partId === partId);
        const here = inside.filter((piece) => piece.partId === partId);
        const [one] = here;
        const group = groups.find(({ id }) => id === one?.stockGroupId);
        if (!one) return [];
        return {
          part: one.part.label,
          name: one.part.name === one.part.letter || one.part.name === one.part.label ? null : one.part.name,
          width: one.part.width,
          height: one.part.height,
          ordered: ordered.length,
          here: here.length,
          backOrdered: ordered.filter((piece) => !boxes.some((other) => isHere(piece, other))).length,
          material: group?.material.code ?? "",
          lot: group?.lot?.code ?? null,
          kilograms: here.reduce((sum, { id }) => sum + (weights.get(id) ?? 0), 0),
        };
      }),
    };
  });
}
