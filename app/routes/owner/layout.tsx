import { useLocation } from "react-router";
import { areaFacts } from "~/auth/area-facts.server";
import { requireAct } from "~/auth/guards.server";
import { AreaError, AreaFrame } from "~/components/area-frame";
import { officeTabs } from "~/components/owner/office-tabs";
import { TabLinks } from "~/components/tab-links";
import type { Route } from "./+types/layout";

/** The operators keep the stock; every page here has its own guard. */
export async function loader(args: Route.LoaderArgs) {
  const person = await requireAct(args, "stock.edit");
  return { facts: await areaFacts(person), tabs: officeTabs(person.roles) };
}

export default function OwnerLayout({ loaderData }: Route.ComponentProps) {
  const { facts, tabs } = loaderData;
  /* What waits in the office is mail that did not arrive. */
  const troubledMails = facts.nav.find(({ to }) => to === "/owner")?.waiting ?? 0;
  const { pathname } = useLocation();
  return (
    <AreaFrame facts={facts}>
      {tabs.length > 1 && (
        <TabLinks
          label="Office"
          tabs={tabs.map(({ to, label, end }) => ({
            to,
            label,
            active: end ? pathname === to : pathname === to || pathname.startsWith(`${to}/`),
            ...(to === "/owner/mail" && troubledMails > 0 ? { count: troubledMails, warn: true } : {}),
          }))}
        />
      )}
    </AreaFrame>
  );
}

export const ErrorBoundary = AreaError;
