import { environment } from "~/server/environment.server";

/**
 * Refuses, with a thrown 403, a request that a page of another site caused. The router's own check covers pages,
 * not resource routes: call it first in their actions.
 */
export function requireSameOrigin(request: Request): void {
  const origin = request.headers.get("Origin");
  if (origin !== null && URL.canParse(origin)) {
    if (origin === new URL(environment.APP_URL).origin) return;
    if (new URL(origin).host === new URL(request.url).host) return;
  }
  throw new Response("This request did not come from this site.", { status: 403 });
}
