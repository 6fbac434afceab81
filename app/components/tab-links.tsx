import { Link } from "react-router";

export interface TabLink {
  readonly to: string;
  readonly label: string;
  readonly count?: number;
  readonly active?: boolean;
  /** Its count is in amber: somebody waits. */
  readonly warn?: boolean;
  /** Stands at the far end of the row. */
  readonly apart?: boolean;
}

interface TabLinksProps {
  /** What the tabs part: "Stages". */
  readonly label: string;
  readonly tabs: readonly TabLink[];
}

/** Views of one list, each with its count; the open one is underlined in blue. */
export function TabLinks({ label, tabs }: TabLinksProps) {
  return (
    <nav aria-label={label}>
      <ul className="flex flex-wrap items-end gap-x-6 gap-y-1">
        {tabs.map((tab) => (
          <li key={tab.to} className={tab.apart ? "sm:ml-auto" : ""}>
            <Link
              to={tab.to}
              aria-current={tab.active ? "page" : undefined}
              className={`inline-flex items-baseline gap-2 border-b-2 py-1.5 text-body pointer-coarse:min-h-11 ${tab.active ? "border-blue text-blue" : "border-transparent text-soft hover:text-ink"}`}
            >
              {tab.label}
              {tab.count !== undefined && (
                <span
                  className={`font-semibold tabular-nums ${tab.warn && tab.count > 0 ? "text-amber" : tab.active ? "text-blue" : "text-ink"}`}
                >
                  {tab.count}
                </span>
              )}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
