import type { ComponentProps } from "react";
import { CONTROL_LOOK, controlProps, type FieldFacts, FieldFrame, type FieldWords } from "./field";

type Native = Omit<
  ComponentProps<"input">,
  "className" | "style" | "id" | "name" | "form" | "type" | "value"
>;

interface FileFieldProps extends FieldWords, Native {
  readonly field: FieldFacts;
}

/** Files picked from the device. The place to drop drawings is a page's own; this is the plain control. */
export function FileField({ field, label, hint, labelHidden, ...native }: FileFieldProps) {
  return (
    <FieldFrame field={field} label={label} hint={hint} labelHidden={labelHidden}>
      <input
        key={field.key}
        {...controlProps(field, hint)}
        type="file"
        multiple={field.multiple}
        {...native}
        className={`${CONTROL_LOOK} py-2 file:mr-3 file:rounded-sheet file:border file:border-line file:bg-ground file:px-3 file:py-1 file:font-sans file:text-small file:font-medium file:text-ink`}
      />
    </FieldFrame>
  );
}
