import type { OrderView } from "~/routes/builder/order-view.server";
import { Button } from "../button";
import { plainField } from "../field";
import { TextAreaField } from "../text-area-field";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

/** Asks for a person in the shop to look before paying. */
export function AskReview({ order }: { readonly order: OrderView }) {
  const { Form, pending, refusal } = useAct("ask-review");
  return (
    <details className="text-small print:hidden">
      <summary className="inline-flex min-h-7 items-center text-blue hover:underline pointer-coarse:min-h-11">
        Have somebody in the shop look first
      </summary>
      <Form method="post" className="mt-2 space-y-3">
        <RefusalNotice refusal={refusal} />
        <input type="hidden" name="intent" value="ask-review" />
        <input type="hidden" name="version" value={order.version} />
        <input type="hidden" name="requestId" value={order.requestId} />
        <TextAreaField
          field={plainField("reason", { id: "review-reason" })}
          label="What should they look at?"
          rows={3}
          maxLength={500}
        />
        <Button size="small" pending={pending}>
          Ask for a look
        </Button>
      </Form>
    </details>
  );
}
