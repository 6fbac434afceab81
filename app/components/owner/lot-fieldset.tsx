import type { FieldFacts } from "../field";
import { TextField } from "../text-field";

interface LotFieldsetProps {
  readonly fields: {
    readonly code: FieldFacts;
    readonly supplierLot: FieldFacts;
    readonly supplierDocument: FieldFacts;
    readonly sheetsOnHand: FieldFacts;
  };
}

/** What is written down of a lot beside its thickness. */
export function LotFieldset({ fields }: LotFieldsetProps) {
  return (
    <div className="grid items-end gap-4 sm:grid-cols-2 lg:grid-cols-4">
      <TextField field={fields.code} label="Code of the lot" measured />
      <TextField field={fields.supplierLot} label="Supplier's lot" measured />
      <TextField
        field={fields.supplierDocument}
        label="Supplier's document"
        hint="Where the formaldehyde paper is kept."
      />
      <TextField field={fields.sheetsOnHand} label="Sheets on hand" type="number" measured />
    </div>
  );
}
