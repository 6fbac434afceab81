import { createHmac } from "node:crypto";
import { RouterContextProvider } from "react-router";
import { sessionMiddleware } from "~/auth/session.server";
import { db } from "~/db/client.server";
import { newId, sessions } from "~/db/schema";
import { environment } from "~/server/environment.server";
import type { TestPerson } from "./scene";

const DAY_MS = 86_400_000;

/** A cookie header of a session of this person, signed as the sign-in signs it. */
export async function sessionCookie(person: TestPerson): Promise<string> {
  const token = newId();
  await db.insert(sessions).values({ token, userId: person.id, expiresAt: new Date(Date.now() + DAY_MS) });
  const signature = createHmac("sha256", environment.AUTH_SECRET).update(token).digest("base64");
  return `kerfpost.session_token=${encodeURIComponent(`${token}.${signature}`)}`;
}

interface Asked<Params, Pattern> {
  /** Nobody signed in if null. */
  person: TestPerson | null;
  path: string;
  /** The route's own pattern, as in the URL map. */
  pattern: Pattern;
  params: Params;
  init?: RequestInit;
}

/** What a loader or action is called with when this person asks for this, the session found by the real middleware. */
export async function argsFor<Params extends Record<string, string>, const Pattern extends string>(
  asked: Asked<Params, Pattern>,
) {
  const { person, path, params, pattern, init = {} } = asked;
  const headers = new Headers(init.headers);
  if (person) headers.set("Cookie", await sessionCookie(person));
  const url = new URL(path, environment.APP_URL);
  const request = new Request(url, { ...init, headers });
  const context = new RouterContextProvider();
  const args = { request, params, context, url, pattern };
  await sessionMiddleware(args, async () => new Response());
  return args;
}

/** The status of what a guard threw, or of what came back. */
export async function statusOf(answer: Promise<Response>): Promise<number> {
  try {
    return (await answer).status;
  } catch (thrown) {
    if (thrown instanceof Response) return thrown.status;
    if (thrown && typeof thrown === "object" && "init" in thrown) {
      const { init } = thrown as { init: ResponseInit | null };
      return init?.status ?? 200;
    }
    throw thrown;
  }
}
