import { Validator } from "@seriousme/openapi-schema-validator";
import { Ajv2020, type ErrorObject } from "ajv/dist/2020.js";
import addFormats from "ajv-formats";
import { beforeEach, describe, expect, test } from "vitest";
import { db } from "~/db/client.server";
import { orders, rateLimits, settings, userRoles } from "~/db/schema";
import { orderPageSchema, orderSchema, statusSchema } from "~/documents/api/answers";
import { apiDocument } from "~/documents/api/document";
import { apiGuide } from "~/documents/api/guide";
import { PROBLEM_KINDS, type Problem } from "~/documents/api/problem";
import { API_SCOPES } from "~/domain/orders";
import { remakePiece } from "~/flows/remake-piece.server";
import { listApiKeys } from "~/models/api-keys.server";
import { recordEvent } from "~/models/events.server";
import { listPieces } from "~/models/pieces.server";
import { environment } from "~/server/environment.server";
import { apiRoutes, askApi, type Credentials, keyOf } from "../support/api";
import { asked, done, makeQuoted, makeReadyDraft, makeReceived, nest } from "../support/chain";
import { resetDatabase } from "../support/database";
import { takeConsoleErrors } from "../support/loud-console";
import { freshScene, makePerson, makeShop, type TestPerson, type TestShop } from "../support/scene";
import { receiveWebhooks } from "../support/webhook-receiver";

const running = freshScene();
const receiver = receiveWebhooks();
const SITE = new URL(environment.APP_URL).origin;
const document = apiDocument(SITE);
const ajv = addFormats.default(new Ajv2020({ strict: false, allErrors: true }));
ajv.addSchema(document, "api");

/** What the document itself finds wrong with an answer, by a reader of JSON Schema that knows no zod. */
function wrongWith(name: string, body: unknown): string[] {
  const validate = ajv.getSchema(`api#/components/schemas/${name}`);
  if (!validate) throw new Error(`The document has no ${name}.`);
  validate(body);
  return (validate.errors ?? []).map((error: ErrorObject) => `${error.instancePath} ${error.message}`);
}

let builder: TestPerson;
let operator: TestPerson;
let shop: TestShop;

beforeEach(async () => {
  await running.fakes.payments.webhooksSettled();
  running.fakes.payments.pointWebhooksAt(receiver.url);
  await resetDatabase();
  builder = await makePerson();
  operator = await makePerson({ roles: ["operator"] });
  shop = await makeShop();
});

/** A problem that the document describes, with its status and address the same inside and out. */
async function problemIn(response: Response, status: number): Promise<Problem> {
  expect([response.status, response.headers.get("Content-Type")]).toEqual([
    status,
    "application/problem+json",
  ]);
  const problem = await response.json();
  expect(wrongWith("Problem", problem)).toEqual([]);
  expect(problem.status).toBe(status);
  return problem;
}

async function jsonIn(response: Response) {
  expect([response.status, response.headers.get("Content-Type")]).toEqual([200, "application/json"]);
  return response.json();
}

describe("the document", () => {
  test("is OpenAPI 3.1, and served as it is made", async () => {
    const served = await jsonIn(await askApi("/api/openapi.json"));
    expect(served).toEqual(JSON.parse(JSON.stringify(document)));
    const validator = new Validator();
    expect(await validator.validate(served)).toMatchObject({ valid: true });
    expect(validator.version).toBe("3.1");
  });

  test("names every address that takes a key, and the URL map has no other", () => {
    const forPagesOnly = [
      "api/uploads",
      "api/orders/:orderId/price",
      "api/orders/:orderId/geometry/:key",
      "api/orders/:orderId/messages",
      "api/orders/:orderId/messages/read",
      "api/orders/:orderId/attachments/:attachmentId",
    ];
    const apart = ["api/openapi.json", "api/*"];
    const told = Object.keys(document.paths).map((path) => path.slice(1).replace(/\{(\w+)\}/g, ":$1"));
    expect(apiRoutes.map(({ path }) => path).sort()).toEqual([...told, ...forPagesOnly, ...apart].sort());
  });

  test("is what the guide shows, each address with a line for the terminal", () => {
    const guide = apiGuide(document, SITE);
    expect(guide.map(({ path }) => path)).toEqual(Object.keys(document.paths));
    for (const { curl } of guide) expect(curl).toContain(`${SITE}/api/orders`);
    const [list] = guide;
    expect(list?.parameters.map(({ name }) => name)).toEqual(["stage", "q", "since", "limit", "cursor"]);
    const status = guide.find(({ id }) => id === "readStatus");
    expect(status?.fields.map(({ name }) => name)).toContain("pieces[].stage");
  });
});

