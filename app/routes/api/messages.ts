import {
  type FileUpload,
  FormDataParseError,
  MaxFileSizeExceededError,
  MaxFilesExceededError,
  MaxTotalSizeExceededError,
  parseFormData,
} from "@remix-run/form-data-parser";
import { z } from "zod";
import { requireOrder } from "~/auth/guards.server";
import { requireSameOrigin } from "~/auth/same-origin.server";
import { LONGEST_THREAD, THREAD_PAGE, type ThreadData } from "~/components/thread/thread-data";
import { db } from "~/db/client.server";
import { MESSAGE_LIMITS } from "~/domain/orders";
import { keepAttachment } from "~/flows/keep-attachment.server";
import { postMessage } from "~/flows/post-message.server";
import { REFUSAL_STATUS, type Refusal } from "~/flows/verdict";
import type { KeptFile } from "~/models/attachments.server";
import { takeToken } from "~/models/rate-limits.server";
import type { Route } from "./+types/messages";
import { only } from "./methods.server";
import { threadView } from "./thread-view.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET", "POST")];

/** What a message is answered with; `words` is a sentence for whoever wrote it. */
export type MessageReply = { ok: true; messageId: string } | { ok: false; words: string };

const MESSAGES = { limit: 30, windowSeconds: 600 };

const askedSchema = z.object({
  audience: z.enum(["builder", "staff"]).catch("builder"),
  limit: z.coerce.number().int().min(1).max(LONGEST_THREAD).catch(THREAD_PAGE),
});

const coordinate = z.coerce.number().min(-1e6).max(1e6);
const writtenSchema = z.object({
  messageId: z.string().regex(/^[0-9a-f]{32}$/),
  audience: z.enum(["both", "staff"]),
  body: z.string(),
  partLabel: z.string().trim().min(1).max(60).optional(),
  spotX: coordinate.optional(),
  spotY: coordinate.optional(),
});

/** `GET /api/orders/:orderId/messages?audience=builder|staff&limit=30`: the thread as `ThreadData`. */
export async function loader(args: Route.LoaderArgs) {
  const { order, person, scope } = await requireOrder(args, "order.message", args.params.orderId);
  const asked = askedSchema.parse(Object.fromEntries(new URL(args.request.url).searchParams));
  return Response.json((await threadView({ order, person, scope, ...asked })) satisfies ThreadData, {
    headers: { "Cache-Control": "private, no-store" },
  });
}

/**
 * `POST /api/orders/:orderId/messages`, multipart: `messageId` (32 hex digits made by the page), `audience`, `body`,
 * and, where the message points at something, `partLabel`, `spotX`, `spotY`; up to five `files` of 10 MB.
 */
export async function action(args: Route.ActionArgs) {
  const { request } = args;
  requireSameOrigin(request);
  const { order, person } = await requireOrder(args, "order.message", args.params.orderId);
  if (request.method !== "POST") return reply(405, { ok: false, words: "Messages are posted." });
  const token = await takeToken(db, `message:${person.id}`, MESSAGES.limit, MESSAGES.windowSeconds);
  if (!token.ok)
    return reply(
      429,
      { ok: false, words: "That is a lot of messages. Wait a few minutes; what you wrote stays here." },
      { "Retry-After": String(token.retryAfterSeconds) },
    );

  const kept: KeptFile[] = [];
  let refused: Refusal | undefined;
  const take = async (upload: FileUpload) => {
    if (upload.size === 0 && upload.name === "") return;
    const verdict = await keepAttachment({ fileName: upload.name, file: upload });
    if (verdict.ok) kept.push(verdict.kept);
    else refused ??= verdict;
  };
  const { fileBytes, files } = MESSAGE_LIMITS;
  let form: FormData;
  try {
    form = await parseFormData(request, { maxFileSize: fileBytes, maxFiles: files }, take);
  } catch (error) {
    const ended = endedEarly(error);
    if (!ended) throw error;
    return reply(ended.status, { ok: false, words: ended.words });
  }
  if (refused) return reply(REFUSAL_STATUS[refused.reason], refused);
  const given = [...form].filter(([, value]) => typeof value === "string" && value !== "");
  const written = writtenSchema.safeParse({ body: "", ...Object.fromEntries(given) });
  if (!written.success)
    return reply(400, { ok: false, words: "The message came incomplete. Send it again." });
  const { partLabel = null, spotX, spotY, ...message } = written.data;
  const posted = await postMessage({
    actor: person,
    orderId: order.id,
    ...message,
    partLabel,
    spot: spotX === undefined || spotY === undefined ? null : { x: spotX, y: spotY },
    files: kept,
  });
  return posted.ok ? reply(201, posted) : reply(REFUSAL_STATUS[posted.reason], posted);
}

function reply(status: number, body: MessageReply, headers: Record<string, string> = {}): Response {
  const { ok } = body;
  const shown: MessageReply = ok ? { ok, messageId: body.messageId } : { ok, words: body.words };
  return Response.json(shown, { status, headers });
}

function endedEarly(error: unknown): { status: number; words: string } | undefined {
  if (error instanceof MaxFilesExceededError)
    return { status: 413, words: `At most ${MESSAGE_LIMITS.files} files go with one message.` };
  if (error instanceof MaxFileSizeExceededError || error instanceof MaxTotalSizeExceededError)
    return { status: 413, words: "A file is larger than 10 MB. Make it smaller, or send a part of it." };
  if (error instanceof FormDataParseError)
    return { status: 400, words: "The message broke off on its way. Send it again." };
  return undefined;
}
