interface PinProps {
  readonly number: number;
  /** Filled when it must be settled, hollow when it is good to know. */
  readonly filled: boolean;
}

/** The pin's shape and number with its point at (0, 0), for use inside a drawing. */
export function PinMark({ number, filled }: PinProps) {
  return (
    <g transform="translate(0 -20)">
      <path
        d="M0 20V10A10 10 0 1 1 10 20Z"
        strokeWidth="1.5"
        className={filled ? "fill-amber stroke-amber" : "fill-sheet stroke-amber"}
      />
      <text
        x="10"
        y="13.5"
        textAnchor="middle"
        className={`font-mono text-[10px] font-semibold ${filled ? "fill-on-amber" : "fill-amber"}`}
      >
        {number}
      </text>
    </g>
  );
}

/** A finding's number as it stands in a list; the same pin stands on the drawing. */
export function Pin({ number, filled }: PinProps) {
  return (
    <svg
      width="22"
      height="22"
      viewBox="-1 -21 22 22"
      role="img"
      aria-label={`${filled ? "to settle" : "good to know"}, number ${number}`}
      className="shrink-0"
    >
      <PinMark number={number} filled={filled} />
    </svg>
  );
}
