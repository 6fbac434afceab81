import { data, type RouterContextProvider, redirect } from "react-router";
import { db } from "~/db/client.server";
import { type Act, type ApiScope, mayDo, STAFF_ROLES } from "~/domain/orders";
import { findOrder, type Order, type OrderScope } from "~/models/orders.server";
import { apiCaller } from "./api-caller.server";
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
  if (isApi(request))
    throw turnedAway(
      request,
      401,
      request.headers.has("Authorization")
        ? "This address takes a signed-in person, not a key."
        : "Sign in first.",
    );
  const page = pathname.replace(/\.data$/, "").replace(/^\/_root$/, "/");
  const to = request.method === "GET" ? `${page}${search.replace(/[?&]_routes=[^&]*/, "")}` : "/";
  throw redirect(`/sign-in?to=${encodeURIComponent(to)}`);
}

/** 403 for whoever the access table does not allow it. */
export async function requireAct(args: GuardedArgs, act: Act): Promise<Person> {
  return allowed(args, await requirePerson(args), act);
}

/**
 * The caller of an API route that takes a session or a bearer key: 401 for neither, 403 for a key that was not made
 * for `scope` and for whoever the access table does not allow it. A key may do what its person may, and no more.
 */
export async function requireApiAct(args: GuardedArgs, act: Act, scope: ApiScope): Promise<Person> {
  const { request } = args;
  const caller = await apiCaller(args);
  if (caller.kind === "nobody")
    throw turnedAway(
      request,
      401,
      caller.badKey
        ? "There is no such key, or it was revoked."
        : "Sign in first, or send a key: Authorization: Bearer kp_...",
    );
  if (caller.kind === "key" && !caller.scopes.includes(scope))
    throw turnedAway(request, 403, `This key was not made for ${scope}.`);
  return allowed(args, caller.person, act);
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
export async function requireOrder(args: GuardedArgs, act: Act, orderId: string): Promise<OwnOrder> {
  return ownOrder(args, await requireAct(args, act), act, orderId);
}

/** `requireOrder` for an API route that takes a session or a bearer key. */
export async function requireApiOrder(
  args: GuardedArgs,
  act: Act,
  scope: ApiScope,
  orderId: string,
): Promise<OwnOrder> {
  return ownOrder(args, await requireApiAct(args, act, scope), act, orderId);
}

interface OwnOrder {
  readonly person: Person;
  readonly order: Order;
  readonly scope: OrderScope;
}

async function ownOrder(args: GuardedArgs, person: Person, act: Act, orderId: string): Promise<OwnOrder> {
  const staffRoles = person.roles.filter((role) => role !== "builder");
  const scope: OrderScope = mayDo(staffRoles, act) ? scopeOf(person) : { kind: "builder", userId: person.id };
  const order = await findOrder(db, orderId, scope);
  if (!order) throw turnedAway(args.request, 404, "There is no such order.");
  return { person, order, scope };
}

function allowed({ request }: GuardedArgs, person: Person, act: Act): Person {
  if (!mayDo(person.roles, act)) throw turnedAway(request, 403, "This is not yours to see or do.");
  return person;
}

const isApi = (request: Request): boolean => new URL(request.url).pathname.startsWith("/api/");

/** What is thrown: an API route's answer, made a problem document on its way out, or what a page's boundary shows. */
const turnedAway = (request: Request, status: number, words: string) =>
  isApi(request) ? new Response(words, { status }) : data({ words }, { status });
