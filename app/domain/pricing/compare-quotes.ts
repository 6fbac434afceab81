import type { LineKind, PricedQuote, QuoteLine } from "./quote";

/** A line that is not what it was; null where one of the quotes has no such line. Cents. */
export interface LineDifference {
  readonly kind: LineKind;
  readonly was: QuoteLine | null;
  readonly now: QuoteLine | null;
  readonly difference: number;
}

const byKind = (lines: readonly QuoteLine[]): Map<LineKind, QuoteLine[]> => {
  const kinds = new Map<LineKind, QuoteLine[]>();
  for (const line of lines) kinds.set(line.kind, [...(kinds.get(line.kind) ?? []), line]);
  return kinds;
};

/**
 * Lines whose amounts differ between an earlier and a later quote of one order, in the later one's order, lines
 * that went last. Lines of one kind are matched in their order, which is that of the stocks. The differences
 * add up to the difference of the totals.
 */
export function compareQuotes(
  earlier: Pick<PricedQuote, "lines">,
  later: Pick<PricedQuote, "lines">,
): readonly LineDifference[] {
  const was = byKind(earlier.lines);
  const now = byKind(later.lines);
  return [...new Set([...now.keys(), ...was.keys()])].flatMap((kind) => {
    const before = was.get(kind) ?? [];
    const after = now.get(kind) ?? [];
    return Array.from({ length: Math.max(before.length, after.length) }, (_, i) => {
      const old = before[i] ?? null;
      const fresh = after[i] ?? null;
      return { kind, was: old, now: fresh, difference: (fresh?.amount ?? 0) - (old?.amount ?? 0) };
    }).filter((line) => line.difference !== 0);
  });
}
