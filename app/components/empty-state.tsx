import type { ReactNode } from "react";

interface EmptyStateProps {
  /** One sentence: what will stand here, and what brings it. */
  readonly children: ReactNode;
  readonly title?: ReactNode;
  readonly action?: ReactNode;
  /** Set apart by a dashed line: a place where something can be put. */
  readonly place?: boolean;
}

/** Nothing here yet, said plainly, with the act that changes it. */
export function EmptyState({ children, title, action, place = false }: EmptyStateProps) {
  return (
    <div
      className={`flex flex-col items-center justify-center gap-3 px-6 py-14 text-center ${place ? "rounded-sheet border border-dashed border-edge bg-sheet" : ""}`}
    >
      {title && <h2 className="text-lead font-semibold">{title}</h2>}
      <p className="max-w-prose text-body text-soft">{children}</p>
      {action}
    </div>
  );
}
