import { createContext, type MiddlewareFunction, type RouterContextProvider } from "react-router";
import { db } from "~/db/client.server";
import type { Role } from "~/domain/orders";
import { listRoles } from "~/models/user-roles.server";
import { auth } from "./auth.server";

/** Who asks. `roles` holds only roles that exist. */
export interface Person {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly emailVerified: boolean;
  readonly shownUnit: "mm" | "in";
  readonly roles: readonly Role[];
}

const personContext = createContext<{ readonly find: () => Promise<Person | null> }>();

/**
 * Root middleware: the session is looked up once a request, at its first use. A session that was prolonged by it
 * sends its cookie anew, unless the reply already sets cookies of its own (signing in or out).
 */
export const sessionMiddleware: MiddlewareFunction<Response> = async ({ request, context }, next) => {
  let found: ReturnType<typeof findPerson> | undefined;
  const find = () => {
    found ??= findPerson(request.headers);
    return found;
  };
  context.set(personContext, { find: async () => (await find()).person });
  const response = await next();
  if (found && !response.headers.has("Set-Cookie"))
    for (const cookie of (await found).cookies) response.headers.append("Set-Cookie", cookie);
  return response;
};

/** Who is signed in, null for a visitor. */
export function currentPerson(context: Readonly<RouterContextProvider>): Promise<Person | null> {
  return context.get(personContext).find();
}

async function findPerson(headers: Headers): Promise<{ person: Person | null; cookies: string[] }> {
  const { response: session, headers: replied } = await auth().api.getSession({
    headers,
    returnHeaders: true,
  });
  const cookies = replied.getSetCookie();
  if (!session) return { person: null, cookies };
  const { id, name, email, emailVerified } = session.user;
  const { roles, shownUnit } = await listRoles(db, id);
  return { person: { id, name, email, emailVerified, shownUnit, roles }, cookies };
}
