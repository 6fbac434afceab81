import type { UploadReply } from "~/routes/api/uploads";

export type SentDrawing =
  | { readonly ok: true; readonly orderId: string; readonly drawingId: string }
  | { readonly ok: false; readonly words: string };

interface SendOptions {
  readonly file: File;
  /** The order it is laid into; null starts a new one. */
  readonly orderId: string | null;
  /** Told of the bytes that have left. */
  readonly onSent: (bytes: number) => void;
  readonly signal: AbortSignal;
}

const BROKEN_OFF = "The connection broke off before the file was there. Try it again.";

/** Sends one file; by XMLHttpRequest, the only one that tells how much of a body has left. */
export function sendDrawing({ file, orderId, onSent, signal }: SendOptions): Promise<SentDrawing> {
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open("POST", orderId ? `/api/uploads?orderId=${orderId}` : "/api/uploads");
    request.responseType = "json";
    request.upload.addEventListener("progress", ({ loaded }) => onSent(Math.min(loaded, file.size)));
    request.addEventListener("load", () => resolve(answerOf(request.status, request.response)));
    for (const end of ["error", "abort", "timeout"] as const)
      request.addEventListener(end, () => resolve({ ok: false, words: BROKEN_OFF }));
    signal.addEventListener("abort", () => request.abort(), { once: true });
    const body = new FormData();
    body.append("file", file, file.name);
    request.send(body);
  });
}

function answerOf(status: number, response: unknown): SentDrawing {
  const reply = isReply(response) ? response : null;
  const [sent] = reply?.files ?? [];
  if (sent?.ok) return { ok: true, orderId: sent.orderId, drawingId: sent.drawingId };
  if (sent) return { ok: false, words: sent.reason };
  if (reply?.reason) return { ok: false, words: reply.reason };
  return {
    ok: false,
    words: status === 401 ? "You are signed out. Sign in, then send it again." : BROKEN_OFF,
  };
}

const isReply = (value: unknown): value is UploadReply =>
  typeof value === "object" && value !== null && "files" in value && Array.isArray(value.files);
