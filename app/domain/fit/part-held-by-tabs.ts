import { formatMillimetres } from "../units";
import type { FitRule } from "./finding";

const squareCentimetres = (area: number): string => `${formatMillimetres(area / 100, 0)}\u2009cm²`;

/** Parts that can be cut but not held by vacuum alone: they get tabs, which leave stubs to sand. */
export const partHeldByTabs: FitRule = ({ report, limits, say }) =>
  report.parts.flatMap((part) => {
    const { short } = part.smallestRect;
    const isRefused = short < limits.narrowestPart || part.grossArea < limits.smallestPartArea;
    const isNarrow = short < limits.tabbedPartWidth;
    const isSmall = part.grossArea < limits.tabbedPartArea;
    if (isRefused || (!isNarrow && !isSmall)) return [];
    return [
      {
        code: "part-held-by-tabs",
        severity: "note" as const,
        part: part.id,
        copy: null,
        at: part.copies[0].at,
        measured: isSmall ? part.grossArea : short,
        limit: isSmall ? limits.tabbedPartArea : limits.tabbedPartWidth,
        words: isSmall
          ? `Part ${part.name} is small, ${squareCentimetres(part.grossArea)}: tabs hold it. Under ${squareCentimetres(limits.tabbedPartArea)} vacuum alone does not.`
          : `Part ${part.name} is ${say(short)} wide: tabs hold it. Under ${say(limits.tabbedPartWidth)} vacuum alone does not.`,
        remedy: null,
      },
    ];
  });
