import type { StaffOrderView } from "~/routes/shop/order-view.server";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { plainField } from "../field";
import { RadioField } from "../radio-field";
import { RailSection } from "../rail";
import { SelectField } from "../select-field";
import { TextField } from "../text-field";
import { movedBy, ReasonedAct } from "./act-parts";
import { PAYERS } from "./order-acts";

/** What goes wrong, and what takes it back. */
export function ExceptionActs({ order }: { readonly order: StaffOrderView }) {
  const { acts } = order;
  const over = order.stage === "cancelled";
  if (over || order.stage === "draft") return null;
  return (
    <RailSection title="Exceptions">
      <div className="space-y-3">
        {acts.remake?.may && <MarkPiece key={order.version} order={order} />}
        <ReasonedAct
          order={order}
          intent="hold"
          state={order.stage === "on-hold" ? undefined : acts.hold}
          label="Hold"
          question="It stops where it stands until it is released. The builder is told why."
          ask="Why it is held"
          confirm="Hold it"
        />
        <ReasonedAct
          order={order}
          intent="undo"
          state={acts.undo}
          label="Undo the last step"
          question="Its pieces go back one step. Both steps stay in the history."
          ask="Why it is taken back"
          confirm="Take it back"
        />
        <ReasonedAct
          order={order}
          intent="cancel"
          state={acts.cancel}
          label="Cancel the order"
          question="Nothing more is made of it; its pieces leave their nests, its stock is free again. What was paid stays until the owner gives it back."
          ask="Why it is cancelled"
          confirm="Cancel it"
        />
      </div>
    </RailSection>
  );
}

function MarkPiece({ order }: { readonly order: StaffOrderView }) {
  const made = order.pieces.filter(({ stage, state }) => state === "good" && stage !== "received");
  if (made.length === 0) return null;
  return (
    <details>
      <summary className="inline-flex min-h-9 items-center rounded-sheet border border-line bg-sheet px-4 text-body font-medium hover:border-edge">
        A piece is spoiled or missing
      </summary>
      <ActForm intent="remake" fields={movedBy(order)} label="Mark a piece">
        {(pending) => (
          <div className="mt-3 space-y-3 border-l-4 border-amber bg-amber-wash px-4 py-3">
            <p>
              It leaves the count; another one is cut on the next nest. The others go on, shipping waits for
              it.
            </p>
            <SelectField
              field={plainField("pieceId", { id: "mark-piece", required: true })}
              label="Piece"
              placeholder="Choose the piece"
              choices={made.map(({ id, label, number, of, stage }) => ({
                value: id,
                label: `${label}, ${number} of ${of} (${stage})`,
              }))}
            />
            <RadioField
              field={plainField("state", { id: "mark-state", value: "spoiled", required: true })}
              label="What is wrong"
              choices={[
                { value: "spoiled", label: "Spoiled" },
                { value: "missing", label: "Missing" },
              ]}
            />
            <TextField
              field={plainField("reason", { id: "mark-reason", required: true })}
              label="Cause"
              minLength={3}
              maxLength={500}
            />
            <SelectField
              field={plainField("payer", { id: "mark-payer", value: "shop", required: true })}
              label="Who pays for the remake"
              choices={PAYERS.map((payer) => ({ value: payer, label: `the ${payer}` }))}
            />
            <Button variant="danger" pending={pending}>
              Mark it and make it again
            </Button>
          </div>
        )}
      </ActForm>
    </details>
  );
}
