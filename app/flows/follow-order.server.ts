import { setTimeout as pause } from "node:timers/promises";
import { db } from "~/db/client.server";
import { type EventReader, eventsAfter, newestEventId } from "~/models/events.server";

interface FollowOrderOptions {
  readonly orderId: string;
  readonly reader: EventReader;
  /** Id of the last event the page has; null starts with what happens from now on. */
  readonly after: number | null;
  readonly signal: AbortSignal;
  readonly pollMs?: number;
  readonly heartbeatMs?: number;
  /** After this the stream ends, and the page that asks again passes the guard again. */
  readonly longestMs?: number;
}

const POLL_MS = 1_000;
const HEARTBEAT_MS = 15_000;
const LONGEST_MS = 10 * 60_000;
/** How long a page waits before it asks again. */
const RETRY_MS = 2_000;

/**
 * An order's events as a server-sent event stream: `id`, `event` (the kind) and `data` (JSON) each. It asks the
 * table, so that it sees what other processes write. Ends when the signal aborts.
 */
export function followOrder(options: FollowOrderOptions): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  const closed = new AbortController();
  const signal = AbortSignal.any([
    options.signal,
    closed.signal,
    AbortSignal.timeout(options.longestMs ?? LONGEST_MS),
  ]);
  return new ReadableStream({
    async start(controller) {
      const say = (text: string) => {
        if (!signal.aborted) controller.enqueue(encoder.encode(text));
      };
      try {
        say(`retry: ${RETRY_MS}\n: following\n\n`);
        for await (const text of sayings(options, signal)) say(text);
      } catch (error) {
        if (!signal.aborted) console.error("An order's events could not be followed:", error);
      } finally {
        if (!closed.signal.aborted) controller.close();
      }
    },
    cancel: () => closed.abort(),
  });
}

async function* sayings(options: FollowOrderOptions, signal: AbortSignal): AsyncGenerator<string> {
  const { orderId, reader, pollMs = POLL_MS, heartbeatMs = HEARTBEAT_MS } = options;
  let last = options.after ?? (await newestEventId(db, orderId));
  let saidAt = Date.now();
  while (!signal.aborted) {
    for (const { id, kind, data, createdAt } of await eventsAfter(db, orderId, last, reader)) {
      last = id;
      saidAt = Date.now();
      yield `id: ${id}\nevent: ${kind}\ndata: ${JSON.stringify({ ...data, at: createdAt })}\n\n`;
    }
    if (Date.now() - saidAt >= heartbeatMs) {
      saidAt = Date.now();
      yield ": still here\n\n";
    }
    await pause(pollMs, undefined, { signal }).catch(() => undefined);
  }
}
