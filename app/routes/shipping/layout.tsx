import { areaFacts } from "~/auth/area-facts.server";
import { requireAct } from "~/auth/guards.server";
import { AreaError, AreaFrame } from "~/components/area-frame";
import type { Route } from "./+types/layout";

export async function loader(args: Route.LoaderArgs) {
  return areaFacts(await requireAct(args, "shipping.read"));
}

export default function ShippingLayout({ loaderData }: Route.ComponentProps) {
  return <AreaFrame facts={loaderData} />;
}

export const ErrorBoundary = AreaError;
