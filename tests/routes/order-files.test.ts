import { gunzipSync } from "node:zlib";
import { beforeEach, describe, expect, test } from "vitest";
import { db } from "~/db/client.server";
import { orderDrawings, orders } from "~/db/schema";
import { findOrderParts } from "~/flows/find-order-parts.server";
import { listDrawings } from "~/models/drawing-files.server";
import { loader as drawing } from "~/routes/api/drawing";
import { loader as events } from "~/routes/api/events";
import { loader as geometry } from "~/routes/api/geometry";
import { action as uploads } from "~/routes/api/uploads";
import { environment } from "~/server/environment.server";
import { resetDatabase } from "../support/database";
import { shelvesDxf } from "../support/drawings";
import { freshScene, makeDraftOrder, makePerson, type TestPerson } from "../support/scene";
import { argsFor, statusOf } from "../support/sign-in";

freshScene();
beforeEach(resetDatabase);

const ORIGIN = { Origin: new URL(environment.APP_URL).origin };

function form(...files: [string, Uint8Array | string][]): FormData {
  const body = new FormData();
  for (const [name, content] of files)
    body.append("drawing", new File([typeof content === "string" ? content : new Uint8Array(content)], name));
  return body;
}

async function upload(
  person: TestPerson | null,
  body: FormData,
  more: { orderId?: string; headers?: Record<string, string> } = {},
) {
  const path = `/api/uploads${more.orderId ? `?orderId=${more.orderId}` : ""}`;
  const args = await argsFor({
    person,
    path,
    pattern: "/api/uploads",
    params: {},
    init: { method: "POST", body, headers: more.headers ?? ORIGIN },
  });
  return uploads(args);
}

describe("uploads", () => {
  test("each file gets its verdict; the first good one starts the order that takes the rest", async () => {
    const answer = await upload(
      await makePerson(),
      form(["a.pdf", "%PDF-1.7"], ["b.dxf", shelvesDxf()], ["c.dxf", shelvesDxf({ mark: 1 })]),
    );
    expect(answer.status).toBe(201);
    const { orderId, files } = await answer.json();
    expect(files).toMatchObject([
      { fileName: "a.pdf", ok: false, reason: expect.stringContaining("PDF") },
      { fileName: "b.dxf", ok: true, orderId },
      { fileName: "c.dxf", ok: true, orderId },
    ]);
    expect(await db.$count(orders)).toBe(1);
    expect((await listDrawings(db, orderId)).map(({ fileName }) => fileName)).toEqual(["b.dxf", "c.dxf"]);
  });

  test("nothing usable starts no order", async () => {
    const answer = await upload(await makePerson(), form(["a.pdf", "%PDF-1.7"]));
    expect(answer.status).toBe(422);
    expect(await answer.json()).toMatchObject({ orderId: null, files: [{ ok: false }] });
    expect(await statusOf(upload(await makePerson(), form()))).toBe(400);
    expect(await db.$count(orders)).toBe(0);
  });

  test("a file over the limit answers 413 and keeps what came before it", async () => {
    const large = new Uint8Array(33 * 1024 * 1024).fill(65);
    const answer = await upload(await makePerson(), form(["a.dxf", shelvesDxf()], ["b.dxf", large]));
    expect(answer.status).toBe(413);
    expect(await answer.json()).toMatchObject({
      files: [{ fileName: "a.dxf", ok: true }],
      reason: expect.stringContaining("32 MB"),
    });
    expect(await db.$count(orderDrawings)).toBe(1);
  });

  test("an upload that breaks off leaves nothing", async () => {
    const whole = new Response(form(["a.dxf", shelvesDxf()]));
    const bytes = new Uint8Array(await whole.arrayBuffer());
    const headers = { ...ORIGIN, "Content-Type": whole.headers.get("Content-Type") ?? "" };
    const args = await argsFor({
      person: await makePerson(),
      path: "/api/uploads",
      pattern: "/api/uploads",
      params: {},
      init: { method: "POST", body: bytes.slice(0, bytes.length - 200), headers },
    });
    expect(await statusOf(uploads(args))).toBe(400);
    expect(await db.$count(orders)).toBe(0);
  });

  test("visitors, staff, other sites and other builders are turned away", async () => {
    const body = () => form(["a.dxf", shelvesDxf()]);
    const mine = await makeDraftOrder(await makePerson());
    expect(await statusOf(upload(null, body()))).toBe(401);
    expect(await statusOf(upload(await makePerson({ roles: ["clerk"] }), body()))).toBe(403);
    expect(await statusOf(upload(await makePerson(), body(), { headers: {} }))).toBe(403);
    const foreign = { Origin: "https://elsewhere.example" };
    expect(await statusOf(upload(await makePerson(), body(), { headers: foreign }))).toBe(403);
    expect(await statusOf(upload(await makePerson(), body(), { orderId: mine.id }))).toBe(404);
    expect(await db.$count(orders)).toBe(1);
  });

  test("too many uploads in a while are told to wait", async () => {
    const person = await makePerson();
    for (let n = 0; n < 60; n++) await upload(person, form());
    const answer = await upload(person, form(["a.dxf", shelvesDxf()]));
    expect(answer.status).toBe(429);
    expect(Number(answer.headers.get("Retry-After"))).toBeGreaterThan(0);
    expect(await db.$count(orders)).toBe(0);
  });
});

