import type { FitRule } from "./finding";

/** Parts that differ by less than half a millimetre: perhaps one part, drawn twice with a slip. */
export const nearEqualParts: FitRule = ({ report, say }) =>
  report.nearEqual.flatMap(({ one, other, difference }) => {
    const [first, second] = [one, other].map((id) => report.parts.find((part) => part.id === id));
    if (!first || !second) return [];
    return [
      {
        code: "near-equal-parts",
        severity: "note" as const,
        part: second.id,
        copy: null,
        at: second.copies[0].at,
        measured: difference,
        limit: null,
        words: `Parts ${first.name} and ${second.name} are equal but for ${say(difference)}. Are they meant to differ?`,
        remedy: null,
      },
    ];
  });
