import { requireApiOrder } from "~/auth/guards.server";
import { followOrder } from "~/flows/follow-order.server";
import type { Route } from "./+types/events";
import { only } from "./methods.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET")];

/** What happens to an order, live. A page that was cut off goes on from its `Last-Event-ID`. */
export async function loader(args: Route.LoaderArgs) {
  const { request, params } = args;
  const { order, scope } = await requireApiOrder(args, "order.read", "events:read", params.orderId);
  const stream = followOrder({
    orderId: order.id,
    reader: scope.kind,
    after: lastEventId(request),
    signal: request.signal,
  });
  return new Response(stream, {
    headers: {
      "Content-Type": "text/event-stream; charset=utf-8",
      "Cache-Control": "no-cache, no-transform",
      "X-Accel-Buffering": "no",
    },
  });
}

/** From the header on a reconnection, from `?after=` on the first call of a page that knows where it stands. */
function lastEventId(request: Request): number | null {
  const given = request.headers.get("Last-Event-ID") ?? new URL(request.url).searchParams.get("after");
  return given !== null && /^\d{1,15}$/.test(given) ? Number(given) : null;
}
