import type { FrozenView } from "~/routes/builder/frozen-view.server";
import { RailSection } from "../rail";
import { RuleProgress } from "../rule-progress";

const STAGE_WORDS: Readonly<Record<string, string>> = {
  received: "received by the shop",
  nested: "laid out on sheets",
  cut: "cut",
  "tabs-removed": "tabs off, edges done",
  shipped: "shipped",
};

interface ProgressPanelProps {
  readonly pieces: FrozenView["pieces"];
  readonly parcels: FrozenView["parcels"];
  readonly pickUp: boolean;
}

/** How far the pieces are, stage by stage, with what is made anew and where the parcels are. */
export function ProgressPanel({ pieces, parcels, pickUp }: ProgressPanelProps) {
  if (!pieces)
    return (
      <RailSection title="In the shop">
        <p className="text-soft">
          Paid. The shop takes it in next; each piece then has its own label, and is followed here.
        </p>
      </RailSection>
    );
  const total = pieces.progress[0]?.of ?? 0;
  return (
    <RailSection title="In the shop" note={`${total} ${total === 1 ? "piece" : "pieces"}`} measured>
      <div className="space-y-3">
        {pieces.progress.map(({ stage, reached, of }) => (
          <RuleProgress
            key={stage}
            label={stage === "shipped" && pickUp ? "handed over" : (STAGE_WORDS[stage] ?? stage)}
            share={of > 0 ? reached / of : 0}
            note={`${reached} of ${of}`}
          />
        ))}
      </div>
      {pieces.remakes.length > 0 && (
        <ul className="mt-3 space-y-1 text-amber">
          {pieces.remakes.map(({ part, number, of, state, cause }) => (
            <li key={`${part} ${number}`}>
              {part} {number} of {of} was {state}
              {cause ? ` (${cause})` : ""}: it is cut again.
            </li>
          ))}
        </ul>
      )}
      {parcels.length > 0 && (
        <ul className="mt-3 space-y-1">
          {parcels.map(({ number, weight, tracking, status }) => (
            <li key={number} className="flex flex-wrap justify-between gap-x-4">
              <span>
                Parcel {number}, <span className="measure">{weight.toFixed(1)} kg</span>
                {status && <span className="text-soft">, {status.replaceAll("-", " ")}</span>}
              </span>
              {tracking.map((code) => (
                <span key={code} className="measure">
                  {code}
                </span>
              ))}
            </li>
          ))}
        </ul>
      )}
    </RailSection>
  );
}
