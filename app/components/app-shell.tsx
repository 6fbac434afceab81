import type { ReactNode } from "react";
import { Form, Link, NavLink, useLocation } from "react-router";
import { ThemeSwitch } from "./theme-switch";
import { Wordmark } from "./wordmark";

export interface NavItem {
  readonly to: string;
  readonly label: string;
  /** Active only on this very address, not below it. */
  readonly end?: boolean;
  /** How much waits there, in amber. */
  readonly waiting?: number;
}

export interface Person {
  readonly name: string;
  /** The hat worn in this area: "builder", "operator". */
  readonly role: string;
}

interface AppShellProps {
  readonly nav: readonly NavItem[];
  /** Null for a visitor, who is offered the way in instead. */
  readonly who: Person | null;
  readonly children: ReactNode;
  /** `read` keeps lines of prose and forms to a readable measure. */
  readonly width?: "full" | "read";
}

/** The frame of every page: name, areas, who is there, and the page itself. */
export function AppShell({ nav, who, children, width = "full" }: AppShellProps) {
  const { pathname } = useLocation();
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#page"
        className="sr-only z-10 rounded-sheet border border-blue bg-sheet px-4 py-2 text-blue focus:not-sr-only focus:absolute focus:top-2 focus:left-2"
      >
        To the page
      </a>
      <header className="gutter flex items-center justify-between gap-6 py-2 md:items-start md:py-3 print:hidden">
        <div className="flex min-w-0 items-center gap-7">
          <Link to="/" className="rounded-sheet py-1" aria-label="Kerfpost, first page">
            <Wordmark />
          </Link>
          {nav.length > 0 && (
            <nav aria-label="Areas" className="hidden md:block">
              <ul className="flex flex-wrap gap-x-5.5">
                {nav.map((item) => (
                  <li key={item.to}>
                    <AreaLink item={item} />
                  </li>
                ))}
              </ul>
            </nav>
          )}
        </div>
        <div className="hidden shrink-0 md:block md:pt-1.5">
          <WhoIsThere who={who} />
        </div>
        <PhoneMenu key={pathname} nav={nav} who={who} />
      </header>
      <main
        id="page"
        tabIndex={-1}
        className={`gutter w-full flex-1 space-y-5 pt-3 pb-12 outline-none ${width === "read" ? "mx-auto max-w-4xl" : ""}`}
      >
        {children}
      </main>
    </div>
  );
}

function AreaLink({ item }: { readonly item: NavItem }) {
  return (
    <NavLink
      to={item.to}
      end={item.end}
      className={({ isActive }) =>
        `inline-flex items-center gap-1.5 border-b-2 py-1 text-body pointer-coarse:min-h-11 ${isActive ? "border-blue font-semibold text-ink" : "border-transparent text-soft hover:text-ink"}`
      }
    >
      {item.label}
      {item.waiting ? (
        <span className="text-small font-semibold text-amber">
          {item.waiting}
          <span className="sr-only"> waiting</span>
        </span>
      ) : null}
    </NavLink>
  );
}

/** Name or role, the colours, and the way out; for a visitor the way in. */
function WhoIsThere({ who }: { readonly who: Person | null }) {
  return (
    <div className="flex flex-wrap items-center gap-x-2 text-small text-soft">
      {who ? (
        <>
          <span title={who.role}>{who.name}</span>
          <span aria-hidden="true">·</span>
          <span>{who.role}</span>
          <span aria-hidden="true">·</span>
          <ThemeSwitch />
          <span aria-hidden="true">·</span>
          <Form method="post" action="/sign-out">
            <button type="submit" className="text-soft hover:text-ink pointer-coarse:min-h-11">
              sign out
            </button>
          </Form>
        </>
      ) : (
        <>
          <ThemeSwitch />
          <span aria-hidden="true">·</span>
          <Link to="/sign-in" className="text-soft hover:text-ink">
            sign in
          </Link>
        </>
      )}
    </div>
  );
}

/** The same areas behind one word where they do not fit in a row. */
function PhoneMenu({ nav, who }: { readonly nav: readonly NavItem[]; readonly who: Person | null }) {
  return (
    <details className="group relative md:hidden">
      <summary className="flex min-h-11 min-w-11 items-center justify-end text-body font-medium text-ink">
        <span className="group-open:hidden">Menu</span>
        <span className="hidden group-open:inline">Close</span>
      </summary>
      <div className="absolute top-full right-0 z-10 w-64 rounded-sheet border border-edge bg-sheet px-4 py-2">
        {nav.length > 0 && (
          <nav aria-label="Areas">
            <ul>
              {nav.map((item) => (
                <li key={item.to} className="py-1">
                  <AreaLink item={item} />
                </li>
              ))}
            </ul>
          </nav>
        )}
        <div className="mt-2 border-t border-line py-2">
          <WhoIsThere who={who} />
        </div>
      </div>
    </details>
  );
}
