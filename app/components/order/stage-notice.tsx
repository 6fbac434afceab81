import type { ReactNode } from "react";
import type { OrderView } from "~/routes/builder/order-view.server";
import { Notice } from "../notice";

/** What holds an order or ended it, said at the top of its page. Nothing where it goes its way. */
export function StageNotice({ order }: { readonly order: OrderView }): ReactNode {
  const last = [...order.moves].reverse().find(({ to }) => to === order.stage);
  const { shop } = order;
  switch (order.stage) {
    case "needs-review":
      return <ReviewNotice order={order} reason={last?.reason ?? null} />;
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

/** Who has to say something before the order can be paid: the builder, the shop, or both. */
function ReviewNotice({ order, reason }: { readonly order: OrderView; readonly reason: string | null }) {
  const { content, shop } = order;
  const asks = content.kind === "frozen" ? content.unanswered : 0;
  const shopLooks = content.kind !== "frozen" || content.reviewOpen;
  const told = "You are told by e-mail when they have looked, usually within a working day.";
  if (asks > 0)
    return (
      <Notice title={`${asks === 1 ? "One question waits" : `${asks} questions wait`} for your answer`}>
        Answer {asks === 1 ? "it" : "them"} in the fit report beside the drawing;{" "}
        {shopLooks ? `${shop.name} looks at the order too. ${told}` : "then you can pay."}
      </Notice>
    );
  return (
    <Notice title={`Somebody at ${shop.name} looks at this first`}>
      {reason ? `${reason} ` : ""}
      Nothing is to pay yet. {told}
    </Notice>
  );
}
