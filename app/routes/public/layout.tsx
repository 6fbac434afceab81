import { areaFacts } from "~/auth/area-facts.server";
import { currentPerson } from "~/auth/session.server";
import { AreaError, AreaFrame } from "~/components/area-frame";
import type { Route } from "./+types/layout";

export async function loader({ context }: Route.LoaderArgs) {
  return areaFacts(await currentPerson(context));
}

export default function PublicLayout({ loaderData }: Route.ComponentProps) {
  return <AreaFrame facts={loaderData} />;
}

export const ErrorBoundary = AreaError;
