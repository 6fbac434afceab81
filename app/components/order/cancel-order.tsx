import type { OrderView } from "~/routes/builder/order-view.server";
import { ConfirmButton } from "../confirm-button";
import { plainField } from "../field";
import { TextField } from "../text-field";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

interface CancelOrderProps {
  readonly order: Pick<OrderView, "version" | "requestId" | "reference">;
  readonly paid?: boolean;
}

/** Ends the order, in two steps and with a reason. */
export function CancelOrder({ order, paid = false }: CancelOrderProps) {
  const { Form, pending, refusal } = useAct("cancel");
  return (
    <Form method="post" className="print:hidden">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="cancel" />
      <input type="hidden" name="version" value={order.version} />
      <input type="hidden" name="requestId" value={order.requestId} />
      <ConfirmButton
        label="Cancel the order"
        variant="quiet"
        size="small"
        question={
          paid
            ? `${order.reference} ends here and nothing of it is cut. The shop gives back what you paid.`
            : `${order.reference} ends here. Its drawings are kept for a while, and nothing is owed.`
        }
        confirm="Cancel it"
        keep="Keep the order"
        pending={pending}
      >
        <TextField
          field={plainField("reason", { id: "cancel-reason", required: true })}
          label="Why, in a few words"
          maxLength={500}
        />
      </ConfirmButton>
    </Form>
  );
}
