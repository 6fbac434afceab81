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

/** Root middleware: the session is looked up once a request, at its first use. */
export const sessionMiddleware: MiddlewareFunction<Response> = ({ request, context }, next) => {
  let found: Promise<Person | null> | undefined;
  context.set(personContext, {
    find: () => {
      found ??= findPerson(request.headers);
      return found;
    },
  });
  return next();
};

/** Who is signed in, null for a visitor. */
export function currentPerson(context: Readonly<RouterContextProvider>): Promise<Person | null> {
  return context.get(personContext).find();
}

async function findPerson(headers: Headers): Promise<Person | null> {
  const session = await auth().api.getSession({ headers });
  if (!session) return null;
  const { id, name, email, emailVerified } = session.user;
  const { roles, shownUnit } = await listRoles(db, id);
  return { id, name, email, emailVerified, shownUnit, roles };
}
