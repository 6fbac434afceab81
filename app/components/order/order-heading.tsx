import { useState } from "react";
import { MAIN_LINE } from "~/domain/orders";
import type { OrderView } from "~/routes/builder/order-view.server";
import { Button } from "../button";
import { CheckboxField } from "../checkbox-field";
import { dateWords } from "../date-words";
import { plainField } from "../field";
import { HeaderFact, PageHeader } from "../page-header";
import { useShopZone } from "../shop-zone";
import { SteelRule } from "../steel-rule";
import { TextField } from "../text-field";
import { isLate, ruleOf } from "./order-rule";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

interface OrderHeadingProps {
  readonly order: OrderView;
  /** What the price of a draft promises, as an ISO instant. */
  readonly promised: string | null;
}

/** Number, revision and drawings, the order's name, its date, and the rule of its stages. */
export function OrderHeading({ order, promised }: OrderHeadingProps) {
  const zone = useShopZone();
  const { rule, content } = order;
  const date = rule.shippedAt ?? rule.promisedFor ?? promised;
  const drawings = content.kind === "draft" ? content.files.length : content.drawings.length;
  const revision = content.kind === "frozen" ? content.revision : order.nextRevision;
  const { stages, at, late } = ruleOf({ ...rule, promisedFor: rule.promisedFor ?? promised }, zone);
  return (
    <>
      <PageHeader
        eyebrow={`${order.reference} · rev ${revision} · ${drawings} ${drawings === 1 ? "drawing" : "drawings"}${order.trial ? " · trial" : ""}`}
        title={<Name order={order} />}
        right={
          date && order.stage !== "cancelled" ? (
            <HeaderFact
              label={rule.shippedAt ? "shipped" : order.delivery === "pick-up" ? "ready" : "ships"}
              late={isLate(rule)}
            >
              {dateWords(new Date(date), zone)}
            </HeaderFact>
          ) : undefined
        }
      />
      {order.stage !== "cancelled" && (
        <SteelRule stages={stages} at={Math.min(at, MAIN_LINE.length - 1)} late={late} />
      )}
    </>
  );
}

/** The order's name; in a draft it can be changed where it stands. */
function Name({ order }: { readonly order: OrderView }) {
  const { Form, pending, refusal } = useAct("rename");
  const [editing, setEditing] = useState<number | null>(null);
  if (order.stage !== "draft") return order.name;
  if (editing !== order.version)
    return (
      <span className="inline-flex flex-wrap items-baseline gap-x-3">
        {order.name}
        <button
          type="button"
          onClick={() => setEditing(order.version)}
          className="text-small font-normal tracking-normal text-blue hover:underline pointer-coarse:min-h-11 print:hidden"
        >
          Rename
        </button>
      </span>
    );
  return (
    <Form method="post" className="flex flex-wrap items-end gap-3 text-body font-normal tracking-normal">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="rename" />
      <input type="hidden" name="version" value={order.version} />
      <TextField
        field={plainField("name", { id: "order-name", value: order.name, required: true })}
        label="Name of the order"
        maxLength={80}
        autoFocus
        onKeyDown={(event) => event.key === "Escape" && setEditing(null)}
      />
      <CheckboxField
        field={plainField("trial", { id: "order-trial", value: order.trial ? "on" : "" })}
        label="A trial in cheap stock"
      />
      <Button size="normal" pending={pending}>
        Keep
      </Button>
      <Button type="button" variant="quiet" onClick={() => setEditing(null)}>
        Leave it
      </Button>
    </Form>
  );
}
