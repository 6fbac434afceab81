import { PageHeader } from "~/components/page-header";
import { TabLinks } from "~/components/tab-links";

const TABS = [
  { to: "/account", label: "You" },
  { to: "/account/addresses", label: "Addresses" },
  { to: "/account/mail", label: "E-mail" },
  { to: "/account/password", label: "Password" },
  { to: "/account/sessions", label: "Signed in at" },
  { to: "/account/keys", label: "API keys" },
];

/** The head of every account page. */
export function AccountTabs({ at }: { readonly at: string }) {
  return (
    <>
      <PageHeader title="Account" />
      <TabLinks label="Account" tabs={TABS.map((tab) => ({ ...tab, active: tab.to === at }))} />
    </>
  );
}
