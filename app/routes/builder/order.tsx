import { data, type ShouldRevalidateFunctionArgs } from "react-router";
import { requireOrder } from "~/auth/guards.server";
import { ErrorPanel } from "~/components/error-panel";
import { useLiveOrder } from "~/components/live";
import { DraftPage } from "~/components/order/draft-page";
import { FrozenPage } from "~/components/order/frozen-page";
import { RefusalNotice } from "~/components/order/refusal-notice";
import type { Route } from "./+types/order";
import { actOnOrder } from "./order-acts.server";
import { orderView } from "./order-view.server";

export async function loader(args: Route.LoaderArgs) {
  const { order, person } = await requireOrder(args, "order.edit", args.params.orderId);
  return data(await orderView(order, person), { headers: { "Cache-Control": "private, no-store" } });
}

export async function action(args: Route.ActionArgs) {
  const { order, person } = await requireOrder(args, "order.edit", args.params.orderId);
  return actOnOrder(await args.request.formData(), { order, person });
}

/** A chosen part in the address is no news of the order; an act that came too late is. */
export function shouldRevalidate(args: ShouldRevalidateFunctionArgs) {
  const { currentUrl, nextUrl, formMethod, actionStatus, defaultShouldRevalidate } = args;
  if (actionStatus === 409) return true;
  const same = currentUrl.pathname === nextUrl.pathname && currentUrl.search !== nextUrl.search;
  if (formMethod === undefined && same) return false;
  return defaultShouldRevalidate;
}

export default function Order({ loaderData, actionData }: Route.ComponentProps) {
  useLiveOrder({ orderId: loaderData.id, after: loaderData.eventId });
  const { content } = loaderData;
  return (
    <>
      {actionData && !actionData.ok && <RefusalNotice refusal={actionData.refusal} />}
      {content.kind === "draft" ? (
        <DraftPage order={loaderData} draft={content} />
      ) : (
        <FrozenPage order={loaderData} frozen={content} />
      )}
    </>
  );
}

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData ? `${loaderData.reference} ${loaderData.name} · Kerfpost` : "Order · Kerfpost" },
];

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
