import { Button } from "../button";
import { type DraftFile, mustBeSettled, type ShownFinding } from "./order-view";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

interface Open {
  readonly words: string;
  readonly at: string;
}

interface QuoteActProps {
  readonly version: number;
  readonly requestId: string;
  readonly files: readonly DraftFile[];
  readonly findings: readonly ShownFinding[];
  readonly delivered: boolean;
  /** Choices are still on their way to be saved: a quote now would be of the ones before. */
  readonly saving: boolean;
}

/** The one act of a draft, with what still stands before it. */
export function QuoteAct({ version, requestId, files, findings, delivered, saving }: QuoteActProps) {
  const { Form, pending, refusal } = useAct("quote");
  const stops = findings.filter(({ severity }) => severity === "stop");
  const asks = findings.filter(mustBeSettled).length - stops.length;
  const open = stillOpen({ files, delivered });
  return (
    <Form method="post" className="mt-4 space-y-3 print:hidden">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="quote" />
      <input type="hidden" name="version" value={version} />
      <input type="hidden" name="requestId" value={requestId} />
      {open.length > 0 && (
        <ul className="space-y-1">
          {open.map(({ words, at }) => (
            <li key={words}>
              <a href={at}>{words}</a>
            </li>
          ))}
        </ul>
      )}
      <Button
        variant="primary"
        size="large"
        wide
        pending={pending || saving}
        disabled={open.length > 0 || stops.length > 0}
        aria-describedby="quote-words"
      >
        {stops.length > 0
          ? `Settle ${stops.length} ${stops.length === 1 ? "finding" : "findings"} to quote`
          : open.length > 0
            ? `${open.length} ${open.length === 1 ? "thing" : "things"} to say before a quote`
            : "Get a firm quote"}
      </Button>
      <p id="quote-words" className="text-caption text-soft">
        {stops.length > 0
          ? "Filled pins that stop the cut have to be mended in the drawing, or their layer set aside."
          : "It freezes the drawings as they are, holds the price for its days, and binds you to nothing."}
        {asks > 0 &&
          stops.length === 0 &&
          ` You answer ${asks} ${asks === 1 ? "question" : "questions"} next.`}
      </p>
    </Form>
  );
}

function stillOpen({ files, delivered }: Pick<QuoteActProps, "files" | "delivered">): Open[] {
  const withParts = files.filter(({ kinds }) => kinds > 0);
  return [
    ...(files.length === 0 ? [{ words: "Add a drawing", at: "#files" }] : []),
    ...files.flatMap((file): Open[] => {
      const at = `#file-${file.number}`;
      if (file.state === "queued") return [{ words: `${file.fileName} is being read`, at }];
      if (file.state === "failed")
        return [{ words: `${file.fileName} cannot be read: remove or replace it`, at }];
      return file.kinds === 0 ? [{ words: `No part in ${file.fileName}: remove or replace it`, at }] : [];
    }),
    ...toAnswer("Confirm the size", withParts, ({ unit }) => unit === null),
    ...toAnswer("Choose the stock", withParts, ({ materialId }) => materialId === null),
    ...(delivered ? [] : [{ words: "Say where it goes", at: "#delivery" }]),
  ];
}

/** One line for a question, however many drawings it is open for. */
function toAnswer(act: string, files: readonly DraftFile[], isOpen: (file: DraftFile) => boolean): Open[] {
  const open = files.filter(isOpen);
  if (open.length === 0) return [];
  const of = files.length === 1 ? "" : ` of ${open.length} ${open.length === 1 ? "drawing" : "drawings"}`;
  return [{ words: `${act}${of}`, at: "#questions" }];
}
