import { gunzipSync } from "node:zlib";
import { requireOrder } from "~/auth/guards.server";
import { findOrderGeometry } from "~/flows/find-order-geometry.server";
import type { Route } from "./+types/geometry";
import { only } from "./methods.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET")];

/** The parts of an order by content hash: kept by the browser for good, and by nobody between. */
export async function loader(args: Route.LoaderArgs) {
  const { request, params } = args;
  const { order } = await requireOrder(args, "order.read", params.orderId);
  const zipped = await findOrderGeometry({ orderId: order.id, geometryKey: params.key });
  if (!zipped) throw new Response("There is no such geometry in this order.", { status: 404 });
  const takesGzip = /\bgzip\b/.test(request.headers.get("Accept-Encoding") ?? "");
  return new Response(new Uint8Array(takesGzip ? zipped : gunzipSync(zipped)), {
    headers: {
      "Content-Type": "application/json; charset=utf-8",
      "Cache-Control": "private, max-age=31536000, immutable",
      Vary: "Accept-Encoding",
      ...(takesGzip ? { "Content-Encoding": "gzip" } : {}),
    },
  });
}
