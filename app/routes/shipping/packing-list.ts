import { requireOrder } from "~/auth/guards.server";
import { printPackingList } from "~/flows/print-packing-list.server";
import { pdfResponse } from "../pdf-response.server";
import type { Route } from "./+types/packing-list";

export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireOrder(args, "shipping.read", args.params.orderId);
  return pdfResponse(await printPackingList(order));
}
