/** Requests as a browser makes them, for what stands behind the session and the guards. */
import { RouterContextProvider } from "react-router";
import { CLIENT_ADDRESS_HEADER } from "~/auth/auth.server";
import { currentPerson, sessionMiddleware } from "~/auth/session.server";
import { signInWithPassword } from "~/auth/sign-in.server";
import { db } from "~/db/client.server";
import { outbox } from "~/db/schema";
import { environment } from "~/server/environment.server";

interface Asking {
  readonly cookie?: string;
  readonly method?: string;
  /** Network address the server saw. */
  readonly from?: string;
  /** The page itself asks who is there. */
  readonly asked?: boolean;
}

export function requestTo(
  path: string,
  { cookie, method = "GET", from = "192.0.2.1" }: Asking = {},
): Request {
  return new Request(`${environment.APP_URL}${path}`, {
    method,
    headers: { [CLIENT_ADDRESS_HEADER]: from, ...(cookie ? { cookie } : {}) },
  });
}

/** The arguments a loader gets, after the root middleware has run. */
export async function argsFor(path: string, asking: Asking = {}) {
  const request = requestTo(path, asking);
  const context = new RouterContextProvider();
  const replied = await sessionMiddleware(
    { request, context, params: {}, url: new URL(request.url), pattern: "" },
    async () => {
      if (asking.asked) await currentPerson(context);
      return new Response();
    },
  );
  if (!replied) throw new Error("The middleware gave no reply.");
  return { request, context, replied };
}

/** The cookie of a session begun with this password; undefined when it is refused. */
export async function cookieOf(email: string, password: string): Promise<string | undefined> {
  const signedIn = await signInWithPassword(requestTo("/sign-in", { method: "POST" }), { email, password });
  if (!signedIn.ok) return undefined;
  return signedIn.headers
    .getSetCookie()
    .map((line) => line.split(";")[0])
    .join("; ");
}

/** What the newest mail of a kind to an address links to. */
export async function linkMailedTo(email: string, template: string): Promise<URL> {
  const mails = (await db.select().from(outbox)).filter(
    (mail) => mail.recipient === email && mail.template === template,
  );
  const link = /https?:\S+/.exec(mails.at(-1)?.payload.text ?? "")?.[0];
  if (!link) throw new Error(`No ${template} mail with a link went to ${email}.`);
  return new URL(link);
}

/** What was thrown, as the router hands it to an error boundary or the browser. */
export async function thrownBy(
  work: () => Promise<unknown>,
): Promise<{ status: number; location: string | null }> {
  try {
    await work();
  } catch (thrown) {
    if (thrown instanceof Response)
      return { status: thrown.status, location: thrown.headers.get("location") };
    const status = (thrown as { init?: { status?: number } }).init?.status;
    if (status !== undefined) return { status, location: null };
    throw thrown;
  }
  throw new Error("Nothing was thrown.");
}
