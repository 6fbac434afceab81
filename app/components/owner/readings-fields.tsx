import { useField } from "@conform-to/react";
import { READING_POINTS } from "~/domain/fit";
import { CONTROL_LOOK } from "../field";
import { MEASURED_SHEETS } from "./stock-forms";

const PLACES = ["first", "second", "third"] as const;

/** Boxes for the readings of up to three sheets of a stack. Inside conform's `FormProvider`. */
export function ReadingsFields() {
  return (
    <div className="space-y-4">
      <p className="max-w-prose text-small text-soft">
        Eight points, 50 mm in from the edges, once around the sheet (EN 324-1); or four points on each of
        several sheets: top, middle and bottom of the stack. To 0.01 mm. Leave the other boxes empty.
      </p>
      {Array.from({ length: MEASURED_SHEETS }, (_, row) => (
        <SheetReadings key={PLACES[row]} row={row} />
      ))}
    </div>
  );
}

function SheetReadings({ row }: { readonly row: number }) {
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-small font-medium">{`The ${PLACES[row]} sheet measured`}</legend>
      <div className="grid grid-cols-3 gap-2 sm:grid-cols-5 lg:grid-cols-9">
        <SmallNumber name={`sheets[${row}].sheet`} label="sheet no." />
        {READING_POINTS.map((point, at) => (
          <SmallNumber key={point} name={`sheets[${row}].points[${at}]`} label={point} />
        ))}
      </div>
    </fieldset>
  );
}

function SmallNumber({ name, label }: { readonly name: string; readonly label: string }) {
  const [field] = useField<number>(name);
  return (
    <div className="min-w-0">
      <label htmlFor={field.id} className="mb-0.5 block text-caption whitespace-nowrap text-soft">
        {label}
      </label>
      <input
        key={field.key}
        id={field.id}
        name={field.name}
        form={field.formId}
        type="number"
        step="any"
        inputMode="decimal"
        defaultValue={typeof field.initialValue === "string" ? field.initialValue : undefined}
        aria-invalid={field.errors ? true : undefined}
        aria-describedby={field.errors ? field.errorId : undefined}
        className={`${CONTROL_LOOK} measure min-h-10 pointer-coarse:min-h-11`}
      />
      {field.errors && (
        <p id={field.errorId} className="mt-1 text-caption text-amber">
          {field.errors.join(" ")}
        </p>
      )}
    </div>
  );
}
