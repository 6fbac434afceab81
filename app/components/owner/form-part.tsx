import type { ReactNode } from "react";

interface FormPartProps {
  readonly title: string;
  readonly note?: string;
  readonly children: ReactNode;
}

/** One part of a long form, named. */
export function FormPart({ title, note, children }: FormPartProps) {
  return (
    <fieldset className="min-w-0 border-t border-line py-5 first-of-type:border-t-0 first-of-type:pt-0">
      <legend className="float-left mb-3 w-full text-small font-semibold">
        {title}
        {note && <span className="block text-caption font-normal text-soft">{note}</span>}
      </legend>
      <div className="clear-both space-y-4">{children}</div>
    </fieldset>
  );
}
