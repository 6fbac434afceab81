interface RuleMarksProps {
  /** Number of intervals between long ticks. */
  readonly intervals: number;
  /** Short ticks in one interval; the middle one stands a little longer. */
  readonly divisions: number;
  /** Travelled share, 0 to 1. */
  readonly travelled: number;
  readonly late: boolean;
  /** Heights in px of the long, middle and short ticks and of the travelled bar. */
  readonly heights: {
    readonly long: number;
    readonly middle: number;
    readonly short: number;
    readonly bar: number;
  };
}

const percent = (share: number): string => `${Math.round(share * 1e4) / 100}%`;

interface Tick {
  readonly x: string;
  readonly height: number;
  readonly isLong: boolean;
  readonly passed: boolean;
  /** Half a pixel inwards at the ends, so that the first and last tick keep their full thickness. */
  readonly inwards: string | undefined;
}

function graduations({ intervals, divisions, travelled, heights }: Omit<RuleMarksProps, "late">): Tick[] {
  const count = intervals * divisions;
  return Array.from({ length: count + 1 }, (_, place) => {
    const isLong = place % divisions === 0;
    const isMiddle = divisions % 2 === 0 && place % divisions === divisions / 2;
    return {
      x: percent(place / count),
      height: isLong ? heights.long : isMiddle ? heights.middle : heights.short,
      isLong,
      passed: travelled > 0 && place <= travelled * count + 1e-9,
      inwards: place === 0 ? "translate(0.5)" : place === count ? "translate(-0.5)" : undefined,
    };
  });
}

/**
 * Graduations of a steel rule across the whole width of the SVG that holds them. Positions are percentages, so
 * the rule stretches with its page while ticks and bar keep their thickness.
 */
export function RuleMarks({ late, ...rule }: RuleMarksProps) {
  return (
    <g shapeRendering="crispEdges">
      {graduations(rule).map((tick) => (
        <line
          key={tick.x}
          x1={tick.x}
          x2={tick.x}
          y1="0"
          y2={tick.height}
          transform={tick.inwards}
          strokeWidth="1"
          className={
            tick.isLong
              ? tick.passed
                ? "stroke-ink"
                : "stroke-edge"
              : tick.passed
                ? "stroke-soft"
                : "stroke-line"
          }
        />
      ))}
      <rect
        x="0"
        y="0"
        width={percent(rule.travelled)}
        height={rule.heights.bar}
        className={late ? "fill-amber" : "fill-blue"}
      />
    </g>
  );
}