describe("answers", () => {
  test("of a draft, a quoted and a received order are as the document says, for sessions and for keys", async () => {
    const draft = await makeReadyDraft(builder, shop);
    const quoted = await makeQuoted(builder, shop);
    const received = await makeReceived({ builder, operator }, shop, running.fakes.payments);
    const callers: Credentials[] = [
      { person: builder },
      { key: await keyOf(builder, ...API_SCOPES) },
      { person: operator },
      { key: await keyOf(operator, ...API_SCOPES) },
    ];
    for (const caller of callers) {
      const page = await jsonIn(await askApi("/api/orders", caller));
      expect(wrongWith("OrderPage", page)).toEqual([]);
      expect(orderPageSchema.parse(page)).toEqual(page);
      expect(page.orders.map(({ id }: { id: string }) => id)).toEqual([received.id, quoted.id, draft.id]);
      for (const { id } of [draft, quoted, received]) {
        const order = await jsonIn(await askApi(`/api/orders/${id}`, caller));
        expect(wrongWith("Order", order)).toEqual([]);
        expect(orderSchema.parse(order)).toEqual(order);
        const status = await jsonIn(await askApi(`/api/orders/${id}/status`, caller));
        expect(wrongWith("Status", status)).toEqual([]);
        expect(statusSchema.parse(status)).toEqual(status);
      }
    }
  });

  test("tell quote, parts and drawings of an order", async () => {
    const { id, reference } = await makeQuoted(builder, shop);
    const order = await jsonIn(await askApi(`/api/orders/${id}`, { person: builder }));
    expect(order).toMatchObject({ id, reference, stage: "quoted", builder: { name: builder.name } });
    expect(order.waitingFor).toMatchObject({ who: "builder", code: "approval-and-payment" });
    const sum = order.quote.lines.reduce(
      (total: number, { amount }: { amount: number }) => total + amount,
      0,
    );
    expect([order.quote.total, order.total]).toEqual([sum, { cents: sum, currency: "usd" }]);
    expect(order.parts.length).toBeGreaterThan(0);
    expect(order.parts[0].material).toBe(shop.material.name);
    const [drawing] = order.drawings;
    const { pathname } = new URL(drawing.url);
    const file = await askApi(pathname, { key: await keyOf(builder, "drawings:read") });
    expect(file.status).toBe(200);
    const digest = await crypto.subtle.digest("SHA-256", await file.arrayBuffer());
    expect(Buffer.from(digest).toString("hex")).toBe(drawing.sha256);
  });

  test("tell the stage of every piece, remakes too", async () => {
    const order = await makeReceived({ builder, operator }, shop, running.fakes.payments);
    const key = await keyOf(builder, "status:read");
    const before = await jsonIn(await askApi(`/api/orders/${order.id}/status`, { key }));
    const count = before.pieces.length;
    expect(before.stage).toBe("received");
    expect(before.waitingFor).toEqual({ who: "shop", code: "nesting", words: "its sheets to be laid out" });
    expect(before.progress).toEqual([
      { stage: "received", reached: count, of: count },
      ...["nested", "cut", "tabs-removed", "shipped"].map((stage) => ({ stage, reached: 0, of: count })),
    ]);
    await done(nest(operator, shop, [order.id]));
    const [piece] = await listPieces(db, order.id);
    if (!piece) throw new Error("The order has no piece.");
    await done(
      remakePiece({
        ...(await asked(operator, order.id)),
        pieceId: piece.id,
        state: "missing",
        reason: "Not on the shelf",
        payer: "shop",
      }),
    );
    const after = await jsonIn(await askApi(`/api/orders/${order.id}/status`, { key }));
    expect(wrongWith("Status", after)).toEqual([]);
    const remade = after.pieces.filter(
      (one: { part: string; number: number }) => one.number === piece.number && one.part === piece.part.label,
    );
    expect(remade).toMatchObject([
      { state: "missing", remake: false },
      { state: "good", remake: true, stage: "received" },
    ]);
    expect(after.progress.slice(0, 2)).toEqual([
      { stage: "received", reached: count, of: count },
      { stage: "nested", reached: count - 1, of: count },
    ]);
  });

  test("say that an order is late once its promised day is over", async () => {
    const { id } = await makeReceived({ builder, operator }, shop, running.fakes.payments);
    const late = async () =>
      (await jsonIn(await askApi(`/api/orders/${id}/status`, { person: builder }))).late;
    expect(await late()).toBe(false);
    await db.update(orders).set({ promisedFor: new Date(Date.now() - 2 * 86_400_000) });
    expect(await late()).toBe(true);
  });
});

