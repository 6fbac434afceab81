import { type ClipboardEvent, type FormEvent, type KeyboardEvent, useId, useRef, useState } from "react";
import { MESSAGE_LIMITS } from "~/domain/orders";
import { Button } from "../button";
import { CheckboxField } from "../checkbox-field";
import { plainField } from "../field";
import { TextAreaField } from "../text-area-field";
import { sizeInWords } from "./attachment-list";
import { SpotMark, SpotWords } from "./spot-words";
import { ACCEPTED_FILES, type Pointing, type ThreadAudience } from "./thread-data";
import { useDraft } from "./use-draft";
import type { OutgoingMessage } from "./use-thread";

interface ComposerProps {
  readonly orderId: string;
  readonly audience: ThreadAudience;
  /** What is chosen on the page, which the message may point at. */
  readonly pointing: Pointing | null;
  readonly pending: boolean;
  /** Rejects with a sentence when the message was not written. */
  readonly onSend: (message: OutgoingMessage) => Promise<unknown>;
}

/** Where a message is written. Enter makes a new line; Ctrl or Cmd with Enter sends. */
export function Composer({ orderId, audience, pointing, pending, onSend }: ComposerProps) {
  const id = useId();
  const picker = useRef<HTMLInputElement>(null);
  const attempt = useRef({ content: "", messageId: "" });
  const { draft, change, clear } = useDraft(`thread-draft:${audience}:${orderId}`);
  const [files, setFiles] = useState<readonly File[]>([]);
  const [error, setError] = useState<string | null>(null);
  const note = audience === "staff" && draft.note;

  const addFiles = (added: readonly File[]) => {
    const fault = faultOf([...files, ...added]);
    setError(fault);
    if (!fault) setFiles([...files, ...added]);
  };

  const send = async () => {
    if (pending) return;
    if (draft.body.trim() === "" && files.length === 0) {
      setError("Write something, or attach a file.");
      return;
    }
    setError(null);
    try {
      await onSend({ ...draft, note, files, messageId: messageIdFor(attempt.current, draft.body, files) });
    } catch (failure) {
      setError(failure instanceof Error ? failure.message : "It was not sent. Try again.");
      return;
    }
    attempt.current = { content: "", messageId: "" };
    clear();
    setFiles([]);
  };

  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key !== "Enter" || !(event.ctrlKey || event.metaKey)) return;
    event.preventDefault();
    void send();
  };

  const onPaste = (event: ClipboardEvent) => {
    if (event.clipboardData.files.length === 0) return;
    event.preventDefault();
    addFiles([...event.clipboardData.files]);
  };

  const field = plainField("body", { id: `${id}body`, errors: error ? [error] : [] });
  return (
    <form
      className="space-y-3 border-t border-line px-4 py-4 sm:px-6 print:hidden"
      onSubmit={(event: FormEvent) => {
        event.preventDefault();
        void send();
      }}
    >
      <div role={error ? "alert" : undefined}>
        <TextAreaField
          field={field}
          label={
            note
              ? "Note for the staff"
              : audience === "staff"
                ? "Message to the builder"
                : "Message to the shop"
          }
          hint="Enter makes a new line, Ctrl or Cmd + Enter sends."
          value={draft.body}
          maxLength={MESSAGE_LIMITS.characters}
          rows={3}
          onChange={(event) => change({ body: event.currentTarget.value })}
          onKeyDown={onKeyDown}
          onPaste={onPaste}
        />
      </div>
      <PointingChoice
        kept={draft.pointing}
        offered={pointing}
        onChange={(next) => change({ pointing: next })}
      />
      {files.length > 0 && (
        <ul className="space-y-1 text-small" aria-label="Files to send">
          {files.map((file, index) => (
            <li
              key={`${file.name}${file.size}${file.lastModified}`}
              className="flex flex-wrap items-baseline gap-x-3"
            >
              <span className="min-w-0 break-all">{file.name}</span>
              <span className="measure text-soft">{sizeInWords(file.size)}</span>
              <Button
                type="button"
                variant="quiet"
                size="small"
                aria-label={`Take off ${file.name}`}
                onClick={() => setFiles(files.filter((_, at) => at !== index))}
              >
                Take off
              </Button>
            </li>
          ))}
        </ul>
      )}
      {audience === "staff" && (
        <CheckboxField
          field={plainField("note", { id: `${id}note` })}
          label="A note for the staff only"
          hint="The builder never sees it, nor is told of it."
          checked={draft.note}
          onChange={(event) => change({ note: event.currentTarget.checked })}
        />
      )}
      <div className="flex flex-wrap items-center gap-2">
        <Button pending={pending}>{note ? "Keep the note" : "Send"}</Button>
        <input
          ref={picker}
          type="file"
          multiple
          accept={ACCEPTED_FILES}
          className="sr-only"
          tabIndex={-1}
          aria-hidden="true"
          onChange={(event) => {
            addFiles([...(event.currentTarget.files ?? [])]);
            event.currentTarget.value = "";
          }}
        />
        <Button type="button" variant="quiet" onClick={() => picker.current?.click()}>
          Attach files
        </Button>
        <span className="text-caption text-soft">pictures, PDF or DXF, up to 10 MB each</span>
      </div>
    </form>
  );
}

interface PointingChoiceProps {
  readonly kept: Pointing | null;
  readonly offered: Pointing | null;
  readonly onChange: (pointing: Pointing | null) => void;
}

/** What the message points at, and the offer to point at what is chosen on the page. */
function PointingChoice({ kept, offered, onChange }: PointingChoiceProps) {
  if (kept)
    return (
      <p className="flex flex-wrap items-baseline gap-x-1.5 text-small">
        <SpotMark />
        <SpotWords {...kept} />
        <span className="ml-2">
          <Button type="button" variant="quiet" size="small" onClick={() => onChange(null)}>
            Do not point there
          </Button>
        </span>
      </p>
    );
  if (!offered) return null;
  return (
    <Button type="button" size="small" onClick={() => onChange(offered)}>
      <SpotMark />
      <span>
        Point at <SpotWords {...offered} within />
      </span>
    </Button>
  );
}

/** The same id for every attempt at the same words and files; another one as soon as they differ. */
function messageIdFor(
  attempt: { content: string; messageId: string },
  body: string,
  files: readonly File[],
): string {
  const content = JSON.stringify([
    body,
    files.map(({ name, size, lastModified }) => [name, size, lastModified]),
  ]);
  if (attempt.content !== content) {
    attempt.content = content;
    attempt.messageId = Array.from(crypto.getRandomValues(new Uint8Array(16)), (byte) =>
      byte.toString(16).padStart(2, "0"),
    ).join("");
  }
  return attempt.messageId;
}

function faultOf(files: readonly File[]): string | null {
  if (files.length > MESSAGE_LIMITS.files)
    return `At most ${MESSAGE_LIMITS.files} files go with one message.`;
  const large = files.find(({ size }) => size > MESSAGE_LIMITS.fileBytes);
  return large ? `${large.name} is ${sizeInWords(large.size)}; a file may have 10 MB.` : null;
}
