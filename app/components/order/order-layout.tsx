import type { ReactNode } from "react";

interface OrderLayoutProps {
  readonly drawing: ReactNode;
  /** What is decided: beside the drawing, on a phone right below it. */
  readonly rail: ReactNode;
  /** What can be looked up and changed: below the drawing, on a phone below the rail. */
  readonly below: ReactNode;
}

/** The large sheet, the rail beside it as tall as it likes, and the rest under the sheet. */
export function OrderLayout({ drawing, rail, below }: OrderLayoutProps) {
  return (
    <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_minmax(20rem,25rem)] lg:grid-rows-[auto_1fr] print:block print:space-y-5">
      <div className="min-w-0">{drawing}</div>
      <div className="min-w-0 space-y-5 lg:col-start-2 lg:row-span-2 lg:row-start-1">{rail}</div>
      <div className="min-w-0 space-y-5 lg:col-start-1 lg:row-start-2">{below}</div>
    </div>
  );
}