describe("the list", () => {
  const names = ["Galley", "Bunk", "Locker", "Shelf", "Table"];
  const idOf = (index: number) => `${index}`.repeat(32);
  beforeEach(async () => {
    for (const [index, name] of names.entries())
      await db.insert(orders).values({
        id: idOf(index),
        reference: `KP-${3_000 + index}`,
        builderId: builder.id,
        name,
        stage: index < 2 ? "cut" : "draft",
        // Two made at the same instant are told apart by their ids.
        createdAt: new Date(1_790_000_000_000 + Math.floor(index / 2) * 1_000),
        updatedAt: new Date(1_790_000_100_000 + index * 1_000),
      });
  });
  const namesIn = async (query: string, caller: Credentials = { person: builder }) =>
    (await jsonIn(await askApi(`/api/orders${query}`, caller))).orders.map(
      (order: { name: string }) => order.name,
    );

  test("is walked page by page to its end, each order once", async () => {
    const seen: string[] = [];
    let at: string | null = "/api/orders?limit=2";
    let pages = 0;
    while (at !== null) {
      const response = await askApi(at, { person: builder });
      const { orders: found, next } = await response.json();
      expect(response.headers.get("Link")).toBe(next === null ? null : `<${next}>; rel="next"`);
      seen.push(...found.map((order: { name: string }) => order.name));
      pages += 1;
      at = next;
    }
    expect([pages, seen]).toEqual([3, ["Table", "Shelf", "Locker", "Bunk", "Galley"]]);
  });

  test("keeps to stages, words and what changed since", async () => {
    expect(await namesIn("?stage=cut")).toEqual(["Bunk", "Galley"]);
    expect(await namesIn("?stage=cut,draft&limit=1")).toEqual(["Table"]);
    expect(await namesIn("?q=KP-3002")).toEqual(["Locker"]);
    expect(await namesIn("?q=%25")).toEqual([]);
    expect(await namesIn(`?since=${new Date(1_790_000_103_000).toISOString()}`)).toEqual(["Table", "Shelf"]);
  });

  test("holds a builder's own orders, and all for the shop", async () => {
    const other = await makePerson();
    expect(await namesIn("", { person: other })).toEqual([]);
    expect(await namesIn("", { key: await keyOf(other, "orders:read") })).toEqual([]);
    expect(await namesIn("", { person: operator })).toHaveLength(5);
    expect(await namesIn("", { key: await keyOf(operator, "orders:read") })).toHaveLength(5);
  });

  test("refuses what it does not know, by name", async () => {
    for (const [query, name] of [
      ["?stage=glued", "stage"],
      ["?limit=0", "limit"],
      ["?limit=101", "limit"],
      ["?since=yesterday", "since"],
      ["?cursor=x", "cursor"],
      ["?page=2", "page"],
    ]) {
      const problem = await problemIn(await askApi(`/api/orders${query}`, { person: builder }), 422);
      expect(problem.errors?.map((error) => error.name)).toEqual([name]);
      expect(problem.instance).toBe("/api/orders");
    }
  });
});

