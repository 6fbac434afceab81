import { convexHull, flattenPath, type Point } from "../geometry";
import type { Part } from "../parts";
import type { FitRule } from "./finding";

/** Turns tried for a part whose smallest rectangle is too long: it may still go on the sheet askew. */
const TURNS = 720;
/** Chords of the part's outline, millimetres. */
const CHORD = 0.05;

/** Parts that go on the sheet, less its margins, at no angle. Grain is another matter. */
export const partLargerThanSheet: FitRule = ({ report, stock, say }) => {
  const width = stock.sheet.width - 2 * stock.margin;
  const height = stock.sheet.height - 2 * stock.margin;
  const long = Math.max(width, height);
  const short = Math.min(width, height);
  return report.parts
    .filter((part) => !goesOn(part, long, short))
    .map((part) => {
      const isLong = part.smallestRect.long > long;
      return {
        code: "part-larger-than-sheet",
        severity: "stop" as const,
        part: part.id,
        copy: null,
        at: part.copies[0].at,
        measured: isLong ? part.smallestRect.long : part.smallestRect.short,
        limit: isLong ? long : short,
        words: `Part ${part.name} is ${say(part.smallestRect.long)} by ${say(part.smallestRect.short)}; the sheet has room for ${say(long)} by ${say(short)}. Divide it or choose a larger sheet.`,
        remedy: null,
      };
    });
};

function goesOn(part: Part, long: number, short: number): boolean {
  if (part.smallestRect.long <= long && part.smallestRect.short <= short) return true;
  if (part.smallestRect.short > Math.hypot(long, short)) return false;
  const hull = convexHull(flattenPath(part.outer, CHORD));
  for (let step = 0; step < TURNS; step++) {
    const turn = (step / TURNS) * Math.PI;
    const along = extent(hull, Math.cos(turn), Math.sin(turn));
    if (along <= long && extent(hull, -Math.sin(turn), Math.cos(turn)) <= short) return true;
  }
  return false;
}

/** How far the points reach in a direction, from the first to the last. */
function extent(points: readonly Point[], x: number, y: number): number {
  let low = Infinity;
  let high = -Infinity;
  for (const point of points) {
    const at = point.x * x + point.y * y;
    low = Math.min(low, at);
    high = Math.max(high, at);
  }
  return high - low;
}
