import { db } from "~/db/client.server";
import type { Page } from "~/documents/page";
import { printPages } from "~/documents/print-pages.server";
import { shippingLabelPage } from "~/documents/shipping-label.server";
import { labelAddress, sscc, TEAM_LIFT_POUNDS } from "~/domain/shipping";
import { kilogramsToPounds } from "~/domain/units";
import type { Order } from "~/models/orders.server";
import { type LabelledParcel, listParcels, standingLabel } from "~/models/parcels.server";
import { listPieces } from "~/models/pieces.server";
import { currentSettings } from "~/models/settings.server";
import { listStockGroups } from "~/models/stock-groups.server";
import { lineForBox, monthMade } from "./box-stocks.server";
import type { PrintedFile } from "./printed-file";

/** The label of a parcel as marks, for print and preview; null while none is bought for it. */
export async function shippingLabel(
  order: Order,
  parcel: LabelledParcel,
  of: number,
): Promise<{ readonly page: Page; readonly boughtAt: Date } | null> {
  const label = standingLabel(parcel);
  if (!label || order.shipTo === null) return null;
  const { shop } = await currentSettings(db);
  const inside = (await listPieces(db, order.id)).filter(({ parcelId }) => parcelId === parcel.id);
  const groups = (
    order.revisionId === null ? [] : await listStockGroups(db, order.id, order.revisionId)
  ).filter(({ id }) => inside.some(({ stockGroupId }) => stockGroupId === id));
  const { line } = lineForBox(groups, shop.name, await monthMade(db, order.id, shop.timeZone));
  return {
    boughtAt: label.createdAt,
    page: shippingLabelPage({
      shopName: shop.name,
      shopAddress: shop.address.filter((one) => one !== shop.name),
      shipTo: labelAddress(order.shipTo),
      reference: order.reference,
      number: parcel.number,
      of,
      kilograms: parcel.weight,
      length: parcel.length,
      width: parcel.width,
      height: parcel.height,
      service: label.service,
      trackingNumber: label.trackingNumber,
      teamLift: kilogramsToPounds(parcel.weight) > TEAM_LIFT_POUNDS,
      sscc: shop.gs1Prefix ? containerCode(shop.gs1Prefix, order.reference, parcel.number) : null,
      code: parcel.id,
      formaldehyde: line,
    }),
  };
}

/** Order number and box make the serial: a box packed anew is the same unit again. */
const containerCode = (prefix: string, reference: string, box: number): string =>
  sscc({ extension: 0, prefix, serial: Number(reference.replace(/\D/g, "")) * 100 + box });

/** A parcel's 4 x 6 in label; printed again it is the same to the byte. Undefined while none is bought. */
export async function printShippingLabel(order: Order, parcelId: string): Promise<PrintedFile | undefined> {
  const parcels = await listParcels(db, order.id);
  const parcel = parcels.find(({ id }) => id === parcelId);
  const made = parcel && (await shippingLabel(order, parcel, parcels.length));
  if (!made) return undefined;
  return {
    fileName: `${order.reference}-box-${parcel.number}-label.pdf`,
    bytes: await printPages([made.page], {
      title: `${order.reference} box ${parcel.number} of ${parcels.length}`,
      at: made.boughtAt,
    }),
  };
}
