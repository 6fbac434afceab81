import type { FitRule } from "./finding";

/** Copies drawn in the file and several sets ordered: both numbers multiply, which may not be meant. One finding for all. */
export const copiesTimesQuantity: FitRule = ({ report, sets = 1 }) => {
  if (sets <= 1) return [];
  const most = report.parts.reduce<(typeof report.parts)[number] | null>(
    (best, part) => (part.quantity > (best?.quantity ?? 1) ? part : best),
    null,
  );
  if (!most) return [];
  return [
    {
      code: "copies-times-quantity",
      severity: "ask",
      part: most.id,
      copy: null,
      at: most.copies[0].at,
      measured: most.quantity * sets,
      limit: null,
      words: `Part ${most.name} is drawn ${most.quantity} times and ${sets} sets are ordered: ${most.quantity * sets} in all. Is that meant?`,
      remedy: null,
    },
  ];
};
