import { Measure } from "../measure";
import type { Pointing } from "./thread-data";

/** The mark that stands on the drawing, for beside the words. */
export function SpotMark() {
  return (
    <svg width="14" height="14" viewBox="-7 -7 14 14" aria-hidden="true" className="shrink-0 self-center">
      <circle r="4" fill="none" strokeWidth="1.4" className="stroke-blue" />
      <path d="M-6.5 0H-2M2 0H6.5M0 -6.5V-2M0 2V6.5" strokeWidth="1.4" className="stroke-blue" />
    </svg>
  );
}

interface SpotWordsProps extends Pointing {
  /** Inside a sentence rather than at its start. */
  readonly within?: boolean;
}

/** `Part C at 210.0, 310.0 mm`. */
export function SpotWords({ partLabel, spot, within = false }: SpotWordsProps) {
  return (
    <span>
      {partLabel ? (
        <>
          {within ? "part" : "Part"} <span className="measure">{partLabel}</span>
        </>
      ) : (
        `${within ? "the" : "The"} drawing`
      )}
      {spot && (
        <>
          {" "}
          at <Measure length={spot.x} digits={1} bare />, <Measure length={spot.y} digits={1} />
        </>
      )}
    </span>
  );
}
