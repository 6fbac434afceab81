import { requireOrder } from "~/auth/guards.server";
import { printShippingLabel } from "~/flows/print-shipping-label.server";
import { pdfResponse } from "../pdf-response.server";
import type { Route } from "./+types/parcel-label";

export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireOrder(args, "shipping.read", args.params.orderId);
  return pdfResponse(await printShippingLabel(order, args.params.parcelId));
}
