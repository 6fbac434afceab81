import { useEffect, useRef } from "react";
import { useRevalidator } from "react-router";

const KINDS = [
  "stage",
  "pieces",
  "payment",
  "reading",
  "quote",
  "message",
  "nest",
  "run",
  "shipping",
] as const;
export type LiveKind = (typeof KINDS)[number];
/** Several events of one act come together: the page is read once for them. */
const GATHER_MS = 150;
/** How often a page asks while no stream reaches it. */
const POLL_MS = 8_000;

interface Following {
  readonly orderId: string;
  /** Id of the newest event the page was made with; null for what happens from now on. */
  readonly after: number | null;
  /** What is listened for; everything if not given. */
  readonly kinds?: readonly LiveKind[];
  /** What to do when something happened; reading the page's data anew if not given. */
  readonly onEvent?: () => void;
}

/**
 * Keeps a page of an order as it stands: its loaders run again whenever something happens to the order, by
 * server-sent events, or every few seconds where no stream gets through. Rests while the page is hidden.
 */
export function useLiveOrder({ orderId, after, kinds = KINDS, onEvent }: Following): void {
  const { revalidate } = useRevalidator();
  const act = useRef<() => void>(() => undefined);
  act.current = onEvent ?? (() => void revalidate());
  const first = useRef({ after, kinds });

  useEffect(() => {
    let gathering: ReturnType<typeof setTimeout> | undefined;
    const leave = follow(orderId, first.current.after, (kind) => {
      if (kind !== null && !first.current.kinds.includes(kind)) return;
      clearTimeout(gathering);
      gathering = setTimeout(() => act.current(), GATHER_MS);
    });
    return () => {
      leave();
      clearTimeout(gathering);
    };
  }, [orderId]);
}

/** Told the kind of an event, or null when the order should be looked at because no stream gets through. */
type Listener = (kind: LiveKind | null) => void;

/** One stream an order, whoever listens on the page: a browser keeps few connections to one host. */
const streams = new Map<string, Stream>();

interface Stream {
  readonly listeners: Set<Listener>;
  /** The earliest event that a listener has, as far as they come before it opens. */
  after: number | null;
  close: () => void;
}

function follow(orderId: string, after: number | null, listener: Listener): () => void {
  const stream = streams.get(orderId) ?? start(orderId);
  stream.listeners.add(listener);
  if (after !== null) stream.after = Math.min(after, stream.after ?? after);
  return () => {
    stream.listeners.delete(listener);
    if (stream.listeners.size > 0) return;
    stream.close();
    streams.delete(orderId);
  };
}

/** A stream that opens when every part of the page has said from where it listens. */
function start(orderId: string): Stream {
  const stream: Stream = { listeners: new Set(), after: null, close: () => clearTimeout(opening) };
  const opening = setTimeout(() => {
    stream.close = open(orderId, stream);
  });
  streams.set(orderId, stream);
  return stream;
}

/** Returns how to close it. */
function open(orderId: string, { listeners, after }: Stream): () => void {
  const tell = (kind: LiveKind | null) => {
    for (const listener of listeners) listener(kind);
  };
  let polling: ReturnType<typeof setInterval> | undefined;
  const poll = () => {
    polling ??= setInterval(() => {
      if (!document.hidden) tell(null);
    }, POLL_MS);
  };
  const rest = () => {
    clearInterval(polling);
    polling = undefined;
  };
  if (typeof EventSource === "undefined") {
    poll();
    return rest;
  }
  const source = new EventSource(`/api/orders/${orderId}/events${after === null ? "" : `?after=${after}`}`);
  for (const kind of KINDS) source.addEventListener(kind, () => tell(kind));
  source.addEventListener("open", rest);
  source.addEventListener("error", poll);
  return () => {
    source.close();
    rest();
  };
}