describe("keys", () => {
  test("are kept as hashes, and their use is noted", async () => {
    const key = await keyOf(builder, "orders:read");
    expect(key).toMatch(/^kp_[\w-]{43}$/);
    const kept = JSON.stringify(await db.query.apiKeys.findMany());
    expect(kept).not.toContain(key);
    expect(kept).toContain(key.slice(0, 10));
    const digest = await crypto.subtle.digest("SHA-256", new TextEncoder().encode(key));
    expect(kept).toContain(Buffer.from(digest).toString("hex"));
    expect((await listApiKeys(db, builder.id))[0]?.lastUsedAt).toBeNull();
    await askApi("/api/orders", { key });
    expect((await listApiKeys(db, builder.id))[0]?.lastUsedAt?.getTime()).toBeGreaterThan(Date.now() - 5_000);
  });

  test("open what they were made for and nothing else", async () => {
    const { id } = await makeReadyDraft(builder, shop);
    const opens = {
      "orders:read": ["/api/orders", `/api/orders/${id}`],
      "status:read": [`/api/orders/${id}/status`],
      "events:read": [`/api/orders/${id}/events`],
      "drawings:read": [`/api/orders/${id}/drawings/none`],
    };
    for (const made of API_SCOPES) {
      const key = await keyOf(builder, made);
      for (const [scope, paths] of Object.entries(opens))
        for (const path of paths) {
          const response = await askApi(path, { key });
          const expected = scope !== made ? 403 : scope === "drawings:read" ? 404 : 200;
          expect([made, path, response.status]).toEqual([made, path, expected]);
          await response.body?.cancel();
        }
    }
  });

  test("that are revoked, unknown or not keys at all open nothing, whatever session comes with them", async () => {
    const unknown = `kp_${"A".repeat(43)}`;
    for (const key of [unknown, "kp_short", "x"]) {
      const response = await askApi("/api/orders", { key, person: builder });
      expect(response.headers.get("WWW-Authenticate")).toBe('Bearer realm="Kerfpost"');
      expect((await problemIn(response, 401)).detail).toBe("There is no such key, or it was revoked.");
    }
    const basic = await askApi("/api/orders", {}, { headers: { Authorization: "Basic YTpi" } });
    await problemIn(basic, 401);
  });

  test("lose with their person's role what it gave", async () => {
    const key = await keyOf(operator, "orders:read");
    expect((await askApi("/api/orders", { key })).status).toBe(200);
    await db.delete(userRoles);
    await problemIn(await askApi("/api/orders", { key }), 403);
  });

  test("of another builder do not see that an order is there", async () => {
    const { id } = await makeReadyDraft(builder, shop);
    const key = await keyOf(await makePerson(), ...API_SCOPES);
    for (const path of ["", "/status", "/events", "/drawings/none"])
      await problemIn(await askApi(`/api/orders/${id}${path}`, { key }), 404);
    const staff = await keyOf(await makePerson({ roles: ["clerk"] }), ...API_SCOPES);
    expect((await askApi(`/api/orders/${id}`, { key: staff })).status).toBe(200);
  });

  test("are not taken where a person has to be", async () => {
    const { id } = await makeReadyDraft(builder, shop);
    const key = await keyOf(builder, ...API_SCOPES);
    const { detail } = await problemIn(await askApi(`/api/orders/${id}/messages`, { key }), 401);
    expect(detail).toBe("This address takes a signed-in person, not a key.");
  });
});

describe("the stream", () => {
  test("goes on behind the last event, for a key, without what is for staff", async () => {
    const { id } = await makeReadyDraft(builder, shop);
    for (const to of ["paid", "received"])
      await recordEvent(db, { orderId: id, kind: "stage", data: { to } });
    await recordEvent(db, { orderId: id, kind: "message", audience: "staff", data: { to: "a note" } });
    const heardBy = async (person: TestPerson, until: string) => {
      const leaving = new AbortController();
      const response = await askApi(
        `/api/orders/${id}/events`,
        { key: await keyOf(person, "events:read") },
        { headers: { "Last-Event-ID": "0" }, signal: leaving.signal },
      );
      expect(response.headers.get("Content-Type")).toBe("text/event-stream; charset=utf-8");
      expect(response.headers.get("RateLimit-Limit")).toBe("120");
      let heard = "";
      const reader = response.body?.pipeThrough(new TextDecoderStream()).getReader();
      while (reader && !heard.includes(until)) heard += (await reader.read()).value ?? "";
      leaving.abort();
      await reader?.cancel();
      return heard;
    };
    const heard = await heardBy(builder, '"to":"received"');
    expect(heard).toMatch(
      /id: \d+\nevent: stage\ndata: \{"to":"paid","at":"[^"]+"\}\n\nid: \d+\nevent: stage/,
    );
    expect(heard).not.toContain("a note");
    expect(await heardBy(operator, "a note")).toContain("event: message");
  });
});

