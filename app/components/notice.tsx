import type { ReactNode } from "react";

interface NoticeProps {
  readonly children: ReactNode;
  readonly title?: ReactNode;
  readonly action?: ReactNode;
  /** `warn` is amber: something to settle. `note` is a plain hairline: a caution, a fact. */
  readonly tone?: "warn" | "note";
  /** Read out when it appears. */
  readonly live?: boolean;
}

/** A few words set apart from the page's own. */
export function Notice({ children, title, action, tone = "warn", live = false }: NoticeProps) {
  const look = tone === "warn" ? "border-amber bg-amber-wash" : "border-edge bg-sheet";
  return (
    <div
      role={live ? "status" : undefined}
      className={`flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-l-4 px-4 py-3 text-small ${look}`}
    >
      <div className="min-w-0 flex-1 basis-64">
        {title && <p className={`font-semibold ${tone === "warn" ? "text-amber" : ""}`}>{title}</p>}
        <div>{children}</div>
      </div>
      {action}
    </div>
  );
}
