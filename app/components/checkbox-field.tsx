import type { ComponentProps } from "react";
import { controlProps, FieldError, type FieldFacts, type FieldWords } from "./field";

type Native = Omit<ComponentProps<"input">, "className" | "style" | "id" | "name" | "form" | "type" | "size">;

interface CheckboxFieldProps extends Omit<FieldWords, "labelHidden">, Native {
  readonly field: FieldFacts;
  /** Submitted when ticked. */
  readonly value?: string;
  readonly size?: "normal" | "floor";
}

/** One yes or no, its words beside it. */
export function CheckboxField({
  field,
  label,
  hint,
  value = "on",
  size = "normal",
  ...native
}: CheckboxFieldProps) {
  const floor = size === "floor";
  return (
    <div className="min-w-0">
      <label
        className={`flex items-start gap-3 ${floor ? "min-h-14 py-3 text-floor" : "py-1 pointer-coarse:min-h-11 pointer-coarse:py-2.5"}`}
      >
        <input
          key={field.key}
          {...controlProps(field, hint)}
          type="checkbox"
          value={value}
          defaultChecked={native.checked === undefined ? field.initialValue === value : undefined}
          {...native}
          className={`shrink-0 accent-blue ${floor ? "mt-0.5 size-7" : "mt-[0.2em] size-4"}`}
        />
        <span>
          {label}
          {hint && (
            <span id={field.descriptionId} className="block text-caption text-soft">
              {hint}
            </span>
          )}
        </span>
      </label>
      <FieldError field={field} />
    </div>
  );
}
