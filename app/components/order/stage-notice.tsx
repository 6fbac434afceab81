import type { ReactNode } from "react";
import type { OrderView } from "~/routes/builder/order-view.server";
import { Notice } from "../notice";

/** What holds an order or ended it, said at the top of its page. Nothing where it goes its way. */
export function StageNotice({ order }: { readonly order: OrderView }): ReactNode {
  const last = [...order.moves].reverse().find(({ to }) => to === order.stage);
  const { shop } = order;
  switch (order.stage) {
    case "needs-review":
      return (
        <Notice title={`Somebody at ${shop.name} looks at this first`}>
          {last?.reason ? `${last.reason} ` : ""}
          Nothing is to pay yet. You are told by e-mail when they have looked, usually within a working day;
          answers to open questions on this page go straight to them.
        </Notice>
      );
    case "on-hold":
      return (
        <Notice title="On hold">
          {order.holdReason ? `${order.holdReason} ` : ""}
          The shop goes on as soon as it is settled: {shop.email}, {shop.phone}.
        </Notice>
      );
    case "cancelled":
      return (
        <Notice tone="note" title="Cancelled">
          {last?.reason ?? "This order has ended."}
        </Notice>
      );
    default:
      return null;
  }
}
