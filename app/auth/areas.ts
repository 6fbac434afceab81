import { type Act, mayDo, type Role } from "~/domain/orders";

interface Area {
  readonly to: string;
  readonly label: string;
  readonly act: Act;
}

/** The ways through the product, in the order they stand above a page. */
const AREAS: readonly Area[] = [
  { to: "/orders", label: "Orders", act: "order.create" },
  { to: "/orders/new", label: "New drawing", act: "order.create" },
  { to: "/shop", label: "Queue", act: "queue.read" },
  { to: "/shop/nest", label: "Nest desk", act: "nest.edit" },
  { to: "/shop/schedule", label: "Schedule", act: "schedule.edit" },
  { to: "/shop/bench", label: "Bench", act: "piece.move" },
  { to: "/shipping", label: "Shipping", act: "shipping.read" },
  { to: "/shop/stock", label: "Lots", act: "stock.edit" },
  { to: "/owner", label: "Office", act: "figures.read" },
  { to: "/account", label: "Account", act: "account.edit" },
];

/** Areas whose own address stands below another's. */
const EXACT: readonly string[] = ["/orders", "/shop"];

/** What somebody with these roles sees above every page. */
export function navFor(roles: readonly Role[]): { to: string; label: string; end: boolean }[] {
  return AREAS.filter(({ act }) => mayDo(roles, act)).map(({ to, label }) => ({
    to,
    label,
    end: EXACT.includes(to),
  }));
}

/** Where somebody begins: the shop's people in the shop, who only ships at shipping, builders at their orders. */
export function homeOf(roles: readonly Role[]): string {
  if (mayDo(roles, "nest.edit")) return "/shop";
  if (mayDo(roles, "shipping.edit")) return "/shipping";
  return mayDo(roles, "order.create") ? "/orders" : "/account";
}

/** The hats a person wears, as one line. */
export function rolesInWords(roles: readonly Role[]): string {
  return roles.length === 0 ? "no role yet" : roles.join(", ");
}
