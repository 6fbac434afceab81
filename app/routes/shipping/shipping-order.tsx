import { requireOrder } from "~/auth/guards.server";
import { ActNotice } from "~/components/act-form";
import { DateTime } from "~/components/date-time";
import { ErrorPanel } from "~/components/error-panel";
import { Money } from "~/components/money";
import { Notice } from "~/components/notice";
import { HeaderFact, PageHeader } from "~/components/page-header";
import { BundlesStep } from "~/components/shipping/bundles-step";
import { CountStep } from "~/components/shipping/count-step";
import { LabelStep } from "~/components/shipping/label-step";
import { LeaveStep } from "~/components/shipping/leave-step";
import { TabLinks } from "~/components/tab-links";
import { TextLink } from "~/components/text-link";
import type { Route } from "./+types/shipping-order";
import { type PackView, packView, STEPS, type Step } from "./pack-view.server";
import { actOnPacking } from "./ship-acts.server";

const readStep = (asked: string | null): Step | null => STEPS.find((step) => step === asked) ?? null;

export async function loader(args: Route.LoaderArgs) {
  const { person, order } = await requireOrder(args, "shipping.read", args.params.orderId);
  return packView(order, person, readStep(args.url.searchParams.get("step")));
}

export async function action(args: Route.ActionArgs) {
  const { person, order } = await requireOrder(args, "shipping.edit", args.params.orderId);
  return actOnPacking(await args.request.formData(), { person, orderId: order.id });
}

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Ship ${loaderData?.reference ?? "an order"} · Kerfpost` },
];

export default function ShippingOrder({ loaderData: order, actionData }: Route.ComponentProps) {
  return (
    <>
      <PageHeader
        eyebrow={
          <>
            <TextLink to="/shipping">Shipping</TextLink> ·{" "}
            <TextLink to={`/shop/orders/${order.id}`}>{order.reference}</TextLink> · {order.builder}
          </>
        }
        title={order.name}
        right={
          <HeaderFact label={order.shippedAt ? "handed over" : order.isPickUp ? "ready by" : "ships by"}>
            {order.shippedAt ? (
              <DateTime at={order.shippedAt} show="day-time" />
            ) : (
              order.promisedFor && <DateTime at={order.promisedFor} />
            )}
          </HeaderFact>
        }
      />
      <ActNotice reply={actionData} />
      {order.stage !== "shipped" && !order.ready.may && (
        <Notice title="It cannot leave yet">
          {order.ready.why}
          {order.owed > 0 && (
            <>
              {" "}
              <Money cents={order.owed} /> is still owed.
            </>
          )}
        </Notice>
      )}
      <TabLinks label="Steps" tabs={tabsOf(order)} />
      <StepOf order={order} />
    </>
  );
}

function tabsOf(order: PackView) {
  const good = order.pieces.filter(({ state }) => state === "good");
  const to = (step: Step) => `/shipping/${order.id}?step=${step}`;
  const tab = (step: Step, label: string, count?: number) => ({
    to: to(step),
    label,
    active: order.step === step,
    ...(count === undefined ? {} : { count }),
  });
  return [
    tab("count", "1 count", good.filter(({ counted }) => counted).length),
    ...(order.isPickUp
      ? [tab("leave", "2 pick-up")]
      : [
          tab("bundles", "2 parcels", order.bundles.length),
          tab("label", "3 labels", order.parcels.filter(({ label }) => label !== null).length),
          tab("leave", "4 hand over"),
        ]),
  ];
}

function StepOf({ order }: { readonly order: PackView }) {
  switch (order.step) {
    case "count":
      return <CountStep order={order} />;
    case "bundles":
      return (
        <BundlesStep key={`${order.version} ${order.parcels.map(({ id }) => id).join()}`} order={order} />
      );
    case "label":
      return <LabelStep order={order} />;
    case "leave":
      return <LeaveStep order={order} />;
  }
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
