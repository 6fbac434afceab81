import { Button } from "../button";
import { plainField } from "../field";
import { TextAreaField } from "../text-area-field";
import type { ShownFinding } from "./order-view";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

/** The builder's answer to a question about the drawing: as drawn, or a question back to the shop. */
export function AnswerFinding({ finding }: { readonly finding: ShownFinding }) {
  const { Form, pending, refusal } = useAct("answer", String(finding.number));
  const { id, answer } = finding;
  if (id === null) return null;
  if (answer?.kind === "accept") return <p className="mt-1 pl-8.5 text-soft">You answered: as drawn.</p>;
  return (
    <Form method="post" className="mt-2 space-y-2 pl-8.5">
      <RefusalNotice refusal={refusal} />
      {answer?.kind === "message" && (
        <p className="text-soft">You asked the shop: “{answer.note}”. It answers before you pay.</p>
      )}
      <input type="hidden" name="intent" value="answer" />
      <input type="hidden" name="findingId" value={id} />
      <div className="flex flex-wrap gap-2">
        <Button size="small" name="answer" value="accept" pending={pending}>
          It is as it should be
        </Button>
        <details className="min-w-0 open:w-full">
          <summary className="inline-flex min-h-7 items-center text-blue hover:underline pointer-coarse:min-h-11">
            Ask the shop
          </summary>
          <div className="mt-2 space-y-2">
            <TextAreaField
              field={plainField("note", { id: `note-${finding.number}` })}
              label="Your question"
              rows={2}
              maxLength={1000}
            />
            <Button size="small" name="answer" value="message" pending={pending}>
              Send the question
            </Button>
          </div>
        </details>
      </div>
    </Form>
  );
}
