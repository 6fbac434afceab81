import { RuleMarks } from "./rule-marks";

interface RuleProgressProps {
  /** What is under way, in words: "Sending galley.dxf". */
  readonly label: string;
  /** 0 to 1, or null while the share is not known. */
  readonly share: number | null;
  /** A word or measure at the right: "2.1 of 4.0 MB". */
  readonly note?: string;
  readonly stopped?: boolean;
}

/** Progress of one upload or one long act, as the same rule that shows an order's stages. */
export function RuleProgress({ label, share, note, stopped = false }: RuleProgressProps) {
  const bounded = share === null ? 0 : Math.min(Math.max(share, 0), 1);
  const value = share === null ? undefined : Math.round(bounded * 100);
  return (
    <div className="min-w-0">
      <p className="mb-1.5 flex flex-wrap justify-between gap-x-4 text-small">
        <span className="min-w-0 break-words">{label}</span>
        <span className={`measure ${stopped ? "text-amber" : "text-soft"}`}>
          {note ?? (value === undefined ? "…" : `${value} %`)}
        </span>
      </p>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={value}
        aria-valuetext={note}
      >
        <svg aria-hidden="true" width="100%" height="13" className="block overflow-visible">
          <RuleMarks
            intervals={10}
            divisions={10}
            travelled={bounded}
            late={stopped}
            heights={{ long: 13, middle: 8, short: 5, bar: 4 }}
          />
        </svg>
      </div>
    </div>
  );
}
