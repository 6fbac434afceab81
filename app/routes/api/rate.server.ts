import type { MiddlewareFunction } from "react-router";
import { type ApiCaller, apiCaller } from "~/auth/api-caller.server";
import { CLIENT_ADDRESS_HEADER } from "~/auth/auth.server";
import { db } from "~/db/client.server";
import { API_RATES, RATE_WINDOW_SECONDS } from "~/documents/api/rates";
import { countUse } from "~/models/rate-limits.server";

/**
 * Middleware of every API route: so many requests a minute for each key, each signed-in person, and each network
 * address of whoever is neither. Every answer tells how it stands, in the fields of
 * draft-ietf-httpapi-ratelimit-headers-06.
 */
export const limitRate: MiddlewareFunction<Response> = async ({ request, context }, next) => {
  const caller = await apiCaller({ request, context });
  const limit = API_RATES[caller.kind];
  const { used, resetSeconds } = await countUse(db, {
    key: rateKey(caller, request),
    windowSeconds: RATE_WINDOW_SECONDS,
  });
  const response =
    used <= limit
      ? await next()
      : new Response(`That is more than ${limit} requests a minute. Wait ${resetSeconds} seconds.`, {
          status: 429,
          headers: { "Retry-After": String(resetSeconds) },
        });
  response.headers.set("RateLimit-Limit", String(limit));
  response.headers.set("RateLimit-Remaining", String(Math.max(0, limit - used)));
  response.headers.set("RateLimit-Reset", String(resetSeconds));
  response.headers.set("RateLimit-Policy", `${limit};w=${RATE_WINDOW_SECONDS}`);
  return response;
};

function rateKey(caller: ApiCaller, request: Request): string {
  switch (caller.kind) {
    case "key":
      return `api:key:${caller.keyId}`;
    case "session":
      return `api:person:${caller.person.id}`;
    case "nobody":
      return `api:place:${request.headers.get(CLIENT_ADDRESS_HEADER) ?? "unknown"}`;
  }
}
