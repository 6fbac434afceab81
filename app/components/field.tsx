import type { ReactNode } from "react";

/**
 * What a form control needs to know of its field. The field metadata of `@conform-to/react` has this shape;
 * `plainField` makes one for a form without a schema.
 */
export interface FieldFacts {
  readonly id: string;
  readonly errorId: string;
  readonly descriptionId: string;
  readonly name: string;
  readonly key?: string | undefined;
  readonly formId?: string | undefined;
  readonly errors?: readonly string[] | undefined;
  readonly initialValue?: unknown;
  readonly required?: boolean | undefined;
  readonly minLength?: number | undefined;
  readonly maxLength?: number | undefined;
  readonly min?: string | number | undefined;
  readonly max?: string | number | undefined;
  readonly step?: string | number | undefined;
  readonly pattern?: string | undefined;
  readonly multiple?: boolean | undefined;
}

interface PlainField {
  readonly id?: string;
  readonly value?: string;
  readonly errors?: readonly string[];
  readonly required?: boolean;
}

/** A field of a form that has no schema behind it: a search, a filter. */
export function plainField(
  name: string,
  { id = name, value, errors, required }: PlainField = {},
): FieldFacts {
  return {
    id,
    errorId: `${id}-error`,
    descriptionId: `${id}-hint`,
    name,
    initialValue: value,
    errors,
    required,
  };
}

export interface FieldWords {
  readonly label: ReactNode;
  /** One sentence under the label: the limit, the unit, what it is for. */
  readonly hint?: ReactNode;
  /** Keep the label for screen readers only: a search with its own button. */
  readonly labelHidden?: boolean;
}

/** Attributes every control takes from its field; the error is read before the hint. */
export function controlProps(field: FieldFacts, hint: ReactNode) {
  const described = [field.errors?.length ? field.errorId : null, hint ? field.descriptionId : null];
  return {
    id: field.id,
    name: field.name,
    form: field.formId,
    required: field.required,
    "aria-invalid": field.errors?.length ? true : undefined,
    "aria-describedby": described.filter((id) => id !== null).join(" ") || undefined,
  };
}

/** The first value of a field as text, or undefined. */
export function initialText(field: FieldFacts): string | undefined {
  return typeof field.initialValue === "string" ? field.initialValue : undefined;
}

/** The look of every text-like control. 16 px on a phone, so that the browser does not zoom into it. */
export const CONTROL_LOOK =
  "w-full min-w-0 rounded-sheet border border-edge bg-sheet px-3 text-[1rem] text-ink md:text-body aria-invalid:border-amber aria-invalid:border-2 disabled:opacity-55";

interface FieldFrameProps extends FieldWords {
  readonly field: FieldFacts;
  readonly children: ReactNode;
}

/** Label above, hint under it, control, and the error beside the field on a desk or under it on a phone. */
export function FieldFrame({ field, label, hint, labelHidden = false, children }: FieldFrameProps) {
  return (
    <div className="min-w-0">
      <label htmlFor={field.id} className={labelHidden ? "sr-only" : "mb-1 block text-small font-medium"}>
        {label}
      </label>
      {hint && (
        <p id={field.descriptionId} className="mb-1 text-caption text-soft">
          {hint}
        </p>
      )}
      {children}
      <FieldError field={field} />
    </div>
  );
}

/** A field's errors, tied to its control by id. */
export function FieldError({ field }: { readonly field: FieldFacts }) {
  if (!field.errors?.length) return null;
  return (
    <p id={field.errorId} className="mt-1 text-small text-amber">
      {field.errors.join(" ")}
    </p>
  );
}
