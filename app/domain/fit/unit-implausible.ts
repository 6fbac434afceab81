import type { FitRule } from "./finding";

/** Parts under half an inch or over twenty feet in the chosen unit: another unit may be meant. One finding for all. */
export const unitImplausible: FitRule = ({ report, limits, say }) => {
  const doubtful = report.parts.filter(
    ({ smallestRect }) =>
      smallestRect.long < limits.shortestPlausible || smallestRect.long > limits.longestPlausible,
  );
  if (doubtful.length === 0) return [];
  const worst = doubtful.reduce((most, part) =>
    part.smallestRect.long > most.smallestRect.long ? part : most,
  );
  const isLong = worst.smallestRect.long > limits.longestPlausible;
  return [
    {
      code: "unit-implausible",
      severity: "ask",
      part: worst.id,
      copy: null,
      at: worst.copies[0].at,
      measured: worst.smallestRect.long,
      limit: isLong ? limits.longestPlausible : limits.shortestPlausible,
      words: `Part ${worst.name} is ${say(worst.smallestRect.long)} long. Is the drawing's unit right?`,
      remedy: null,
    },
  ];
};
