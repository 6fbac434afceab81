import type { Readable } from "node:stream";
import { db } from "~/db/client.server";
import { drawingKey, findDrawing } from "~/models/drawing-files.server";
import { storage } from "~/services/clients.server";
import { DXF_TYPE } from "./upload-drawing.server";

interface OpenedDrawing {
  readonly fileName: string;
  readonly contentType: string;
  /** Bytes. */
  readonly size: number;
  /** To be read or destroyed by the caller. */
  readonly body: Readable;
}

/** The original bytes of a drawing of an order, also of one taken out since. Undefined when there are none (any more). */
export async function openDrawing(options: {
  readonly orderId: string;
  readonly drawingId: string;
}): Promise<OpenedDrawing | undefined> {
  const drawing = await findDrawing(db, options.orderId, options.drawingId);
  const stored = drawing && (await storage.getStream(drawingKey(drawing.fileSha)));
  if (!drawing || !stored) return undefined;
  return { fileName: drawing.fileName, contentType: DXF_TYPE, size: stored.size, body: stored.body };
}