describe("problems", () => {
  test("answer every route and method that is not for whoever asks", async () => {
    const statuses: Record<string, number[]> = {};
    const methods = ["GET", "POST", "PUT", "DELETE"];
    for (const { path = "" } of apiRoutes) {
      const at = `/${path.replace(/:\w+/g, "none").replace("*", "nowhere")}`;
      const found: number[] = [];
      for (const method of methods) {
        const headers = { Origin: SITE };
        const response = await askApi(at, {}, { method, headers });
        found.push(response.status);
        if (response.status === 200) continue;
        const problem = await problemIn(response, response.status);
        expect(problem.instance).toBe(at);
        if (response.status === 405) expect(response.headers.get("Allow")).toMatch(/^(GET|POST)/);
      }
      statuses[path] = found;
    }
    expect(statuses).toEqual({
      "api/openapi.json": [200, 405, 405, 405],
      "api/uploads": [405, 401, 405, 405],
      "api/orders": [401, 405, 405, 405],
      "api/orders/:orderId": [401, 405, 405, 405],
      "api/orders/:orderId/status": [401, 405, 405, 405],
      "api/orders/:orderId/price": [405, 401, 405, 405],
      "api/orders/:orderId/events": [401, 405, 405, 405],
      "api/orders/:orderId/geometry/:key": [401, 405, 405, 405],
      "api/orders/:orderId/drawings/:drawingId": [401, 405, 405, 405],
      "api/orders/:orderId/messages": [401, 401, 405, 405],
      "api/orders/:orderId/messages/read": [405, 401, 405, 405],
      "api/orders/:orderId/attachments/:attachmentId": [401, 405, 405, 405],
      "api/*": [404, 404, 405, 405],
    });
  });

  test("keep what the route said for its page beside them", async () => {
    const { id } = await makeReadyDraft(builder, shop);
    const asks = {
      method: "POST",
      headers: { Origin: SITE, "Content-Type": "application/json" },
      body: JSON.stringify({ content: { files: [], parts: [], sanding: "none", leaveTabs: false } }),
    };
    const problem = await problemIn(await askApi(`/api/orders/${id}/price`, { person: builder }, asks), 422);
    expect(problem).toMatchObject({
      type: `${SITE}/api-guide#problem-not-valid`,
      title: PROBLEM_KINDS[422]?.title,
      instance: `/api/orders/${id}/price`,
      ok: false,
      reason: "incomplete",
    });
    expect(problem.detail).toBe(problem.words);
    const elsewhere = { ...asks, headers: { ...asks.headers, Origin: "https://elsewhere.example" } };
    const { detail } = await problemIn(
      await askApi(`/api/orders/${id}/price`, { person: builder }, elsewhere),
      403,
    );
    expect(detail).toBe("This request did not come from this site.");
  });

  test("say nothing of what broke inside", async () => {
    const { id } = await makeReadyDraft(builder, shop);
    await db.delete(settings);
    const problem = await problemIn(await askApi(`/api/orders/${id}/status`, { person: builder }), 500);
    expect(problem.detail).toBe(PROBLEM_KINDS[500]?.detail);
    expect(takeConsoleErrors().join()).toContain("The shop is not set up");
  });
});

describe("limits", () => {
  const rateIn = ({ headers }: Response) =>
    ["Limit", "Remaining", "Policy"].map((name) => headers.get(`RateLimit-${name}`));

  test("are told with every answer and counted for each key by itself", async () => {
    const [one, other] = [await keyOf(builder, "orders:read"), await keyOf(builder, "orders:read")];
    expect(rateIn(await askApi("/api/orders", { key: one }))).toEqual(["120", "119", "120;w=60"]);
    expect(rateIn(await askApi("/api/orders/none", { key: one }))).toEqual(["120", "118", "120;w=60"]);
    expect(rateIn(await askApi("/api/orders", { key: other }))).toEqual(["120", "119", "120;w=60"]);
    const session = await askApi("/api/orders", { person: builder });
    expect(rateIn(session)).toEqual(["600", "599", "600;w=60"]);
    const reset = Number(session.headers.get("RateLimit-Reset"));
    expect(reset > 0 && reset <= 60).toBe(true);
    expect(rateIn(await askApi("/api/orders"))).toEqual(["120", "119", "120;w=60"]);
  });

  test("end with 429 and when to come again", async () => {
    const key = await keyOf(builder, "orders:read");
    await askApi("/api/orders", { key });
    await db.update(rateLimits).set({ count: 119 });
    expect((await askApi("/api/orders", { key })).status).toBe(200);
    const response = await askApi("/api/orders", { key });
    expect(rateIn(response)).toEqual(["120", "0", "120;w=60"]);
    expect(response.headers.get("Retry-After")).toBe(response.headers.get("RateLimit-Reset"));
    const problem = await problemIn(response, 429);
    expect(problem.detail).toMatch(/^That is more than 120 requests a minute\. Wait \d+ seconds\.$/);
    expect((await askApi("/api/orders", { person: builder })).status).toBe(200);
  });
});
