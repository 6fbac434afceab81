import { data, type RouterContextProvider, redirect } from "react-router";
import { db } from "~/db/client.server";
import { type Act, mayDo, STAFF_ROLES } from "~/domain/orders";
import { findOrder, type Order, type OrderScope } from "~/models/orders.server";
import { currentPerson, type Person } from "./session.server";

export type { Person } from "./session.server";

/** What every loader and action has. */
export interface GuardedArgs {
  readonly request: Request;
  readonly context: Readonly<RouterContextProvider>;
}

/** The signed-in person; a visitor is sent to sign in (a page) or told 401 (an API route). */
export async function requirePerson({ request, context }: GuardedArgs): Promise<Person> {
  const person = await currentPerson(context);
  if (person) return person;
  const { pathname, search } = new URL(request.url);
  if (pathname.startsWith("/api/")) throw data({ words: "Sign in first." }, { status: 401 });
  const page = pathname.replace(/\.data$/, "").replace(/^\/_root$/, "/");
  const to = request.method === "GET" ? `${page}${search.replace(/[?&]_routes=[^&]*/, "")}` : "/";
  throw redirect(`/sign-in?to=${encodeURIComponent(to)}`);
}

/** 403 for whoever the access table does not allow it. */
export async function requireAct(args: GuardedArgs, act: Act): Promise<Person> {
  const person = await requirePerson(args);
  if (!mayDo(person.roles, act)) throw data({ words: "This is not yours to see or do." }, { status: 403 });
  return person;
}

/** Staff see every order; everybody else sees their own. */
export function scopeOf(person: Person): OrderScope {
  return STAFF_ROLES.some((role) => person.roles.includes(role))
    ? { kind: "staff" }
    : { kind: "builder", userId: person.id };
}

/**
 * The order with the given id within the person's scope: 404 outside of it, as if it did not exist. An act that only
 * a builder has is on the builder's own orders, whatever else the person is.
 */
export async function requireOrder(
  args: GuardedArgs,
  act: Act,
  orderId: string,
): Promise<{ person: Person; order: Order; scope: OrderScope }> {
  const person = await requireAct(args, act);
  const staffRoles = person.roles.filter((role) => role !== "builder");
  const scope: OrderScope = mayDo(staffRoles, act) ? scopeOf(person) : { kind: "builder", userId: person.id };
  const order = await findOrder(db, orderId, scope);
  if (!order) throw data({ words: "There is no such order." }, { status: 404 });
  return { person, order, scope };
}
