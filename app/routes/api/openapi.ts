import { apiDocument } from "~/documents/api/document";
import { environment } from "~/server/environment.server";
import type { Route } from "./+types/openapi";
import { only } from "./methods.server";

export const middleware: Route.MiddlewareFunction[] = [only("GET")];

/** `GET /api/openapi.json`: what the API takes and answers, for everybody. */
export function loader(_: Route.LoaderArgs) {
  return Response.json(apiDocument(new URL(environment.APP_URL).origin), {
    headers: { "Cache-Control": "public, max-age=300" },
  });
}
