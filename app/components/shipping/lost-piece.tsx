import { useState } from "react";
import { Button } from "../button";
import { plainField } from "../field";
import { PAYERS } from "../shop/order-acts";
import { TextField } from "../text-field";

export interface LostWords {
  readonly state: "spoiled" | "missing";
  readonly cause: string;
  readonly payer: (typeof PAYERS)[number];
}

interface LostPieceProps {
  readonly name: string;
  readonly onMark: (words: LostWords) => void;
  readonly onLeave: () => void;
}

/** What happened to a piece, and who pays for the one that is cut again. */
export function LostPiece({ name, onMark, onLeave }: LostPieceProps) {
  const [state, setState] = useState<LostWords["state"]>("spoiled");
  const [payer, setPayer] = useState<LostWords["payer"]>("shop");
  return (
    <form
      aria-label={`${name} is not good`}
      className="space-y-4 border-l-4 border-amber bg-amber-wash p-4"
      onSubmit={(event) => {
        event.preventDefault();
        const form = new FormData(event.currentTarget);
        onMark({ state, payer, cause: String(form.get("cause")) });
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
      <p aria-hidden="true" className="!mb-1">
        What happened
      </p>
      <TextField
        labelHidden
        field={plainField("cause", { id: "lost-cause", required: true })}
        label="What happened"
        size="floor"
        minLength={3}
        maxLength={500}
        autoComplete="off"
      />
      <fieldset>
        <legend className="mb-1">Who pays</legend>
        <div className="grid grid-cols-2 gap-3">
          {PAYERS.map((one) => (
            <Button
              key={one}
              type="button"
              size="floor"
              variant={one === payer ? "chosen" : "plain"}
              aria-pressed={one === payer}
              onClick={() => setPayer(one)}
            >
              {`the ${one}`}
            </Button>
          ))}
        </div>
      </fieldset>
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
