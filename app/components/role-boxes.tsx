import { type Role, STAFF_ROLES } from "~/domain/orders";
import { FieldError, type FieldFacts } from "./field";

interface RoleBoxesProps {
  readonly legend: string;
  readonly legendShown?: boolean;
  /** Makes the boxes' ids, `<prefix>-operator` and so on. */
  readonly idPrefix: string;
  readonly chosen: readonly Role[];
  /** Its errors are shown under the boxes. */
  readonly field?: FieldFacts;
}

/** The roles of the shop, any of them together. Sent as `roles`. */
export function RoleBoxes({ legend, legendShown = false, idPrefix, chosen, field }: RoleBoxesProps) {
  return (
    <fieldset aria-describedby={field?.errors?.length ? field.errorId : undefined}>
      <legend className={legendShown ? "mb-1 text-small font-medium" : "sr-only"}>{legend}</legend>
      <div className="flex flex-wrap gap-x-4">
        {STAFF_ROLES.map((role) => (
          <label key={role} className="flex min-h-8 items-center gap-2 text-small pointer-coarse:min-h-11">
            <input
              id={`${idPrefix}-${role}`}
              type="checkbox"
              name="roles"
              value={role}
              defaultChecked={chosen.includes(role)}
              className="size-4 accent-blue"
            />
            {role}
          </label>
        ))}
      </div>
      {field && <FieldError field={field} />}
    </fieldset>
  );
}
