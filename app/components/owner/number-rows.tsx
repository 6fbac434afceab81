import { useField } from "@conform-to/react";
import { TextField } from "../text-field";

export interface NumberRow {
  /** The value's dotted name in the form. */
  readonly path: string;
  readonly label: string;
  readonly unit?: string | undefined;
  readonly hint?: string;
}

/** Numbers of a form, in as many columns as there is room for. Inside conform's `FormProvider`. */
export function NumberRows({ rows }: { readonly rows: readonly NumberRow[] }) {
  return (
    <div className="grid items-end gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-3 xl:grid-cols-4">
      {rows.map((row) => (
        <NumberField key={row.path} row={row} />
      ))}
    </div>
  );
}

function NumberField({ row }: { readonly row: NumberRow }) {
  const [field] = useField<number>(row.path);
  return (
    <TextField
      field={field}
      label={row.label}
      hint={row.hint}
      type="number"
      step="any"
      inputMode="decimal"
      measured
      unit={row.unit}
    />
  );
}
