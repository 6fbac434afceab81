import { createContext, type RouterContextProvider } from "react-router";
import { db } from "~/db/client.server";
import type { ApiScope } from "~/domain/orders";
import { findLiveApiKey, noteApiKeyUse } from "~/models/api-keys.server";
import { listRoles } from "~/models/user-roles.server";
import { bearerOf, hashApiKey, looksLikeApiKey } from "./api-key.server";
import { currentPerson, type Person } from "./session.server";

/** Who calls the API: a signed-in person, a person's key, or nobody that is known. */
export type ApiCaller =
  | { readonly kind: "session"; readonly person: Person }
  | {
      readonly kind: "key";
      readonly person: Person;
      readonly keyId: string;
      readonly scopes: readonly ApiScope[];
    }
  | { readonly kind: "nobody"; readonly badKey: boolean };

const callerContext = createContext<Promise<ApiCaller> | null>(null);
/** `last used` is right to the minute, so that a key in steady use does not write at each request. */
const USE_NOTED_EVERY_MS = 60_000;

/** Found once a request. A bearer key counts before a session; one that does not hold is not made up for by a session. */
export function apiCaller(args: {
  readonly request: Request;
  readonly context: Readonly<RouterContextProvider>;
}): Promise<ApiCaller> {
  const known = args.context.get(callerContext);
  if (known) return known;
  const found = findCaller(args.request, args.context);
  args.context.set(callerContext, found);
  return found;
}

async function findCaller(request: Request, context: Readonly<RouterContextProvider>): Promise<ApiCaller> {
  if (!request.headers.has("Authorization")) {
    const person = await currentPerson(context);
    return person ? { kind: "session", person } : { kind: "nobody", badKey: false };
  }
  const given = bearerOf(request.headers);
  const found =
    given !== null && looksLikeApiKey(given) ? await findLiveApiKey(db, hashApiKey(given)) : undefined;
  if (!found) return { kind: "nobody", badKey: true };
  const { keyId, scopes, owner } = found;
  const at = new Date();
  await noteApiKeyUse(db, { keyId, at, notSince: new Date(at.getTime() - USE_NOTED_EVERY_MS) });
  const { roles } = await listRoles(db, owner.id);
  return { kind: "key", keyId, scopes, person: { ...owner, roles } };
}
