import { isRole, type Role } from "./role";

const STAFF: readonly Role[] = ["operator", "clerk", "owner"];
const EVERYBODY: readonly Role[] = ["builder", "operator", "clerk", "owner"];
const FLOOR: readonly Role[] = ["operator", "owner"];
const DESK: readonly Role[] = ["clerk", "owner"];
const OWNER: readonly Role[] = ["owner"];
const BUILDER: readonly Role[] = ["builder"];

/**
 * Who may do what. A builder's acts are on the builder's own orders only: every query by id carries the scope. The
 * owner can do everything the staff can; what is a builder's own (drawing, approval, payment) stays the builder's.
 */
export const ACCESS = {
  "account.edit": EVERYBODY,
  "order.create": BUILDER,
  "order.read": EVERYBODY,
  "order.edit": BUILDER,
  "order.quote": BUILDER,
  "order.approve": BUILDER,
  "order.pay": BUILDER,
  "order.cancel": ["builder", "operator", "owner"],
  "order.message": EVERYBODY,
  "order.review": FLOOR,
  "order.receive": FLOOR,
  "order.hold": STAFF,
  "order.undo": STAFF,
  "queue.read": STAFF,
  "piece.move": FLOOR,
  "piece.remake": STAFF,
  "nest.edit": FLOOR,
  "schedule.edit": FLOOR,
  "stock.edit": FLOOR,
  "shipping.read": STAFF,
  "shipping.edit": DESK,
  "refund.make": OWNER,
  "staff.invite": OWNER,
  "machine.edit": OWNER,
  "price-book.edit": OWNER,
  "settings.edit": OWNER,
  "mail.resend": OWNER,
  "audit.read": OWNER,
  "figures.read": OWNER,
} as const satisfies Record<string, readonly Role[]>;

export type Act = keyof typeof ACCESS;
export const ACTS = Object.keys(ACCESS) as readonly Act[];

/** A role or an act that is not in the table means no. */
export function mayDo(roles: readonly string[], act: string): boolean {
  if (!Object.hasOwn(ACCESS, act)) return false;
  const allowed: readonly Role[] = ACCESS[act as Act];
  return roles.some((role) => isRole(role) && allowed.includes(role));
}
