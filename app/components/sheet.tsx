import type { ReactNode } from "react";

interface SheetProps {
  readonly children: ReactNode;
  /** Names the surface for a screen reader; give it where no heading does. */
  readonly label?: string;
  /** Without it the content touches the hairline: drawings, tables, rails. */
  readonly padded?: boolean;
}

/** A working surface: one hairline, three pixels of corner, nothing else. Sheets are never put in sheets. */
export function Sheet({ children, label, padded = false }: SheetProps) {
  return (
    <section
      aria-label={label}
      className={`min-w-0 rounded-sheet border border-line bg-sheet ${padded ? "p-4 sm:p-6" : ""}`}
    >
      {children}
    </section>
  );
}
