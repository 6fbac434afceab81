import type { MiddlewareFunction } from "react-router";
import { PROBLEM_MEDIA_TYPE, problemOf } from "~/documents/api/problem";
import { environment } from "~/server/environment.server";

/** Middleware of every API route: whatever is refused, missing or broken leaves as a problem document (RFC 9457). */
export const answerProblems: MiddlewareFunction<Response> = async ({ request }, next) => {
  let response: Response;
  try {
    response = await next();
  } catch (thrown) {
    if (!(thrown instanceof Response)) console.error(thrown);
    response = thrown instanceof Response ? thrown : new Response(null, { status: 500 });
  }
  if (response.status < 400) return response;
  const problem = problemOf({
    status: response.status,
    instance: new URL(request.url).pathname,
    site: new URL(environment.APP_URL).origin,
    given: await bodyOf(response),
  });
  const headers = new Headers(response.headers);
  for (const name of ["Content-Length", "Content-Encoding"]) headers.delete(name);
  headers.set("Content-Type", PROBLEM_MEDIA_TYPE);
  headers.set("Cache-Control", "no-store");
  // RFC 6750, section 3: how to come in with a key.
  if (response.status === 401) headers.set("WWW-Authenticate", 'Bearer realm="Kerfpost"');
  return new Response(JSON.stringify(problem), { status: response.status, headers });
};

async function bodyOf(response: Response): Promise<unknown> {
  const text = await response.text();
  const type = response.headers.get("Content-Type") ?? "";
  if (!type.includes("json")) return text;
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
