import { type Act, mayDo, type Role } from "~/domain/orders";

interface OfficeTab {
  readonly to: string;
  readonly label: string;
  readonly act: Act;
  /** Active on this very address only. */
  readonly end?: boolean;
}

const TABS: readonly OfficeTab[] = [
  { to: "/owner", label: "Figures", act: "figures.read", end: true },
  { to: "/shop/stock", label: "Stock", act: "stock.edit" },
  { to: "/owner/tools", label: "Tools", act: "machine.edit" },
  { to: "/owner/machines", label: "Machines", act: "machine.edit" },
  { to: "/owner/price-book", label: "Price book", act: "price-book.edit" },
  { to: "/owner/refunds", label: "Refunds", act: "refund.make" },
  { to: "/owner/staff", label: "Staff", act: "staff.invite" },
  { to: "/owner/mail", label: "Mail", act: "mail.resend" },
  { to: "/owner/settings", label: "Settings", act: "settings.edit" },
  { to: "/owner/audit", label: "Audit", act: "audit.read" },
];

/** The pages of the office that somebody with these roles can open. */
export const officeTabs = (roles: readonly Role[]): readonly Omit<OfficeTab, "act">[] =>
  TABS.filter(({ act }) => mayDo(roles, act)).map(({ act: _act, ...tab }) => tab);
