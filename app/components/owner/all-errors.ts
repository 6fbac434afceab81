import type { FormMetadata } from "@conform-to/react";
import type { ErrorField } from "../form-errors";

/** Every error of a form whose fields are many, for the summary above it; labels are looked up by name. */
export function allErrors<Schema extends Record<string, unknown>>(
  form: FormMetadata<Schema, string[]>,
  labelOf: (name: string) => string,
): ErrorField[] {
  return Object.entries(form.allErrors)
    .filter(([name]) => name !== "")
    .map(([name, errors]) => ({ id: `${form.id}-${name}`, label: labelOf(name), errors: errors ?? [] }));
}
