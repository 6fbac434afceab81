import { useState } from "react";
import { Button } from "../button";
import { plainField } from "../field";
import { SelectField } from "../select-field";
import { PAYERS } from "../shop/order-acts";
import { TextField } from "../text-field";

export interface LostWords {
  readonly state: "spoiled" | "missing";
  readonly cause: string;
  readonly payer: string;
}

interface LostPieceProps {
  readonly name: string;
  readonly onMark: (words: LostWords) => void;
  readonly onLeave: () => void;
}

/** What happened to a piece, and who pays for the one that is cut again. */
export function LostPiece({ name, onMark, onLeave }: LostPieceProps) {
  const [state, setState] = useState<LostWords["state"]>("spoiled");
  return (
    <form
      aria-label={`${name} is not good`}
      className="space-y-4 border-l-4 border-amber bg-amber-wash p-4"
      onSubmit={(event) => {
        event.preventDefault();
        const form = new FormData(event.currentTarget);
        onMark({ state, cause: String(form.get("cause")), payer: String(form.get("payer")) });
      }}
    >
      <p>Another one waits for the next nest at once; the builder is told.</p>
      <div className="grid grid-cols-2 gap-3">
        {(["spoiled", "missing"] as const).map((one) => (
          <Button
            key={one}
            type="button"
            size="floor"
            variant={one === state ? "chosen" : "plain"}
            aria-pressed={one === state}
            onClick={() => setState(one)}
          >
            {one}
          </Button>
        ))}
      </div>
      <TextField
        field={plainField("cause", { id: "lost-cause", required: true })}
        label="What happened"
        size="floor"
        minLength={3}
        maxLength={500}
        autoComplete="off"
      />
      <SelectField
        field={plainField("payer", { id: "lost-payer", value: "shop", required: true })}
        label="Who pays"
        choices={PAYERS.map((payer) => ({ value: payer, label: `the ${payer}` }))}
      />
      <div className="flex flex-wrap gap-3">
        <Button size="floor" variant="danger">
          Make it again
        </Button>
        <Button type="button" size="floor" onClick={onLeave}>
          Leave it
        </Button>
      </div>
    </form>
  );
}
