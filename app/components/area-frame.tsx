import type { ReactNode } from "react";
import { Form, Outlet } from "react-router";
import { AppShell, type NavItem, type Person } from "./app-shell";
import { Button } from "./button";
import { ErrorPanel } from "./error-panel";
import { Notice } from "./notice";
import { ShopZoneProvider } from "./shop-zone";
import { ShownUnitProvider } from "./shown-unit";

interface AreaFrameProps {
  readonly facts: {
    readonly who: Person | null;
    readonly nav: readonly NavItem[];
    readonly shownUnit: "mm" | "in";
    readonly zone: string;
    readonly unverified: boolean;
  };
  readonly width?: "full" | "read";
  /** Above the page: the area's own ways. */
  readonly children?: ReactNode;
}

/** The frame of an area's pages: its ways, the reader's unit, the shop's time zone. */
export function AreaFrame({ facts, width, children }: AreaFrameProps) {
  const { who, nav, shownUnit, zone, unverified } = facts;
  return (
    <ShopZoneProvider zone={zone}>
      <ShownUnitProvider unit={shownUnit}>
        <AppShell nav={nav} who={who} width={width}>
          {unverified && <Unverified />}
          {children}
          <Outlet />
        </AppShell>
      </ShownUnitProvider>
    </ShopZoneProvider>
  );
}

function Unverified() {
  return (
    <Notice
      tone="note"
      title="Your e-mail address is not confirmed yet"
      action={
        <Form method="post" action="/verify-email">
          <Button size="small" variant="plain">
            Send the mail again
          </Button>
        </Form>
      }
    >
      Press the link in the mail we sent. You can upload and price drawings meanwhile; paying waits for it.
    </Notice>
  );
}

/** The face of an area's error boundary, where the frame's own facts may be what failed. */
export function AreaError({ error }: { readonly error: unknown }) {
  return (
    <AppShell nav={[]} who={null} width="read">
      <ErrorPanel error={error} />
    </AppShell>
  );
}
