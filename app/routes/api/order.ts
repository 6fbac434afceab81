import { requireApiOrder } from "~/auth/guards.server";
import type { Route } from "./+types/order";
import { answer } from "./answer.server";
import { only } from "./methods.server";
import { orderAnswer } from "./order-answers.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET")];

/** `GET /api/orders/:orderId`: the order with its parts, quote and parcels. */
export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireApiOrder(args, "order.read", "orders:read", args.params.orderId);
  return answer(await orderAnswer(order, new Date()));
}
