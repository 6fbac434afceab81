import type { ReactNode } from "react";
import type { ActState, StaffOrderView } from "~/routes/shop/order-view.server";
import { ActForm } from "../act-form";
import { Button } from "../button";
import { ConfirmButton } from "../confirm-button";
import { plainField } from "../field";
import { TextField } from "../text-field";

interface ActProps {
  readonly order: StaffOrderView;
  readonly intent: string;
  readonly state: ActState | undefined;
  readonly label: string;
}

/** What every act of the page goes with. */
export const movedBy = ({ version, requestId }: StaffOrderView) => ({ version, requestId });

/** Why an act cannot be done now, under its name. */
function NotNow({ label, why }: { readonly label: string; readonly why: string | null }) {
  return (
    <div>
      <Button type="button" disabled>
        {label}
      </Button>
      <p className="mt-1 text-caption text-soft">{why}</p>
    </div>
  );
}

/** An act done by one press. Nothing where it is not this person's. */
export function MoveAct({
  order,
  intent,
  state,
  label,
  primary = true,
}: ActProps & { readonly primary?: boolean }) {
  if (!state) return null;
  if (!state.may) return <NotNow label={label} why={state.why} />;
  return (
    <ActForm intent={intent} fields={movedBy(order)}>
      {(pending) => (
        <Button variant={primary ? "primary" : "plain"} wide pending={pending}>
          {label}
        </Button>
      )}
    </ActForm>
  );
}

interface ReasonedActProps extends ActProps {
  readonly question: ReactNode;
  readonly confirm: string;
  /** Asked for what the reason is: "Why it is held". */
  readonly ask: string;
}

/** An act in two steps, with the reason it is recorded under. */
export function ReasonedAct({ order, intent, state, label, question, confirm, ask }: ReasonedActProps) {
  if (!state) return null;
  if (!state.may) return <NotNow label={label} why={state.why} />;
  return (
    <ActForm key={order.version} intent={intent} fields={movedBy(order)}>
      {(pending) => (
        <ConfirmButton label={label} question={question} confirm={confirm} variant="plain" pending={pending}>
          <TextField
            field={plainField("reason", { id: `${intent}-reason`, required: true })}
            label={ask}
            minLength={3}
            maxLength={500}
          />
        </ConfirmButton>
      )}
    </ActForm>
  );
}
