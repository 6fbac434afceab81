import type { RuleStage } from "~/components/steel-rule";
import { MAIN_LINE, type Stage } from "~/domain/orders";
import { dateWords } from "../date-words";

export interface RuleFacts {
  readonly stage: Stage;
  readonly heldFrom: Stage | null;
  /** When each stage was first reached, ISO instants. */
  readonly reached: Readonly<Partial<Record<Stage, string>>>;
  /** Share of the pieces that are further than the stage, 0 to 1. */
  readonly further: number;
  readonly promisedFor: string | null;
  readonly shippedAt: string | null;
  /** When the page was made, so that server and browser say the same. */
  readonly now: string;
}

/** Where an order stands on the line from draft to shipped; what comes between is shown where it came in. */
export function placeOnLine({ stage, heldFrom, further }: Pick<RuleFacts, "stage" | "heldFrom" | "further">) {
  const standing = stage === "needs-review" ? "quoted" : stage === "on-hold" ? heldFrom : stage;
  const line: readonly (Stage | null)[] = MAIN_LINE;
  const index = line.indexOf(standing);
  return Math.max(0, index) + (index >= 0 && index < MAIN_LINE.length - 1 ? Math.min(further, 0.95) : 0);
}

/** Promised for a moment that has gone by, and not shipped. */
export const isLate = ({
  stage,
  promisedFor,
  shippedAt,
  now,
}: Pick<RuleFacts, "stage" | "promisedFor" | "shippedAt" | "now">): boolean =>
  promisedFor !== null &&
  shippedAt === null &&
  !["draft", "quoted", "needs-review", "cancelled"].includes(stage) &&
  Date.parse(promisedFor) < Date.parse(now);

/** An order's progress as the steel rule shows it. */
export function ruleOf(
  facts: RuleFacts,
  zone: string,
): { stages: readonly RuleStage[]; at: number; late: boolean } {
  const at = placeOnLine(facts);
  const here = Math.floor(at + 1e-9);
  return {
    at,
    late: isLate(facts),
    stages: MAIN_LINE.map((name, index) => {
      const date = facts.reached[name];
      if (index === here && name !== "shipped") return { name, date: "now" };
      if (index < here && date) return { name, date: dateWords(new Date(date), zone) };
      if (name !== "shipped") return { name };
      const end = facts.shippedAt ?? facts.promisedFor;
      return end ? { name, date: dateWords(new Date(end), zone) } : { name };
    }),
  };
}
