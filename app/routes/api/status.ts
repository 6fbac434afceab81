import { requireApiOrder } from "~/auth/guards.server";
import type { Route } from "./+types/status";
import { answer } from "./answer.server";
import { only } from "./methods.server";
import { statusAnswer } from "./order-answers.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET")];

/** `GET /api/orders/:orderId/status`: where the order and each of its pieces stand, and what it waits for. */
export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireApiOrder(args, "order.read", "status:read", args.params.orderId);
  return answer(await statusAnswer(order, new Date()));
}
