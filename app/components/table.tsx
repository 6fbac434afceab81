import type { MouseEvent, ReactNode } from "react";

interface TableProps {
  /** Says what the table holds; always there for a screen reader. */
  readonly caption: string;
  readonly captionShown?: boolean;
  readonly children: ReactNode;
}

/** Rows of facts. Wider than its place it scrolls by itself, and takes the keyboard for that. */
export function Table({ caption, captionShown = false, children }: TableProps) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
    <section aria-label={caption} tabIndex={0} className="min-w-0 overflow-x-auto">
      <table className="w-full border-collapse text-small">
        <caption className={captionShown ? "pb-2 text-left text-small font-semibold" : "sr-only"}>
          {caption}
        </caption>
        {children}
      </table>
    </section>
  );
}

export function TableHead({ children }: { readonly children: ReactNode }) {
  return (
    <thead>
      <tr>{children}</tr>
    </thead>
  );
}

interface CellProps {
  readonly children?: ReactNode;
  /** A measure, a count or money: mono and to the right. */
  readonly numeric?: boolean;
  /** Never broken over lines. */
  readonly whole?: boolean;
  readonly span?: number;
}

export function HeadCell({ children, numeric = false }: Omit<CellProps, "span" | "whole">) {
  return (
    <th
      scope="col"
      className={`px-1.5 py-1 text-caption font-normal whitespace-nowrap text-soft first:pl-0 last:pr-0 ${numeric ? "text-right" : "text-left"}`}
    >
      {children}
    </th>
  );
}

export function Cell({ children, numeric = false, whole = false, span }: CellProps) {
  return (
    <td
      colSpan={span}
      className={`px-1.5 py-1.5 align-baseline ${numeric ? "measure text-right whitespace-nowrap" : "text-left"} ${whole ? "whitespace-nowrap" : ""}`}
    >
      {children}
    </td>
  );
}

interface RowHeadProps extends CellProps {
  /** In mono: a part's letter and name, an order's number. */
  readonly measured?: boolean;
}

/** The cell that names its row. */
export function RowHead({ children, measured = false }: RowHeadProps) {
  return (
    <th
      scope="row"
      className={`px-1.5 py-1.5 text-left align-baseline font-normal ${measured ? "measure" : ""}`}
    >
      {children}
    </th>
  );
}

interface TableRowProps {
  readonly children: ReactNode;
  readonly selected?: boolean;
  /** Lit because the same thing is pointed at elsewhere, on the drawing for one. */
  readonly lit?: boolean;
  readonly onHover?: (over: boolean) => void;
  /** A press anywhere in the row; give the row a `RowButton` too, so that the keyboard can do the same. */
  readonly onSelect?: (event: MouseEvent) => void;
}

export function TableRow({ children, selected = false, lit = false, onHover, onSelect }: TableRowProps) {
  const ground = selected ? "bg-blue-wash" : lit ? "bg-grain" : "";
  return (
    <tr
      onClick={onSelect}
      onPointerEnter={onHover ? () => onHover(true) : undefined}
      onPointerLeave={onHover ? () => onHover(false) : undefined}
      aria-current={selected ? "true" : undefined}
      className={`border-t border-line first:border-t-0 ${ground} ${onSelect ? "cursor-pointer hover:bg-grain" : ""} ${selected ? "hover:bg-blue-wash" : ""}`}
    >
      {children}
    </tr>
  );
}

interface RowButtonProps {
  readonly children: ReactNode;
  readonly pressed: boolean;
  readonly onPress: () => void;
  readonly onFocusChange?: (focused: boolean) => void;
}

/** The button inside a row's first cell that selects the row by keyboard. */
export function RowButton({ children, pressed, onPress, onFocusChange }: RowButtonProps) {
  return (
    <button
      type="button"
      aria-pressed={pressed}
      onClick={(event) => {
        event.stopPropagation();
        onPress();
      }}
      onFocus={onFocusChange ? () => onFocusChange(true) : undefined}
      onBlur={onFocusChange ? () => onFocusChange(false) : undefined}
      className={`text-left ${pressed ? "text-blue" : "text-ink"}`}
    >
      {children}
    </button>
  );
}
