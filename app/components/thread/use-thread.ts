import { keepPreviousData, useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useCallback, useState } from "react";
import { useRevalidator } from "react-router";
import { useLiveOrder } from "../live";
import { type Pointing, THREAD_PAGE, type ThreadAudience, type ThreadData } from "./thread-data";

export interface Draft {
  readonly body: string;
  /** For the staff alone. */
  readonly note: boolean;
  readonly pointing: Pointing | null;
}

export interface OutgoingMessage extends Draft {
  /** 32 hex digits; the same for every attempt at the same message. */
  readonly messageId: string;
  readonly files: readonly File[];
}

const NOT_SENT = "It was not sent: the connection broke off. What you wrote is still here.";

/** The thread of an order as it stands, fetched anew whenever somebody writes, and the ways to write and to read it. */
export function useThread(orderId: string, audience: ThreadAudience) {
  const queries = useQueryClient();
  const { revalidate } = useRevalidator();
  const [limit, setLimit] = useState(THREAD_PAGE);
  const refresh = useCallback(
    () => queries.invalidateQueries({ queryKey: ["thread", orderId] }),
    [queries, orderId],
  );
  const thread = useQuery({
    queryKey: ["thread", orderId, audience, limit],
    queryFn: ({ signal }) => fetchThread(orderId, audience, limit, signal),
    placeholderData: keepPreviousData,
  });
  useLiveOrder({ orderId, after: null, kinds: MESSAGES, onEvent: () => void refresh() });
  const send = useMutation({
    mutationFn: (message: OutgoingMessage) => sendMessage(orderId, message),
    onSuccess: refresh,
  });
  const read = useMutation({
    mutationFn: (messageId: string) => sendRead(orderId, messageId),
    onSuccess: async () => {
      await refresh();
      // The counts beside the areas are the page's own.
      await revalidate();
    },
  });
  return {
    thread,
    send,
    read: read.mutate,
    showEarlier: () => setLimit((now) => now + 2 * THREAD_PAGE),
  };
}

const MESSAGES = ["message"] as const;

async function fetchThread(
  orderId: string,
  audience: ThreadAudience,
  limit: number,
  signal: AbortSignal,
): Promise<ThreadData> {
  const query = new URLSearchParams({ audience, limit: String(limit) });
  const response = await fetch(`/api/orders/${orderId}/messages?${query}`, { signal });
  if (!response.ok) throw new Error(`The thread answered ${response.status}.`);
  return response.json();
}

/** Rejects with a sentence for the person when it is not written. */
async function sendMessage(orderId: string, message: OutgoingMessage): Promise<void> {
  const form = new FormData();
  form.set("messageId", message.messageId);
  form.set("audience", message.note ? "staff" : "both");
  form.set("body", message.body);
  const { pointing } = message;
  if (pointing?.partLabel) form.set("partLabel", pointing.partLabel);
  if (pointing?.spot) {
    form.set("spotX", String(pointing.spot.x));
    form.set("spotY", String(pointing.spot.y));
  }
  for (const file of message.files) form.append("files", file);
  const response = await fetch(`/api/orders/${orderId}/messages`, { method: "POST", body: form }).catch(
    () => {
      throw new Error(NOT_SENT);
    },
  );
  if (response.ok) return;
  const reply: unknown = await response.json().catch(() => null);
  const words = typeof reply === "object" && reply !== null && "words" in reply ? reply.words : null;
  throw new Error(typeof words === "string" ? words : NOT_SENT);
}

async function sendRead(orderId: string, messageId: string): Promise<void> {
  const response = await fetch(`/api/orders/${orderId}/messages/read`, {
    method: "POST",
    headers: { "Content-Type": "application/json" },
    body: JSON.stringify({ messageId }),
  });
  if (!response.ok) throw new Error(`Reading the thread answered ${response.status}.`);
}
