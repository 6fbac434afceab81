import type { ReactNode } from "react";
import { FieldError, type FieldFacts, type FieldWords } from "./field";

export interface RadioChoice {
  readonly value: string;
  readonly label: ReactNode;
  readonly hint?: ReactNode;
  /** A price or a measure at the right, in mono. */
  readonly note?: ReactNode;
  readonly disabled?: boolean;
}

interface RadioFieldProps extends FieldWords {
  readonly field: FieldFacts;
  readonly choices: readonly RadioChoice[];
  /** Controlled value; without it the field's own first value is chosen. */
  readonly value?: string;
  readonly onChange?: (value: string) => void;
}

/** One of a few, each with its own words. */
export function RadioField({
  field,
  label,
  hint,
  labelHidden = false,
  choices,
  value,
  onChange,
}: RadioFieldProps) {
  const described = [field.errors?.length ? field.errorId : null, hint ? field.descriptionId : null];
  return (
    <fieldset
      key={field.key}
      aria-describedby={described.filter((id) => id !== null).join(" ") || undefined}
      className="min-w-0"
    >
      <legend className={labelHidden ? "sr-only" : "mb-1 text-small font-medium"}>{label}</legend>
      {hint && (
        <p id={field.descriptionId} className="mb-1 text-caption text-soft">
          {hint}
        </p>
      )}
      <div className="divide-y divide-line rounded-sheet border border-edge bg-sheet">
        {choices.map((choice, index) => (
          <label
            key={choice.value}
            className="flex items-start gap-3 px-3 py-2 has-checked:bg-blue-wash has-disabled:opacity-55 pointer-coarse:min-h-11 pointer-coarse:py-2.5"
          >
            <input
              id={index === 0 ? field.id : undefined}
              type="radio"
              name={field.name}
              form={field.formId}
              value={choice.value}
              required={field.required}
              disabled={choice.disabled}
              aria-invalid={field.errors?.length ? true : undefined}
              {...(value === undefined
                ? { defaultChecked: field.initialValue === choice.value }
                : { checked: value === choice.value })}
              onChange={onChange ? () => onChange(choice.value) : undefined}
              readOnly={value !== undefined && !onChange}
              className="mt-[0.2em] size-4 shrink-0 accent-blue"
            />
            <span className="min-w-0 flex-1">
              {choice.label}
              {choice.hint && <span className="block text-caption text-soft">{choice.hint}</span>}
            </span>
            {choice.note && <span className="measure shrink-0 text-small">{choice.note}</span>}
          </label>
        ))}
      </div>
      <FieldError field={field} />
    </fieldset>
  );
}
