import { requireApiOrder } from "~/auth/guards.server";
import { openDrawing } from "~/flows/open-drawing.server";
import type { Route } from "./+types/drawing";
import { downloadResponse } from "./download.server";
import { only } from "./methods.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET")];

/** The original bytes of a drawing, only ever as a download. */
export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireApiOrder(args, "order.read", "drawings:read", args.params.orderId);
  const drawing = await openDrawing({ orderId: order.id, drawingId: args.params.drawingId });
  if (!drawing) throw new Response("There is no such drawing in this order.", { status: 404 });
  return downloadResponse(drawing);
}
