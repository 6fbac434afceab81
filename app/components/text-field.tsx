import type { ComponentProps, ReactNode } from "react";
import {
  CONTROL_LOOK,
  controlProps,
  type FieldFacts,
  FieldFrame,
  type FieldWords,
  initialText,
} from "./field";

type Native = Omit<ComponentProps<"input">, "className" | "style" | "id" | "name" | "form" | "size">;

interface TextFieldProps extends FieldWords, Native {
  readonly field: FieldFacts;
  readonly type?:
    | "text"
    | "email"
    | "password"
    | "number"
    | "search"
    | "tel"
    | "url"
    | "date"
    | "time"
    | "datetime-local";
  /** Set in mono: a measure, a count, a code. */
  readonly measured?: boolean;
  /** A unit after the control: "mm", "$". */
  readonly unit?: ReactNode;
  readonly size?: "normal" | "floor";
}

/** One line of text. */
export function TextField({
  field,
  label,
  hint,
  labelHidden,
  type = "text",
  measured = false,
  unit,
  size = "normal",
  ...native
}: TextFieldProps) {
  const height = size === "floor" ? "min-h-14 text-floor md:text-floor" : "min-h-10 pointer-coarse:min-h-11";
  return (
    <FieldFrame field={field} label={label} hint={hint} labelHidden={labelHidden}>
      <div className="flex items-center gap-2">
        <input
          key={field.key}
          {...controlProps(field, hint)}
          type={type}
          defaultValue={native.value === undefined ? initialText(field) : undefined}
          minLength={field.minLength}
          maxLength={field.maxLength}
          min={field.min}
          max={field.max}
          step={field.step}
          pattern={field.pattern}
          {...native}
          className={`${CONTROL_LOOK} ${height} ${measured ? "measure" : ""}`}
        />
        {unit && <span className="measure shrink-0 text-small text-soft">{unit}</span>}
      </div>
    </FieldFrame>
  );
}
