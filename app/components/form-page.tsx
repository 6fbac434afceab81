import type { ReactNode } from "react";
import { PageHeader } from "./page-header";
import { Sheet } from "./sheet";

interface FormPageProps {
  readonly title: string;
  readonly lead?: ReactNode;
  readonly children: ReactNode;
  /** Where else to go, under the sheet. */
  readonly beside?: ReactNode;
}

/** A page with one short form: sign in, a new password. */
export function FormPage({ title, lead, children, beside }: FormPageProps) {
  return (
    <div className="mx-auto w-full max-w-md space-y-5 pt-6">
      <PageHeader title={title} lead={lead} />
      <Sheet padded>{children}</Sheet>
      {beside && <div className="space-y-1 text-small text-soft">{beside}</div>}
    </div>
  );
}
