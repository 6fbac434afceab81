import { RuleMarks } from "./rule-marks";

export interface RuleStage {
  readonly name: string;
  /** A day or a word, as it is shown: "Tue", "now", "Fri 4 Dec". */
  readonly date?: string;
}

interface SteelRuleProps {
  /** The stages at the long ticks, first to last; at least two. */
  readonly stages: readonly RuleStage[];
  /** Index of the stage reached; a fraction when some pieces are further: 2.4 is two fifths of the way to stage 3. */
  readonly at: number;
  readonly late?: boolean;
  /** `full` heads a page, `row` stands in a list with the stage in words, `mini` stands in a cell without words. */
  readonly size?: "full" | "row" | "mini";
}

/** At the first stage a stub is shown, so that the rule never looks unused. */
const STUB = 0.022;

/** An order's progress as a steel rule: stages at long ticks, travelled part in blue, in amber when late. */
export function SteelRule({ stages, at, late = false, size = "full" }: SteelRuleProps) {
  const intervals = Math.max(1, stages.length - 1);
  const reached = Math.min(Math.max(at, 0), intervals);
  const travelled = Math.max(reached / intervals, STUB);
  const current = Math.floor(reached + 1e-9);
  const words = wordsOf(stages, current, late);
  if (size === "mini") {
    return (
      <svg role="img" aria-label={words} width="96" height="9" className="overflow-visible">
        <RuleMarks
          intervals={intervals}
          divisions={4}
          travelled={travelled}
          late={late}
          heights={{ long: 9, middle: 5, short: 4, bar: 3 }}
        />
      </svg>
    );
  }
  if (size === "row") {
    return (
      <div className="w-full min-w-0">
        <svg role="img" aria-label={words} width="100%" height="13" className="block overflow-visible">
          <RuleMarks
            intervals={intervals}
            divisions={9}
            travelled={travelled}
            late={late}
            heights={{ long: 13, middle: 5, short: 5, bar: 3 }}
          />
        </svg>
        <p aria-hidden="true" className={`measure mt-1.5 text-small ${late ? "text-amber" : "text-ink"}`}>
          {stages[current]?.name}
        </p>
      </div>
    );
  }
  return (
    <figure className="min-w-0">
      <svg role="img" aria-label={words} width="100%" height="17" className="block overflow-visible">
        <RuleMarks
          intervals={intervals}
          divisions={20}
          travelled={travelled}
          late={late}
          heights={{ long: 17, middle: 10, short: 6, bar: 3 }}
        />
      </svg>
      <StageLabels stages={stages} current={current} late={late} />
    </figure>
  );
}

interface StageLabelsProps {
  readonly stages: readonly RuleStage[];
  readonly current: number;
  readonly late: boolean;
}

/** Under their ticks on a desk; folded into three columns where they would run into each other. */
function StageLabels({ stages, current, late }: StageLabelsProps) {
  const last = stages.length - 1;
  const tone = (index: number): string => (index === current ? (late ? "amber" : "blue") : "plain");
  return (
    <div aria-hidden="true">
      <svg aria-hidden="true" width="100%" height="38" className="hidden overflow-visible md:block">
        {stages.map((stage, index) => {
          const anchor = index === 0 ? "start" : index === last ? "end" : "middle";
          const x = `${(100 * index) / last}%`;
          return (
            <g key={stage.name} className="font-mono">
              <text
                x={x}
                y="17"
                textAnchor={anchor}
                className={`text-small ${{ amber: "fill-amber font-semibold", blue: "fill-blue font-semibold", plain: "fill-soft" }[tone(index)]}`}
              >
                {stage.name}
              </text>
              <text x={x} y="34" textAnchor={anchor} className="fill-soft text-caption">
                {stage.date}
              </text>
            </g>
          );
        })}
      </svg>
      <div className="measure mt-2 grid grid-cols-3 gap-x-3 gap-y-1.5 text-caption md:hidden">
        {stages.map((stage, index) => (
          <p key={stage.name} className="min-w-0">
            <span
              className={`block ${{ amber: "font-semibold text-amber", blue: "font-semibold text-blue", plain: index < current ? "text-ink" : "text-soft" }[tone(index)]}`}
            >
              {stage.name}
            </span>
            <span className="block text-soft">{stage.date}</span>
          </p>
        ))}
      </div>
    </div>
  );
}

function wordsOf(stages: readonly RuleStage[], current: number, late: boolean): string {
  const dated = stages.map((stage) => (stage.date ? `${stage.name} ${stage.date}` : stage.name));
  return `Stage ${stages[current]?.name ?? ""}, ${current + 1} of ${stages.length}${late ? ", late" : ""}: ${dated.join(", ")}`;
}
