import { Outlet } from "react-router";
import { currentPerson } from "~/auth/session.server";
import { AppShell } from "~/components/app-shell";
import { ErrorPanel } from "~/components/error-panel";
import type { Route } from "./+types/layout";

export async function loader({ context }: Route.LoaderArgs) {
  const person = await currentPerson(context);
  return { name: person?.name ?? null };
}

export default function PublicLayout() {
  return (
    <AppShell nav={[]} who={null} width="read">
      <Outlet />
    </AppShell>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return (
    <AppShell nav={[]} who={null} width="read">
      <ErrorPanel error={error} />
    </AppShell>
  );
}
