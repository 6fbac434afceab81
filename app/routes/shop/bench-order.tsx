import { requireOrder } from "~/auth/guards.server";
import { ErrorPanel } from "~/components/error-panel";
import { PageHeader } from "~/components/page-header";
import { BenchBoard } from "~/components/shipping/bench-board";
import { LabelsLinks } from "~/components/shipping/labels-links";
import { TextLink } from "~/components/text-link";
import type { Route } from "./+types/bench-order";
import { benchView } from "./bench-view.server";

export async function loader(args: Route.LoaderArgs) {
  const { person, order } = await requireOrder(args, "queue.read", args.params.orderId);
  return {
    id: order.id,
    reference: order.reference,
    name: order.name,
    bench: await benchView({ orderId: order.id }, person),
  };
}

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Bench ${loaderData?.reference ?? ""} · Kerfpost` },
];

export default function BenchOrder({ loaderData: order }: Route.ComponentProps) {
  return (
    <>
      <PageHeader
        eyebrow={
          <>
            <TextLink to="/shop/bench">Bench</TextLink> ·{" "}
            <TextLink to={`/shop/orders/${order.id}`}>{order.reference}</TextLink>
          </>
        }
        title={order.name}
        right={<LabelsLinks to={`/shop/orders/${order.id}/labels.pdf`} />}
      />
      <BenchBoard of={{ orderId: order.id }} bench={order.bench} mixed={false} />
    </>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
