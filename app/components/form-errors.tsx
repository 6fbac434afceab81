import { useEffect, useRef } from "react";

export interface ErrorField {
  readonly id: string;
  readonly label: string;
  readonly errors?: readonly string[] | undefined;
}

interface FormErrorsProps {
  /** What is wrong with the form as a whole. */
  readonly errors?: readonly string[] | undefined;
  /** The form's fields in the order they stand; those without errors are passed over. */
  readonly fields?: readonly ErrorField[];
}

/**
 * The summary above a form that came back: what to mend, each line leading to its field. When new errors arrive
 * the first field at fault takes the focus, or the summary itself where no field is.
 */
export function FormErrors({ errors = [], fields = [] }: FormErrorsProps) {
  const summary = useRef<HTMLDivElement>(null);
  const faulty = fields.filter((field) => field.errors?.length);
  const first = faulty[0]?.id;
  const signature = [...errors, ...faulty.map((field) => `${field.id} ${field.errors?.join(" ")}`)].join(
    "\n",
  );
  useEffect(() => {
    if (signature === "") return;
    const target = first ? document.getElementById(first) : summary.current;
    target?.focus();
  }, [signature, first]);
  if (signature === "") return null;
  return (
    <div
      ref={summary}
      tabIndex={-1}
      role="alert"
      className="border-l-4 border-amber bg-amber-wash px-4 py-3 text-small"
    >
      {errors.map((error) => (
        <p key={error}>{error}</p>
      ))}
      {faulty.length > 0 && (
        <ul className={errors.length > 0 ? "mt-1" : ""}>
          {faulty.map((field) => (
            <li key={field.id}>
              <a href={`#${field.id}`} className="underline underline-offset-2">
                {field.label}
              </a>
              : {field.errors?.join(" ")}
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
