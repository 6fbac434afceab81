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
/** Several events of one act come together: the page is read once for them. */
const GATHER_MS = 150;
/** How often a page asks while no stream reaches it. */
const POLL_MS = 8_000;

interface Following {
  readonly orderId: string;
  /** Id of the newest event the page was made with. */
  readonly after: number;
  /** What to do when something happened; reading the page's data anew if not given. */
  readonly onEvent?: () => void;
}

/**
 * Keeps a page of an order as it stands: its loaders run again whenever something happens to the order, by
 * server-sent events, or every few seconds where no stream gets through. Rests while the page is hidden.
 */
export function useLiveOrder({ orderId, after, onEvent }: Following): void {
  const { revalidate } = useRevalidator();
  const act = useRef<() => void>(() => undefined);
  act.current = onEvent ?? (() => void revalidate());
  const start = useRef(after);

  useEffect(() => {
    let gathering: ReturnType<typeof setTimeout> | undefined;
    let polling: ReturnType<typeof setInterval> | undefined;
    const soon = () => {
      clearTimeout(gathering);
      gathering = setTimeout(() => act.current(), GATHER_MS);
    };
    const poll = () => {
      polling ??= setInterval(() => {
        if (!document.hidden) act.current();
      }, POLL_MS);
    };
    if (typeof EventSource === "undefined") {
      poll();
      return () => clearInterval(polling);
    }
    const source = new EventSource(`/api/orders/${orderId}/events?after=${start.current}`);
    for (const kind of KINDS) source.addEventListener(kind, soon);
    source.addEventListener("open", () => {
      clearInterval(polling);
      polling = undefined;
    });
    source.addEventListener("error", poll);
    return () => {
      source.close();
      clearTimeout(gathering);
      clearInterval(polling);
    };
  }, [orderId]);
}
