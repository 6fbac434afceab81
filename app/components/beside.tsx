import type { ReactNode } from "react";

interface BesideProps {
  /** The large sheet: the drawing, the nest, the table. */
  readonly main: ReactNode;
  readonly rail: ReactNode;
}

/** The page's two columns: one large sheet with a rail beside it, below it on a phone. */
export function Beside({ main, rail }: BesideProps) {
  return (
    <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_minmax(20rem,25rem)] print:block">
      <div className="min-w-0">{main}</div>
      <div className="min-w-0 space-y-5">{rail}</div>
    </div>
  );
}
