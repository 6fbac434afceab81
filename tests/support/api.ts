/** The API as it is served: its routes from the URL map, behind the real middleware, asked with real requests. */
import path from "node:path";
import type { RouteConfigEntry } from "@react-router/dev/routes";
import { createRequestHandler, RouterContextProvider, type ServerBuild } from "react-router";
import { CLIENT_ADDRESS_HEADER } from "~/auth/auth.server";
import { sessionMiddleware } from "~/auth/session.server";
import type { ApiScope } from "~/domain/orders";
import { makeApiKey } from "~/flows/make-api-key.server";
import urlMap from "~/routes";
import { environment } from "~/server/environment.server";
import { done } from "./chain";
import type { TestPerson } from "./scene";
import { sessionCookie } from "./sign-in";

type Manifest = ServerBuild["routes"];
type Module = Manifest[string] extends { module: infer M } | undefined ? M : never;

const API_LAYOUT = "routes/api/layout.ts";

const layout = urlMap.find(({ file }) => file === API_LAYOUT);
/** Every route of the API, as the URL map has it. */
export const apiRoutes: readonly RouteConfigEntry[] = layout?.children ?? [];

const load = async (file: string): Promise<Module> =>
  import(/* @vite-ignore */ path.resolve(import.meta.dirname, "../../app", file));

async function build(): Promise<ServerBuild> {
  const routes: Manifest = {
    root: { id: "root", path: "", module: { default: () => null, middleware: [sessionMiddleware] } },
    api: { id: "api", parentId: "root", module: await load(API_LAYOUT) },
  };
  for (const { file, path: at } of apiRoutes)
    routes[file] = { id: file, parentId: "api", path: at, module: await load(file) };
  return {
    entry: { module: { default: () => new Response("A page.", { status: 500 }) } },
    routes,
    assets: { entry: { imports: [], module: "" }, routes: {}, url: "", version: "" },
    publicPath: "/",
    assetsBuildDirectory: "",
    future: { v8_middleware: true, v8_passThroughRequests: true, v8_trailingSlashAwareDataRequests: true },
    ssr: true,
    isSpaMode: false,
    prerender: [],
    routeDiscovery: { mode: "initial", manifestPath: "/__manifest" },
  };
}

let handler: ReturnType<typeof createRequestHandler> | undefined;

export interface Credentials {
  readonly person?: TestPerson;
  readonly key?: string;
}

/** Sends a request to the API as the person's session, as a key, or as nobody. */
export async function askApi(
  at: string,
  { person, key }: Credentials = {},
  init: RequestInit = {},
): Promise<Response> {
  handler ??= createRequestHandler(await build(), "production");
  const headers = new Headers(init.headers);
  headers.set(CLIENT_ADDRESS_HEADER, "192.0.2.7");
  if (person) headers.set("Cookie", await sessionCookie(person));
  if (key) headers.set("Authorization", `Bearer ${key}`);
  const request = new Request(new URL(at, environment.APP_URL), { ...init, headers });
  return handler(request, new RouterContextProvider());
}

/** A new key of this person. */
export const keyOf = async (actor: TestPerson, ...scopes: ApiScope[]): Promise<string> =>
  (await done(makeApiKey({ actor, name: "Order board", scopes }))).secret;
