import type { FitRule } from "./finding";

/** Parts so small or narrow that vacuum and tabs hardly hold them. */
export const partTooSmallToHold: FitRule = ({ report, limits, say }) =>
  report.parts.flatMap((part) => {
    const isNarrow = part.smallestRect.short < limits.narrowestPart;
    const isSmall = part.grossArea < limits.smallestPartArea;
    if (!isNarrow && !isSmall) return [];
    const size = `${say(part.smallestRect.long)} by ${say(part.smallestRect.short)}`;
    return [
      {
        code: "part-too-small-to-hold",
        severity: "ask" as const,
        part: part.id,
        copy: null,
        at: part.copies[0].at,
        measured: isNarrow ? part.smallestRect.short : part.grossArea,
        limit: isNarrow ? limits.narrowestPart : limits.smallestPartArea,
        words: isNarrow
          ? `Part ${part.name}, ${size}, is narrower than ${say(limits.narrowestPart)} and may move while it is cut. Leave it in a carrier, or agree to hand work.`
          : `Part ${part.name}, ${size}, is too small to hold well. Leave it in a carrier, or agree to hand work.`,
        remedy: null,
      },
    ];
  });
