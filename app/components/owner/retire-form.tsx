import { ActForm } from "../act-form";
import { Button } from "../button";
import { ConfirmButton } from "../confirm-button";

interface RetireFormProps {
  readonly thing: {
    readonly id: string;
    readonly version: number;
    readonly active: boolean;
    readonly name: string;
  };
  /** What becomes of it, in a sentence. */
  readonly question: string;
  readonly size?: "small" | "normal";
}

/** Out of use, or into use again. */
export function RetireForm({ thing, question, size = "normal" }: RetireFormProps) {
  const { id, version, active, name } = thing;
  return (
    <ActForm
      intent={active ? "retire" : "restore"}
      label={`${active ? "Retire" : "Put in use"} ${name}`}
      fields={{ key: id, id, version }}
    >
      {(pending) =>
        active ? (
          <ConfirmButton
            label="Retire"
            question={question}
            confirm={`Retire ${name}`}
            variant="quiet"
            size={size}
            pending={pending}
          />
        ) : (
          <Button size={size} pending={pending}>
            Put in use again<span className="sr-only">: {name}</span>
          </Button>
        )
      }
    </ActForm>
  );
}
