import { toScreen, type View } from "./view";
import type { ViewSpot } from "./view-geometry";

/** A ring with a cross at a place that somebody pointed at, the same size at every scale. */
export function SpotMark({ spot, view }: { readonly spot: ViewSpot; readonly view: View }) {
  const [x, y] = toScreen(view, spot.at);
  return (
    <svg x={x} y={y} role="img" aria-label={spot.label} className="pointer-events-none overflow-visible">
      <circle r="11" fill="none" strokeWidth="4" className="stroke-sheet" />
      <circle r="11" fill="none" strokeWidth="2" className="stroke-blue" />
      <path d="M-18 0H-5M5 0H18M0 -18V-5M0 5V18" strokeWidth="2" className="stroke-blue" />
    </svg>
  );
}
