import { RuleProgress } from "../rule-progress";
import { sizeInWords } from "./size-in-words";
import type { Upload } from "./use-uploads";

interface UploadLineProps {
  readonly upload: Upload;
  /** What has become of a kept file: still being read, read, or unreadable with the reason. */
  readonly reading?:
    | { readonly state: "queued" | "failed" | "read"; readonly words: string | null }
    | undefined;
}

/** One file on its way: the stage it is in, as it really is, and what came of it. */
export function UploadLine({ upload, reading }: UploadLineProps) {
  const { fileName, size, sent, stage, words } = upload;
  const failed = stage === "refused" || reading?.state === "failed";
  const share = shareOf(upload, reading?.state);
  return (
    <li className="w-full text-left">
      <RuleProgress
        label={failed ? fileName : `${fileName}: ${stageWords(stage, reading?.state)}`}
        share={share}
        stopped={failed}
        note={
          failed
            ? "not taken"
            : stage === "sending"
              ? `${sizeInWords(sent)} of ${sizeInWords(size)}`
              : sizeInWords(size)
        }
      />
      {failed && (
        <p role="alert" className="mt-1 text-small text-amber">
          {words ?? reading?.words}
        </p>
      )}
    </li>
  );
}

/** Sending is the first seven tenths of the rule, reading the rest: half of it while it lasts. */
function shareOf({ stage, sent, size }: Upload, reading: "queued" | "failed" | "read" | undefined): number {
  if (stage === "waiting" || stage === "refused") return 0;
  if (stage === "sending") return size > 0 ? (0.7 * sent) / size : 0;
  return reading === "read" ? 1 : 0.85;
}

function stageWords(stage: Upload["stage"], reading: "queued" | "failed" | "read" | undefined): string {
  if (stage === "waiting") return "waits its turn";
  if (stage === "sending") return "sending";
  return reading === "read" ? "read" : "reading";
}
