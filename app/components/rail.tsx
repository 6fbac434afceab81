import type { ReactNode } from "react";

/** The narrow sheet beside the drawing: sections one under another, parted by hairlines. */
export function Rail({ children, label }: { readonly children: ReactNode; readonly label?: string }) {
  return (
    <aside
      aria-label={label}
      className="min-w-0 divide-y divide-line rounded-sheet border border-line bg-sheet text-small"
    >
      {children}
    </aside>
  );
}

interface RailSectionProps {
  readonly title: ReactNode;
  /** A fact at the right of the title, in soft ink. */
  readonly note?: ReactNode;
  /** Set the note in mono: a lot, a measure, a number. */
  readonly measured?: boolean;
  readonly children?: ReactNode;
}

export function RailSection({ title, note, measured = false, children }: RailSectionProps) {
  return (
    <section className="px-4 py-4">
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <h2 className="text-small font-semibold">{title}</h2>
        {note && <p className={`text-small text-soft ${measured ? "measure" : ""}`}>{note}</p>}
      </div>
      {children}
    </section>
  );
}
