import { useCallback, useEffect, useRef, useState } from "react";
import { sendDrawing } from "./send-drawing";
import { sizeInWords } from "./size-in-words";

/** A file on its way into an order. */
export interface Upload {
  readonly id: number;
  readonly fileName: string;
  /** Bytes, and how many have left. */
  readonly size: number;
  readonly sent: number;
  readonly stage: "waiting" | "sending" | "kept" | "refused";
  /** Once it is kept. */
  readonly drawingId: string | null;
  /** Why it was refused and what to do instead. */
  readonly words: string | null;
}

interface UploadsOptions {
  /** The order that takes the files; null starts one with the first that is kept. */
  readonly orderId: string | null;
  readonly limits: { readonly maxBytes: number; readonly maxFiles: number };
}

/** Sends files one after another, so that the first starts the order and the others join it. */
export function useUploads({ orderId: given, limits }: UploadsOptions) {
  const [uploads, setUploads] = useState<readonly Upload[]>([]);
  const [orderId, setOrderId] = useState(given);
  const order = useRef(given);
  const queue = useRef(Promise.resolve());
  const next = useRef(1);
  const leaving = useRef<AbortController>(undefined);

  useEffect(() => {
    const controller = new AbortController();
    leaving.current = controller;
    return () => controller.abort();
  }, []);

  const change = useCallback((id: number, changed: Partial<Upload>) => {
    setUploads((all) => all.map((one) => (one.id === id ? { ...one, ...changed } : one)));
  }, []);

  const send = useCallback(
    async (id: number, file: File) => {
      const { signal } = leaving.current ?? new AbortController();
      if (signal.aborted) return;
      change(id, { stage: "sending" });
      const answer = await sendDrawing({
        file,
        orderId: order.current,
        signal,
        onSent: (sent) => change(id, { sent }),
      });
      if (!answer.ok) {
        change(id, { stage: "refused", words: answer.words });
        return;
      }
      order.current = answer.orderId;
      setOrderId(answer.orderId);
      change(id, { stage: "kept", sent: file.size, drawingId: answer.drawingId });
    },
    [change],
  );

  const add = useCallback(
    (files: readonly File[]) => {
      const added = files.slice(0, limits.maxFiles).map((file) => ({
        file,
        upload: asUpload(next.current++, file, limits.maxBytes),
      }));
      setUploads((all) => [...all, ...added.map(({ upload }) => upload)]);
      for (const { file, upload } of added) {
        if (upload.stage === "waiting") queue.current = queue.current.then(() => send(upload.id, file));
      }
    },
    [limits.maxFiles, limits.maxBytes, send],
  );

  const forget = useCallback((ids: readonly number[]) => {
    setUploads((all) => all.filter(({ id }) => !ids.includes(id)));
  }, []);

  return { uploads, orderId, add, forget };
}

function asUpload(id: number, file: File, maxBytes: number): Upload {
  const tooLarge = file.size > maxBytes;
  return {
    id,
    fileName: file.name,
    size: file.size,
    sent: 0,
    stage: tooLarge ? "refused" : "waiting",
    drawingId: null,
    words: tooLarge
      ? `It has ${sizeInWords(file.size)}, and a file may have ${sizeInWords(maxBytes)}. Purge unused blocks and layers, or split it.`
      : null,
  };
}
