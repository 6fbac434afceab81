import { DateTime } from "../date-time";
import { AttachmentList } from "./attachment-list";
import { SpotMark, SpotWords } from "./spot-words";
import type { Pointing, ThreadMessage } from "./thread-data";

interface MessageRowProps {
  readonly message: ThreadMessage;
  /** The first that its reader has not seen. */
  readonly firstNew: boolean;
  readonly onOpenSpot: ((pointing: Pointing) => void) | undefined;
}

/** One message: who, when, what it points at, the words, the files. */
export function MessageRow({ message, firstNew, onOpenSpot }: MessageRowProps) {
  const { author, side, mine, audience, body, partLabel, spot, createdAt, attachments } = message;
  const note = audience === "staff";
  return (
    <li className="px-4 py-3 sm:px-6">
      {firstNew && (
        <p className="mb-2 flex items-center gap-3 text-caption font-semibold text-blue">
          new
          <span className="h-px flex-1 bg-blue" />
        </p>
      )}
      <div className={note ? "border-l-3 border-dashed border-edge pl-3" : ""}>
        <p className="flex flex-wrap items-baseline gap-x-2 text-small text-soft">
          <span className="font-semibold text-ink">{mine ? "You" : author}</span>
          {!mine && <span>{side}</span>}
          <DateTime at={createdAt} show="day-time" />
          {note && <span className="font-semibold text-ink">note, staff only</span>}
        </p>
        {(partLabel || spot) && <Pointer pointing={{ partLabel, spot }} onOpenSpot={onOpenSpot} />}
        {body && <p className="max-w-prose break-words whitespace-pre-wrap">{body}</p>}
        {attachments.length > 0 && (
          <div className="mt-2">
            <AttachmentList attachments={attachments} />
          </div>
        )}
      </div>
    </li>
  );
}

function Pointer({
  pointing,
  onOpenSpot,
}: { readonly pointing: Pointing } & Pick<MessageRowProps, "onOpenSpot">) {
  const words = (
    <>
      <SpotMark />
      <SpotWords {...pointing} />
    </>
  );
  if (!onOpenSpot) return <p className="flex items-baseline gap-1.5 text-small text-soft">{words}</p>;
  return (
    <button
      type="button"
      onClick={() => onOpenSpot(pointing)}
      className="flex items-baseline gap-1.5 text-left text-small text-blue underline decoration-1 underline-offset-[0.2em] hover:decoration-2 pointer-coarse:min-h-11"
    >
      {words}
      <span className="sr-only">, show it on the drawing</span>
    </button>
  );
}
