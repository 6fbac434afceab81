import { db, transact } from "~/db/client.server";
import { SNIFFED_BYTES, sniffContent } from "~/domain/drawing";
import { wakeRunners } from "~/jobs/wake.server";
import { createDraftOrder } from "~/models/draft-orders.server";
import { addDrawing, drawingKey, isFileKept, keepFile } from "~/models/drawing-files.server";
import { recordEvent } from "~/models/events.server";
import { findOrder } from "~/models/orders.server";
import { storage } from "~/services/clients.server";
import { type Actor, scopeOfActor } from "./actor";
import { queueDrawingReading } from "./read-drawing.server";
import { hashOf, plainName, streamOf } from "./stored-file";
import { answering, NO_ORDER, Refused, refuse, type Verdict } from "./verdict";

export interface UploadDrawingOptions {
  readonly actor: Actor;
  /** The order to lay the drawing into; a new draft order of the actor's if null. */
  readonly orderId: string | null;
  readonly fileName: string;
  /** The whole file, its size checked while it arrived. */
  readonly file: Blob;
}

export type UploadVerdict = Verdict<{
  orderId: string;
  drawingId: string;
  sha256: string;
  /** False when the very same file lay in the order already. */
  added: boolean;
}>;

/** What DXF is registered as: IANA media types, image/vnd.dxf. */
export const DXF_TYPE = "image/vnd.dxf";

/**
 * Keeps an uploaded drawing by the hash of its bytes and lays it into an order, with its reading queued: bytes
 * first, then everything of the database in one transaction, so that a failure leaves neither half an order nor a
 * row without bytes. The same file twice is one object.
 */
export async function uploadDrawing(options: UploadDrawingOptions): Promise<UploadVerdict> {
  const { file, orderId, actor } = options;
  const fileName = plainName(options.fileName, "drawing.dxf");
  const sniffed = sniffContent(new Uint8Array(await file.slice(0, SNIFFED_BYTES).arrayBuffer()));
  if (!sniffed.ok) return refuse("invalid", sniffed.reason);

  const sha256 = await hashOf(file);
  if (!(await isFileKept(db, sha256))) {
    try {
      const stored = await storage.putStream(drawingKey(sha256), streamOf(file), DXF_TYPE);
      if (!stored.ok || stored.size !== file.size)
        throw new Error(`The storage kept ${sha256} not as it is.`);
    } catch (error) {
      console.error("An upload could not be stored:", error);
      return refuse("unavailable", "The file could not be stored just now. Upload it again in a while.");
    }
  }

  const verdict = await answering(() =>
    transact(async (tx) => {
      const order = orderId
        ? await findOrder(tx, orderId, scopeOfActor(actor))
        : {
            ...(await createDraftOrder(tx, { builderId: actor.id, name: orderName(fileName) })),
            stage: "draft",
          };
      if (!order) throw new Refused(NO_ORDER);
      if (order.stage !== "draft")
        throw new Refused(
          refuse(
            "wrong-stage",
            "This order is quoted already. Take it back to draft before you change its drawings.",
          ),
        );
      await keepFile(tx, { sha256, size: file.size });
      const drawing = await addDrawing(tx, {
        orderId: order.id,
        fileSha: sha256,
        fileName,
        uploadedBy: actor.id,
      });
      const queued = await queueDrawingReading(tx, sha256);
      if (drawing.added || queued)
        await recordEvent(tx, {
          orderId: order.id,
          kind: "reading",
          data: { sha256, status: queued ? "queued" : "known" },
        });
      return { ok: true, orderId: order.id, drawingId: drawing.id, sha256, added: drawing.added } as const;
    }),
  );
  if (verdict.ok) wakeRunners();
  return verdict;
}

const orderName = (fileName: string) =>
  fileName
    .replace(/\.dxf$/i, "")
    .replace(/[_\s]+/g, " ")
    .trim() || "Drawing";
