import { type Role, STAFF_ROLES } from "~/domain/orders";
import type { OrderScope } from "~/models/orders.server";

/** Who does it, as the guard found them. */
export interface Actor {
  readonly id: string;
  readonly roles: readonly Role[];
}

/** Staff see every order; everybody else sees their own. */
export const scopeOfActor = ({ id, roles }: Actor): OrderScope =>
  STAFF_ROLES.some((role) => roles.includes(role)) ? { kind: "staff" } : { kind: "builder", userId: id };

/** The role an act is recorded under: staff act as staff, whatever else they are. */
export const roleOfActor = ({ roles }: Actor): Role =>
  (["owner", "operator", "clerk"] as const).find((role) => roles.includes(role)) ?? "builder";
