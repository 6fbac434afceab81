import { requireOrder } from "~/auth/guards.server";
import type { Route } from "./+types/part-labels";
import { printLabels } from "./print-labels.server";

/** Labels of an order's pieces, or of the ones named: a lost one is printed again. */
export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireOrder(args, "queue.read", args.params.orderId);
  return printLabels(args.url, { orderId: order.id });
}
