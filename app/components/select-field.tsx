import type { ComponentProps } from "react";
import {
  CONTROL_LOOK,
  controlProps,
  type FieldFacts,
  FieldFrame,
  type FieldWords,
  initialText,
} from "./field";

export interface Choice {
  readonly value: string;
  readonly label: string;
  readonly disabled?: boolean;
}

type Native = Omit<ComponentProps<"select">, "className" | "style" | "id" | "name" | "form" | "size">;

interface SelectFieldProps extends FieldWords, Native {
  readonly field: FieldFacts;
  readonly choices: readonly Choice[];
  /** A first line that chooses nothing: "Choose a sheet". */
  readonly placeholder?: string;
}

/** One of several, where there are too many for radio buttons. */
export function SelectField({
  field,
  label,
  hint,
  labelHidden,
  choices,
  placeholder,
  ...native
}: SelectFieldProps) {
  return (
    <FieldFrame field={field} label={label} hint={hint} labelHidden={labelHidden}>
      <select
        key={field.key}
        {...controlProps(field, hint)}
        defaultValue={native.value === undefined ? (initialText(field) ?? "") : undefined}
        {...native}
        className={`${CONTROL_LOOK} min-h-10 pointer-coarse:min-h-11`}
      >
        {placeholder !== undefined && <option value="">{placeholder}</option>}
        {choices.map((choice) => (
          <option key={choice.value} value={choice.value} disabled={choice.disabled}>
            {choice.label}
          </option>
        ))}
      </select>
    </FieldFrame>
  );
}
