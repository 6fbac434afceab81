import {
  type FileUpload,
  FormDataParseError,
  MaxFileSizeExceededError,
  MaxFilesExceededError,
  MaxTotalSizeExceededError,
  parseFormData,
} from "@remix-run/form-data-parser";
import { requireAct, requireOrder } from "~/auth/guards.server";
import { requireSameOrigin } from "~/auth/same-origin.server";
import { db } from "~/db/client.server";
import { uploadDrawing } from "~/flows/upload-drawing.server";
import { takeToken } from "~/models/rate-limits.server";
import { findSettings } from "~/models/settings.server";
import type { Route } from "./+types/uploads";
import { only } from "./methods.server";

export const middleware: Route.MiddlewareFunction[] = [only("POST")];

/** What became of one file; `reason` is a sentence for the builder. */
export type UploadedFile =
  | { fileName: string; ok: true; orderId: string; drawingId: string }
  | { fileName: string; ok: false; reason: string };

/** `orderId` is the order that took the files, null when none did; `reason` is set when the upload as a whole ended early. */
export interface UploadReply {
  orderId: string | null;
  files: UploadedFile[];
  reason?: string;
}

const MEBIBYTE = 1024 * 1024;
/** Until the shop has settings of its own. */
const DEFAULT_LIMITS = { maxBytes: 32 * MEBIBYTE, maxFiles: 20 };
const UPLOADS = { limit: 60, windowSeconds: 600 };

/**
 * `POST /api/uploads[?orderId=...]` with multipart files: each gets its own verdict; without an order the first that
 * succeeds starts one. 413 when a file is larger than the owner allows: what came before it is kept.
 */
export async function action(args: Route.ActionArgs) {
  const { request } = args;
  requireSameOrigin(request);
  let orderId = new URL(request.url).searchParams.get("orderId");
  const person = orderId
    ? (await requireOrder(args, "order.edit", orderId)).person
    : await requireAct(args, "order.create");
  const token = await takeToken(db, `upload:${person.id}`, UPLOADS.limit, UPLOADS.windowSeconds);
  if (!token.ok)
    return reply(429, { orderId, files: [], reason: "That is a lot of uploads. Wait a few minutes." }, token);

  const limits = (await findSettings(db))?.content.upload ?? DEFAULT_LIMITS;
  const files: UploadedFile[] = [];
  const take = async (upload: FileUpload) => {
    const { name: fileName } = upload;
    const verdict = await uploadDrawing({ actor: person, orderId, fileName, file: upload });
    if (verdict.ok) orderId = verdict.orderId;
    files.push(
      verdict.ok
        ? { fileName, ok: true, orderId: verdict.orderId, drawingId: verdict.drawingId }
        : { fileName, ok: false, reason: verdict.words },
    );
  };
  try {
    await parseFormData(request, { maxFileSize: limits.maxBytes, maxFiles: limits.maxFiles }, take);
  } catch (error) {
    const ended = endedEarly(error, limits);
    if (!ended) throw error;
    return reply(ended.status, {
      orderId: files.some(({ ok }) => ok) ? orderId : null,
      files,
      reason: ended.reason,
    });
  }
  if (files.length === 0)
    return reply(400, { orderId: null, files, reason: "No file came with the upload." });
  return files.some(({ ok }) => ok) ? reply(201, { orderId, files }) : reply(422, { orderId: null, files });
}

function reply(status: number, body: UploadReply, token?: { retryAfterSeconds: number }): Response {
  return Response.json(body, {
    status,
    headers: token ? { "Retry-After": String(token.retryAfterSeconds) } : {},
  });
}

function endedEarly(
  error: unknown,
  limits: typeof DEFAULT_LIMITS,
): { status: number; reason: string } | undefined {
  if (error instanceof MaxFilesExceededError)
    return { status: 413, reason: `At most ${limits.maxFiles} files at a time.` };
  if (error instanceof MaxFileSizeExceededError || error instanceof MaxTotalSizeExceededError)
    return {
      status: 413,
      reason: `A file is larger than ${Math.floor(limits.maxBytes / MEBIBYTE)} MB. Split the drawing into several files.`,
    };
  if (error instanceof FormDataParseError)
    return { status: 400, reason: "The upload broke off before its end. Send it again." };
  return undefined;
}
