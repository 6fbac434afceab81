import { Link } from "react-router";
import { buttonLook } from "./button-look";

interface PaginationProps {
  /** From 1. */
  readonly page: number;
  readonly pages: number;
  /** The address of a page, search parameters kept. */
  readonly hrefOf: (page: number) => string;
}

/** Earlier and later pages of a list; nothing when there is one page. */
export function Pagination({ page, pages, hrefOf }: PaginationProps) {
  if (pages <= 1) return null;
  return (
    <nav aria-label="Pages" className="flex items-center justify-between gap-4">
      {page > 1 ? (
        <Link to={hrefOf(page - 1)} rel="prev" className={buttonLook("plain", "small")}>
          Earlier
        </Link>
      ) : (
        <span />
      )}
      <p className="measure text-small text-soft">
        page {page} of {pages}
      </p>
      {page < pages ? (
        <Link to={hrefOf(page + 1)} rel="next" className={buttonLook("plain", "small")}>
          Later
        </Link>
      ) : (
        <span />
      )}
    </nav>
  );
}
