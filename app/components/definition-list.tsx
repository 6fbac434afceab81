import type { ReactNode } from "react";

export interface Definition {
  readonly term: string;
  /** Where two items carry the same term. */
  readonly id?: string;
  readonly value: ReactNode;
  /** Under the term, in soft ink: how it came about. */
  readonly note?: ReactNode;
  /** Prose instead of a measure. */
  readonly prose?: boolean;
  /** On blue wash: the one line that is offered or chosen. */
  readonly chosen?: boolean;
}

/** Names at the left, measures at the right. */
export function DefinitionList({ items }: { readonly items: readonly Definition[] }) {
  return (
    <dl className="text-small">
      {items.map((item) => (
        <div
          key={item.id ?? item.term}
          className={`flex items-baseline justify-between gap-4 py-1.5 ${item.chosen ? "rounded-sheet bg-blue-wash px-2.5" : ""}`}
        >
          <dt className="min-w-0">
            {item.term}
            {item.note && <span className="block text-caption text-soft">{item.note}</span>}
          </dt>
          <dd className={`text-right ${item.prose ? "min-w-0" : "measure shrink-0"}`}>{item.value}</dd>
        </div>
      ))}
    </dl>
  );
}
