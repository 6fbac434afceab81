import { Readable } from "node:stream";
import { requireOrder } from "~/auth/guards.server";
import { openDrawing } from "~/flows/open-drawing.server";
import type { Route } from "./+types/drawing";

/** The original bytes of a drawing, only ever as a download. */
export async function loader(args: Route.LoaderArgs) {
  const { order } = await requireOrder(args, "order.read", args.params.orderId);
  const drawing = await openDrawing({ orderId: order.id, drawingId: args.params.drawingId });
  if (!drawing) throw new Response("There is no such drawing in this order.", { status: 404 });
  return new Response(Readable.toWeb(drawing.body) as ReadableStream<Uint8Array>, {
    headers: {
      "Content-Type": drawing.contentType,
      "Content-Length": String(drawing.size),
      "Content-Disposition": attachment(drawing.fileName),
      "X-Content-Type-Options": "nosniff",
      "Content-Security-Policy": "sandbox",
      "Cache-Control": "private, no-store",
    },
  });
}

/** RFC 6266: a plain name for old clients, the whole name percent-encoded beside it (RFC 8187). */
function attachment(fileName: string): string {
  const plain = fileName.replace(/[^\w .()-]/g, "_");
  const encoded = encodeURIComponent(fileName).replace(
    /['()*]/g,
    (letter) => `%${letter.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `attachment; filename="${plain}"; filename*=UTF-8''${encoded}`;
}