describe("an order's files", () => {
  async function scene() {
    const [builder, other] = [await makePerson(), await makePerson()];
    const clerk = await makePerson({ roles: ["clerk"] });
    const order = await makeDraftOrder(builder, shelvesDxf(), "galley “sides”.dxf");
    const [file] = await listDrawings(db, order.id);
    const { geometryKey } = await findOrderParts({ order });
    if (!file || !geometryKey) throw new Error("not read");
    return { builder, other, clerk, order, drawingId: file.id, geometryKey };
  }

  test("the drawing comes back byte for byte as a download, to its builder and the shop", async () => {
    const { builder, other, clerk, order, drawingId } = await scene();
    const ask = async (person: TestPerson | null, orderId = order.id) =>
      drawing(
        await argsFor({
          person,
          path: `/api/orders/${orderId}/drawings/x`,
          pattern: "/api/orders/:orderId/drawings/:drawingId",
          params: { orderId, drawingId },
        }),
      );
    const answer = await ask(builder);
    expect(Object.fromEntries(answer.headers)).toMatchObject({
      "content-type": "image/vnd.dxf",
      "x-content-type-options": "nosniff",
      "content-disposition": `attachment; filename="galley _sides_.dxf"; filename*=UTF-8''galley%20%E2%80%9Csides%E2%80%9D.dxf`,
    });
    expect(new Uint8Array(await answer.arrayBuffer())).toEqual(shelvesDxf());
    expect(await statusOf(ask(clerk))).toBe(200);
    expect(await statusOf(ask(other))).toBe(404);
    expect(await statusOf(ask(null))).toBe(401);
    const theirs = await makeDraftOrder(other, shelvesDxf({ mark: 1 }));
    expect(await statusOf(ask(other, theirs.id))).toBe(404);
  });

  test("geometry is served for good but privately, and to nobody else", async () => {
    const { builder, other, clerk, order, geometryKey } = await scene();
    const ask = async (person: TestPerson | null, headers: Record<string, string> = {}, key = geometryKey) =>
      geometry(
        await argsFor({
          person,
          path: `/api/orders/${order.id}/geometry/${key}`,
          pattern: "/api/orders/:orderId/geometry/:key",
          params: { orderId: order.id, key },
          init: { headers },
        }),
      );
    const plain = await ask(builder);
    expect(plain.headers.get("Cache-Control")).toBe("private, max-age=31536000, immutable");
    const zipped = await ask(clerk, { "Accept-Encoding": "gzip, br" });
    expect(zipped.headers.get("Content-Encoding")).toBe("gzip");
    const text = await plain.text();
    expect(gunzipSync(Buffer.from(await zipped.arrayBuffer())).toString()).toBe(text);
    expect(JSON.parse(text).files[0].report.totals.parts).toBe(3);
    expect(await statusOf(ask(other))).toBe(404);
    expect(await statusOf(ask(null))).toBe(401);
    expect(await statusOf(ask(builder, {}, "0".repeat(64)))).toBe(404);
  });

  test("events stream to the builder and the shop only", async () => {
    const { builder, other, clerk, order } = await scene();
    for (const [person, status] of [
      [builder, 200],
      [clerk, 200],
      [other, 404],
      [null, 401],
    ] as const) {
      const leaving = new AbortController();
      const args = await argsFor({
        person,
        path: `/api/orders/${order.id}/events?after=0`,
        pattern: "/api/orders/:orderId/events",
        params: { orderId: order.id },
        init: { signal: leaving.signal },
      });
      const asked = Promise.resolve(args).then(events);
      expect(await statusOf(asked)).toBe(status);
      leaving.abort();
      if (status === 200) {
        const answer = await asked;
        expect(answer.headers.get("Content-Type")).toMatch(/^text\/event-stream/);
        await answer.body?.cancel();
      }
    }
  });
});
