import { requireOrder } from "~/auth/guards.server";
import { openAttachment } from "~/flows/open-attachment.server";
import type { Route } from "./+types/attachment";
import { downloadResponse } from "./download.server";
import { only } from "./methods.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET")];

/** A file that hangs on a message, only ever as a download; one on a staff note is not there for a builder. */
export async function loader(args: Route.LoaderArgs) {
  const { order, scope } = await requireOrder(args, "order.message", args.params.orderId);
  const { attachmentId } = args.params;
  const opened = await openAttachment({ orderId: order.id, attachmentId, reader: scope.kind });
  if (!opened) throw new Response("There is no such file in this order.", { status: 404 });
  return downloadResponse(opened);
}
