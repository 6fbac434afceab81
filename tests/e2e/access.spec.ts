import { execFileSync } from "node:child_process";
import { type APIRequestContext, expect, request, test } from "@playwright/test";
import { DEMO_PASSWORD, DEMO_PEOPLE } from "~/db/seed/people";
import { type AccessRow, type AskingRole, ROLES, ROWS, type Seen } from "./access-rows";
import { demoIds } from "./demo-ids";

const url = process.env.KERFPOST_URL ?? "";

interface ListedRoute {
  readonly path?: string;
  readonly index?: boolean;
  readonly children?: readonly ListedRoute[];
}

/** The URL map as the router itself lists it: every address there is, and whether it is an index. */
function listRoutes(): { readonly route: string; readonly index: boolean }[] {
  const listed: ListedRoute[] = JSON.parse(
    execFileSync("npx", ["react-router", "routes", "--json"], {
      encoding: "utf8",
      stdio: ["ignore", "pipe", "ignore"],
    }),
  );
  const walk = (routes: readonly ListedRoute[], above: string): ReturnType<typeof listRoutes> =>
    routes.flatMap(({ path, index = false, children }) => {
      const here = path ? `${above}/${path}` : above;
      return children ? walk(children, here) : [{ route: here || "/", index }];
    });
  return walk(listed, "");
}

const MAILBOXES: Readonly<Record<Exclude<AskingRole, "visitor">, string>> = {
  builder: DEMO_PEOPLE.builder.email,
  "another builder": DEMO_PEOPLE.library.email,
  operator: DEMO_PEOPLE.operator.email,
  clerk: DEMO_PEOPLE.clerk.email,
  owner: DEMO_PEOPLE.owner.email,
};

/** Whoever asks, without a browser: their cookies only. */
async function contextOf(role: AskingRole): Promise<APIRequestContext> {
  const context = await request.newContext({ baseURL: url, extraHTTPHeaders: { Origin: url } });
  if (role === "visitor") return context;
  const form = { email: MAILBOXES[role], password: DEMO_PASSWORD };
  const answer = await context.post("/sign-in", { form, maxRedirects: 0 });
  expect(answer.status(), `${role} signs in`).toBe(302);
  return context;
}

/** What somebody gets from an address: its status, or that they are sent to sign in. */
async function ask(context: APIRequestContext, method: "GET" | "POST", address: string, row: AccessRow) {
  const at = method === "POST" && row.index ? `${address}?index` : address;
  if (row.streams && method === "GET") return statusOfStream(context, at);
  const body = row.body ?? { form: { intent: "none" } };
  const sent = "form" in body ? { form: body.form } : { data: body.json };
  const answer = await context.fetch(at, { method, maxRedirects: 0, ...(method === "POST" ? sent : {}) });
  const to = answer.headers().location ?? "";
  return answer.status() === 302 && to.startsWith("/sign-in?to=") ? "sign-in" : answer.status();
}

async function statusOfStream(context: APIRequestContext, at: string): Promise<number> {
  const { cookies } = await context.storageState();
  const leaving = new AbortController();
  const Cookie = cookies.map(({ name, value }) => `${name}=${value}`).join("; ");
  const { status } = await fetch(`${url}${at}`, { headers: { Cookie }, signal: leaving.signal });
  leaving.abort();
  return status;
}

test("every route of the URL map has its row, and every row its route", () => {
  const routes = listRoutes();
  expect(ROWS.map(({ route }) => route).toSorted()).toEqual(routes.map(({ route }) => route).toSorted());
  for (const { route, index } of routes)
    expect([route, ROWS.find((row) => row.route === route)?.index ?? false]).toEqual([route, index]);
});

for (const role of ROLES)
  test(`what a ${role} gets from every address`, async () => {
    test.setTimeout(180_000);
    const ids = { cut: await demoIds("cut"), shipped: await demoIds("shipped") };
    const context = await contextOf(role);
    const found: Record<string, Seen> = {};
    const expected: Record<string, Seen> = {};
    for (const row of ROWS) {
      const address = row.route.replace(/[:*]\w*/g, (name) => ids[row.order ?? "cut"][name] ?? "none");
      for (const method of ["GET", "POST"] as const) {
        const status = row[method === "GET" ? "get" : "post"][role];
        if (status === null) continue;
        expected[`${method} ${row.route}`] = status;
        found[`${method} ${row.route}`] = await ask(context, method, address, row);
      }
    }
    await context.dispose();
    expect(found).toEqual(expected);
  });

test("signing out is for whoever is signed in, and ends it", async () => {
  for (const role of ROLES) {
    const context = await contextOf(role);
    expect((await context.post("/sign-out", { maxRedirects: 0 })).status()).toBe(302);
    expect((await context.get("/account", { maxRedirects: 0 })).status()).toBe(302);
    await context.dispose();
  }
});
