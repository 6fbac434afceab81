import type { Executor } from "~/db/client.server";
import { checkMove } from "~/domain/orders";
import { addressFromLines, isPostOfficeBox } from "~/domain/shipping";
import { findOrder, type Order } from "~/models/orders.server";
import { type LabelledParcel, listParcels } from "~/models/parcels.server";
import { listPieces } from "~/models/pieces.server";
import { currentSettings } from "~/models/settings.server";
import type { CarrierAddress, CarrierParcel } from "~/services/carrier.server";
import { type Actor, scopeOfActor } from "./actor";
import { refusalOfMove } from "./move.server";
import { factsOfOrder } from "./order-facts.server";
import { NO_ORDER, refuse, type Verdict } from "./verdict";

export interface ReadyToLabel {
  readonly order: Order;
  readonly parcels: readonly LabelledParcel[];
  readonly from: CarrierAddress;
  readonly to: CarrierAddress;
}

/**
 * Whether labels may be bought for an order: paid in full, every piece made and packed, an address that the carrier
 * goes to. An unpaid or incomplete order cannot be labelled.
 */
export async function readyToLabel(
  executor: Executor,
  { actor, orderId, now = new Date() }: { actor: Actor; orderId: string; now?: Date | undefined },
): Promise<Verdict<ReadyToLabel>> {
  const order = await findOrder(executor, orderId, scopeOfActor(actor));
  if (!order) return NO_ORDER;
  const verdict = checkMove("ship", await factsOfOrder(executor, order, now), actor.roles);
  if (!verdict.ok) return refusalOfMove(verdict);
  if (order.delivery !== "ship" || order.shipTo === null)
    return refuse("wrong-stage", "The builder picks this order up: it needs no label.");
  if (isPostOfficeBox(order.shipTo))
    return refuse(
      "invalid",
      "The carrier delivers to no post-office box. Ask the builder for a street address.",
    );
  const parcels = await listParcels(executor, order.id);
  const unpacked = await unpackedOf(executor, order.id, parcels);
  if (unpacked > 0)
    return refuse("incomplete", `Close the parcels first: ${unpacked} of the pieces are in none.`);
  const from = await shopAddress(executor);
  if (!from)
    return refuse(
      "incomplete",
      "The shop's own address has no street, city, state and ZIP: the owner completes it in the settings.",
    );
  const { shipTo } = order;
  return {
    ok: true,
    order,
    parcels,
    from,
    to: {
      name: shipTo.recipient,
      company: shipTo.company || undefined,
      line1: shipTo.line1,
      line2: shipTo.line2 || undefined,
      city: shipTo.city,
      region: shipTo.region,
      postalCode: shipTo.postcode,
      country: "US",
      phone: shipTo.phone || undefined,
    },
  };
}

/** How many good pieces lie in none of the order's parcels. */
export async function unpackedOf(
  executor: Executor,
  orderId: string,
  parcels: readonly { readonly id: string }[],
): Promise<number> {
  const good = (await listPieces(executor, orderId)).filter(({ state }) => state === "good");
  return good.filter(({ parcelId }) => !parcels.some(({ id }) => id === parcelId)).length;
}

async function shopAddress(executor: Executor): Promise<CarrierAddress | null> {
  const { shop } = await currentSettings(executor);
  const found = addressFromLines(shop.address);
  if (!found) return null;
  const { postcode, ...lines } = found;
  return { name: shop.name, ...lines, postalCode: postcode, country: "US", phone: shop.phone || undefined };
}

/** Kilograms to the gram, millimetres up to the next whole one: what a carrier measures again. */
export const carrierParcel = ({
  weight,
  length,
  width,
  height,
}: Pick<LabelledParcel, "weight" | "length" | "width" | "height">): CarrierParcel => ({
  weightKg: Math.round(weight * 1000) / 1000,
  lengthMm: Math.ceil(length),
  widthMm: Math.ceil(width),
  heightMm: Math.ceil(height),
});
