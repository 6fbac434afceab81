import type { ReactNode } from "react";
import { buttonLook } from "../button-look";

/** A way to something printed, beside the page. Printing moves nothing. */
export function PrintLink({ to, children }: { readonly to: string; readonly children: ReactNode }) {
  return (
    <a href={to} target="_blank" rel="noreferrer" className={buttonLook("plain", "normal")}>
      {children}
    </a>
  );
}
