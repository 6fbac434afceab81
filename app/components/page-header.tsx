import type { ReactNode } from "react";

interface PageHeaderProps {
  /** One line of facts in mono above the title: number, revision, lot. */
  readonly eyebrow?: ReactNode;
  readonly title: ReactNode;
  /** A sentence under the title. */
  readonly lead?: ReactNode;
  /** What stands at the right: a date, a price, two or three buttons. */
  readonly right?: ReactNode;
}

export function PageHeader({ eyebrow, title, lead, right }: PageHeaderProps) {
  return (
    <header className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
      <div className="min-w-0">
        {eyebrow && <p className="measure text-small text-soft">{eyebrow}</p>}
        <h1 className="text-title font-semibold tracking-[-0.01em] break-words">{title}</h1>
        {lead && <p className="mt-1 max-w-prose text-body text-soft">{lead}</p>}
      </div>
      {right && <div className="flex flex-wrap items-center gap-2">{right}</div>}
    </header>
  );
}

interface HeaderFactProps {
  readonly label: string;
  readonly children: ReactNode;
  readonly late?: boolean;
}

/** The one fact at the right of a page header: a caption over a mono value. */
export function HeaderFact({ label, children, late = false }: HeaderFactProps) {
  return (
    <div className="sm:text-right">
      <p className="text-small text-soft">{label}</p>
      <p className={`measure text-lead font-semibold ${late ? "text-amber" : "text-ink"}`}>{children}</p>
    </div>
  );
}
