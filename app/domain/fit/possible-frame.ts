import { boxContains } from "../geometry";
import type { Part } from "../parts";
import type { FitRule } from "./finding";

/** A rectangle fills its own smallest rectangle to this share. */
const FULL = 0.9999;

/** A rectangle with whole parts inside its openings: it may be a drawn sheet or border that is not to be cut. */
export const possibleFrame: FitRule = ({ report, say }) =>
  report.parts.flatMap((part) => {
    const { long, short } = part.smallestRect;
    if (part.quantity > 1 || part.features.length === 0 || part.grossArea < FULL * long * short) return [];
    const inside = report.parts.filter((other) => other !== part && standsInOpening(other, part));
    if (inside.length === 0) return [];
    return [
      {
        code: "possible-frame",
        severity: "ask" as const,
        part: part.id,
        copy: null,
        at: part.copies[0].at,
        measured: long,
        limit: null,
        words: `Part ${part.name}, ${say(long)} by ${say(short)}, has other parts inside its openings. Is it a part, or a drawn border?`,
        remedy: null,
      },
    ];
  });

const standsInOpening = (inner: Part, outer: Part): boolean =>
  outer.features.some(({ kind, box }) => kind === "cut-through" && boxContains(box, inner.box));
