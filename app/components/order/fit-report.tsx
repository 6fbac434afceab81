import { Pin } from "../pin";
import { RailSection } from "../rail";
import { AnswerFinding } from "./answer-finding";
import { mustBeSettled, type ShownFinding } from "./order-view";
import type { OrderFocus } from "./use-order-focus";

interface FitReportProps {
  readonly findings: readonly ShownFinding[];
  readonly focus: OrderFocus;
  /** Where nothing could be checked yet: what is missing. */
  readonly waitsFor?: string | null;
  /** Questions can be answered now. */
  readonly answering?: boolean;
}

/** What would go wrong on the router or at assembly, numbered as pinned on the drawing. */
export function FitReport({ findings, focus, waitsFor = null, answering = false }: FitReportProps) {
  const settle = findings.filter(mustBeSettled).length;
  const know = findings.length - settle;
  const note = findings.length > 0 ? `${settle} to settle, ${know} to know` : undefined;
  return (
    <RailSection title="Fit report" note={note}>
      {findings.length === 0 && (
        <p className="text-soft">{waitsFor ?? "Nothing stands in the way of cutting this."}</p>
      )}
      <ol className="divide-y divide-dashed divide-line">
        {findings.map((finding) => (
          <li key={finding.number} className="py-2 first:pt-0 last:pb-0">
            <div
              id={`finding-${finding.number}`}
              tabIndex={-1}
              className="flex scroll-mt-4 items-start gap-3 outline-offset-4"
            >
              <Pin number={finding.number} filled={mustBeSettled(finding)} />
              <p className="min-w-0 flex-1">{finding.words}</p>
              {(finding.at || finding.label) && (
                <button
                  type="button"
                  onClick={() => focus.look(finding)}
                  className="shrink-0 text-blue hover:underline pointer-coarse:min-h-11 print:hidden"
                >
                  Look<span className="sr-only"> at finding {finding.number}</span>
                </button>
              )}
            </div>
            {answering && finding.severity === "ask" && <AnswerFinding finding={finding} />}
          </li>
        ))}
      </ol>
    </RailSection>
  );
}
