import { requireOrder } from "~/auth/guards.server";
import { db } from "~/db/client.server";
import { findCollection } from "~/models/collections.server";
import { storage } from "~/services/clients.server";
import type { Route } from "./+types/signature";

/** The drawn signature under an order's pick-up. */
export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireOrder(args, "shipping.read", args.params.orderId);
  const collection = await findCollection(db, order.id);
  const bytes = collection && (await storage.get(collection.signatureKey));
  if (!bytes) throw new Response("Nobody signed for this order.", { status: 404 });
  return new Response(bytes.slice().buffer, {
    headers: {
      "Content-Type": "image/svg+xml",
      "Content-Security-Policy": "sandbox; default-src 'none'",
      "X-Content-Type-Options": "nosniff",
      "Cache-Control": "private, no-store",
    },
  });
}
