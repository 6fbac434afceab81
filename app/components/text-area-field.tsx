import type { ComponentProps } from "react";
import {
  CONTROL_LOOK,
  controlProps,
  type FieldFacts,
  FieldFrame,
  type FieldWords,
  initialText,
} from "./field";

type Native = Omit<ComponentProps<"textarea">, "className" | "style" | "id" | "name" | "form">;

interface TextAreaFieldProps extends FieldWords, Native {
  readonly field: FieldFacts;
}

/** Several lines of text; grows with what is written where the browser can. */
export function TextAreaField({ field, label, hint, labelHidden, rows = 4, ...native }: TextAreaFieldProps) {
  return (
    <FieldFrame field={field} label={label} hint={hint} labelHidden={labelHidden}>
      <textarea
        key={field.key}
        {...controlProps(field, hint)}
        rows={rows}
        defaultValue={native.value === undefined ? initialText(field) : undefined}
        minLength={field.minLength}
        maxLength={field.maxLength}
        {...native}
        className={`${CONTROL_LOOK} field-sizing-content min-h-24 resize-y py-2`}
      />
    </FieldFrame>
  );
}
