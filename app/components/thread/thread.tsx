import { useEffect, useRef, useState } from "react";
import { Button } from "../button";
import { Notice } from "../notice";
import { Sheet } from "../sheet";
import { TextLink } from "../text-link";
import { Composer } from "./composer";
import { MessageRow } from "./message-row";
import type { Pointing, ThreadAudience, ThreadData } from "./thread-data";
import { useThread } from "./use-thread";

interface ThreadProps {
  readonly orderId: string;
  /** Whose page it stands on: on a builder's there are no staff notes. */
  readonly audience: ThreadAudience;
  /** What is chosen on the page, which a message may point at. */
  readonly pointing?: Pointing | null;
  /** Shows a place on the page's drawing; without it pointers are only words. */
  readonly onOpenSpot?: (pointing: Pointing) => void;
}

/** The talk about an order between its builder and the shop. Fetches itself, and again whenever somebody writes. */
export function Thread({ orderId, audience, pointing = null, onOpenSpot }: ThreadProps) {
  const { thread, send, read, showEarlier } = useThread(orderId, audience);
  const data = thread.data;
  const end = useRef<HTMLDivElement>(null);
  const seen = useSeen(end);
  const newest = data?.messages.at(-1)?.id;
  const unread = data?.unread ?? 0;
  const since = useFirst(data?.readAt);

  const told = useRef<string | undefined>(undefined);

  useEffect(() => {
    if (!seen || unread === 0 || !newest || told.current === newest) return;
    told.current = newest;
    read(newest);
  }, [seen, unread, newest, read]);

  return (
    <div id="thread" className="scroll-mt-4">
      <Sheet label="Thread">
        <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b border-line px-4 py-3 sm:px-6">
          <h2 className="text-lead font-semibold">Thread</h2>
          <p className="text-small text-soft">
            {audience === "staff"
              ? "Messages are mailed to the builder; notes stay here."
              : "The shop answers here, and you are told by mail."}
          </p>
        </div>
        {data && data.undelivered.length > 0 && <Undelivered data={data} audience={audience} />}
        {data?.earlier && (
          <div className="px-4 pt-3 sm:px-6">
            <Button type="button" size="small" pending={thread.isPlaceholderData} onClick={showEarlier}>
              Show earlier messages
            </Button>
          </div>
        )}
        {data && data.messages.length > 0 ? (
          <div role="log" aria-label="Messages">
            <ul className="divide-y divide-line">
              {data.messages.map((message) => (
                <MessageRow
                  key={message.id}
                  message={message}
                  firstNew={message.id === firstNewOf(data, since)}
                  onOpenSpot={onOpenSpot}
                />
              ))}
            </ul>
          </div>
        ) : (
          <p className="px-4 py-6 text-small text-soft sm:px-6">
            {data
              ? "Nobody has written yet."
              : thread.isError
                ? "The messages could not be fetched. They are asked for again when you come back to this page."
                : "The messages are on their way."}
          </p>
        )}
        <div ref={end} />
        <Composer
          orderId={orderId}
          audience={audience}
          pointing={pointing}
          pending={send.isPending}
          onSend={send.mutateAsync}
        />
      </Sheet>
    </div>
  );
}

/** The first message of others after what had been read when the page was opened. */
function firstNewOf(data: ThreadData, since: string | null | undefined): string | undefined {
  if (!since) return undefined;
  return data.messages.find(({ mine, createdAt }) => !mine && createdAt > since)?.id;
}

/** The first value that was there, kept over all later ones. */
function useFirst<Value>(value: Value | undefined): Value | undefined {
  const [first, setFirst] = useState(value);
  if (first === undefined && value !== undefined) setFirst(value);
  return first;
}

/** Whether an element is in view on a page that is in front. */
function useSeen(element: { readonly current: Element | null }): boolean {
  const [inView, setInView] = useState(false);
  const [inFront, setInFront] = useState(false);
  useEffect(() => {
    const look = () => setInFront(!document.hidden);
    look();
    document.addEventListener("visibilitychange", look);
    return () => document.removeEventListener("visibilitychange", look);
  }, []);
  useEffect(() => {
    if (!element.current || typeof IntersectionObserver === "undefined") return;
    const observer = new IntersectionObserver(([entry]) => setInView(entry?.isIntersecting ?? false));
    observer.observe(element.current);
    return () => observer.disconnect();
  }, [element]);
  return inView && inFront;
}

function Undelivered({ data, audience }: { readonly data: ThreadData; readonly audience: ThreadAudience }) {
  const [first, ...more] = data.undelivered;
  if (!first) return null;
  return (
    <div className="border-b border-line">
      <Notice
        title={more.length === 0 ? "A mail did not arrive" : `${more.length + 1} mails did not arrive`}
        action={audience === "builder" ? <TextLink to="/account">Check your address</TextLink> : undefined}
      >
        <ul>
          {data.undelivered.map(({ id, subject, recipient, error }) => (
            <li key={id} className="break-words">
              “{subject}” to <span className="measure break-all">{recipient}</span>
              {audience === "staff" && <span className="text-soft">: {error}</span>}
            </li>
          ))}
        </ul>
        {audience === "builder" && <p>Everything is on this page; the mails only tell of it.</p>}
      </Notice>
    </div>
  );
}
