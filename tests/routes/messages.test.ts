import { beforeEach, describe, expect, test } from "vitest";
import { unsubscribeToken } from "~/auth/unsubscribe-token.server";
import type { ThreadData } from "~/components/thread/thread-data";
import { db } from "~/db/client.server";
import { attachments, messages, newId } from "~/db/schema";
import { createDraftOrder } from "~/models/draft-orders.server";
import { findAddressee } from "~/models/people.server";
import { loader as attachment } from "~/routes/api/attachment";
import { loader as thread, action as write } from "~/routes/api/messages";
import { action as read } from "~/routes/api/thread-read";
import { environment } from "~/server/environment.server";
import { resetDatabase } from "../support/database";
import { freshScene, makePerson, makeShop, type TestPerson } from "../support/scene";
import { argsFor, statusOf } from "../support/sign-in";

freshScene();

const ORIGIN = { Origin: new URL(environment.APP_URL).origin };
const PNG = Buffer.from("89504e470d0a1a0a0000000d49484452", "hex");
const MEBIBYTE = 1024 * 1024;

let builder: TestPerson;
let operator: TestPerson;
let stranger: TestPerson;
let orderId: string;

beforeEach(async () => {
  await resetDatabase();
  await makeShop();
  builder = await makePerson();
  operator = await makePerson({ roles: ["operator"] });
  stranger = await makePerson();
  orderId = (await createDraftOrder(db, { builderId: builder.id, name: "Galley" })).id;
});

interface Written {
  readonly [field: string]: string | File[] | undefined;
  readonly files?: File[];
}

async function post(person: TestPerson | null, fields: Written, headers: Record<string, string> = ORIGIN) {
  const body = new FormData();
  const given: Written = { messageId: newId(), audience: "both", ...fields };
  for (const [name, value] of Object.entries(given))
    if (typeof value === "string") body.set(name, value);
    else for (const file of value ?? []) body.append(name, file);
  const path = `/api/orders/${orderId}/messages`;
  const pattern = "/api/orders/:orderId/messages";
  return write(
    await argsFor({ person, path, pattern, params: { orderId }, init: { method: "POST", body, headers } }),
  );
}

async function get(person: TestPerson | null, query = ""): Promise<Response> {
  const path = `/api/orders/${orderId}/messages${query}`;
  return thread(
    await argsFor({ person, path, pattern: "/api/orders/:orderId/messages", params: { orderId } }),
  );
}
const threadOf = async (person: TestPerson, query = ""): Promise<ThreadData> =>
  (await get(person, query)).json();

async function markRead(person: TestPerson | null, body: unknown, headers: Record<string, string> = ORIGIN) {
  const path = `/api/orders/${orderId}/messages/read`;
  const pattern = "/api/orders/:orderId/messages/read";
  const init = { method: "POST", body: JSON.stringify(body), headers };
  return read(await argsFor({ person, path, pattern, params: { orderId }, init }));
}

async function open(person: TestPerson | null, attachmentId: string, order = orderId) {
  const path = `/api/orders/${order}/attachments/${attachmentId}`;
  const pattern = "/api/orders/:orderId/attachments/:attachmentId";
  return attachment(await argsFor({ person, path, pattern, params: { orderId: order, attachmentId } }));
}

describe("the thread", () => {
  test("is the builder's and the staff's; to another builder the order does not exist, to a visitor nothing does", async () => {
    const [written] = [await (await post(builder, { body: "Hello" })).json()];
    const message = { messageId: written.messageId };
    const asked = [
      get,
      (person: TestPerson | null) => post(person, { body: "Hi" }),
      (person: TestPerson | null) => markRead(person, message),
    ];
    for (const ask of asked) {
      const statuses = [];
      for (const person of [builder, operator, stranger, null]) statuses.push(await statusOf(ask(person)));
      expect([statuses.slice(0, 2).every((status) => status < 300), ...statuses.slice(2)]).toEqual([
        true,
        404,
        401,
      ]);
    }
  });

  test("gives staff notes to staff on a staff page only", async () => {
    await post(builder, { body: "Hello" });
    await post(operator, { body: "between us", audience: "staff" });
    const bodies = async (person: TestPerson, query: string) =>
      (await threadOf(person, query)).messages.map(({ body }) => body);
    expect(await bodies(operator, "?audience=staff")).toEqual(["Hello", "between us"]);
    for (const query of ["", "?audience=builder"]) expect(await bodies(operator, query)).toEqual(["Hello"]);
    for (const query of ["", "?audience=staff"]) expect(await bodies(builder, query)).toEqual(["Hello"]);
    expect(await statusOf(post(builder, { body: "between us", audience: "staff" }))).toBe(403);
    expect(await statusOf(post(builder, { body: "x", audience: "everybody" }))).toBe(400);
  });

  test("comes in pages from the newest, with what is unread and what it points at", async () => {
    for (const body of ["one", "two", "three"])
      await post(builder, { body, partLabel: "C", spotX: "1.5", spotY: "-2" });
    const page = await threadOf(operator, "?audience=staff&limit=2");
    expect(page).toMatchObject({ earlier: true, unread: 3, readAt: null });
    expect(page.messages).toMatchObject([
      { body: "two", mine: false, side: "builder", partLabel: "C", spot: { x: 1.5, y: -2 } },
      { body: "three" },
    ]);
    expect(await statusOf(markRead(operator, { messageId: page.messages[1]?.id }))).toBe(200);
    expect(await threadOf(operator, "?audience=staff")).toMatchObject({ earlier: false, unread: 0 });
    for (const bad of [undefined, {}, { messageId: 7 }])
      expect(await statusOf(markRead(operator, bad))).toBe(400);
    expect(await statusOf(markRead(operator, { messageId: "no-such" }))).toBe(404);
  });

  test("takes nothing from another site, nor what is not a message", async () => {
    const elsewhere = { Origin: "https://elsewhere.example" };
    expect(await statusOf(post(builder, { body: "x" }, elsewhere))).toBe(403);
    expect(await statusOf(post(builder, { body: "x" }, {}))).toBe(403);
    expect(await statusOf(markRead(builder, { messageId: "x" }, elsewhere))).toBe(403);
    expect(await statusOf(post(builder, { body: "x", messageId: "mine" }))).toBe(400);
    expect(await statusOf(post(builder, { body: "x", spotX: "far", spotY: "1" }))).toBe(400);
    expect(await statusOf(post(builder, { body: "   " }))).toBe(422);
    expect(await db.$count(messages)).toBe(0);
  });

  test("takes thirty messages of one person in ten minutes, and says when to go on", async () => {
    for (let n = 0; n < 30; n++) expect((await post(builder, { body: `${n}` })).status).toBe(201);
    const over = await post(builder, { body: "31" });
    expect(over.status).toBe(429);
    expect(Number(over.headers.get("Retry-After"))).toBeGreaterThan(500);
    expect((await over.json()).words).toContain("stays here");
    expect((await post(operator, { body: "still here" })).status).toBe(201);
  });
});

describe("attachments", () => {
  const png = (name: string, size = PNG.length) => new File([PNG, new Uint8Array(size - PNG.length)], name);

  test("come back only as downloads under the type of their bytes, to nobody else", async () => {
    const [file] = [new File(["%PDF-1.7 plan"], "plan “a”.html", { type: "text/html" })];
    expect((await post(builder, { files: [file] })).status).toBe(201);
    const [row] = await db.select().from(attachments);
    const id = row?.id ?? "";
    const answer = await open(builder, id);
    expect(Object.fromEntries(answer.headers)).toMatchObject({
      "content-type": "application/pdf",
      "content-disposition": `attachment; filename="plan _a_.html"; filename*=UTF-8''plan%20%E2%80%9Ca%E2%80%9D.html`,
      "x-content-type-options": "nosniff",
      "content-security-policy": "sandbox",
      "cache-control": "private, no-store",
    });
    expect(await answer.text()).toBe("%PDF-1.7 plan");
    const staff = await open(operator, id);
    expect(await staff.text()).toBe("%PDF-1.7 plan");
    expect([
      await statusOf(open(stranger, id)),
      await statusOf(open(null, id)),
      await statusOf(open(builder, "none")),
    ]).toEqual([404, 401, 404]);
    const own = await createDraftOrder(db, { builderId: stranger.id, name: "Other" });
    expect(await statusOf(open(stranger, id, own.id))).toBe(404);
  });

  test("of a staff note are not there for the builder", async () => {
    await post(operator, { body: "look", audience: "staff", files: [png("secret.png")] });
    const [row] = await db.select().from(attachments);
    expect(await statusOf(open(builder, row?.id ?? ""))).toBe(404);
    expect((await open(operator, row?.id ?? "")).headers.get("Content-Type")).toBe("image/png");
  });

  test("of 10 MB are taken and larger ones are not, nor six, nor what is no picture, PDF or drawing", async () => {
    expect((await post(builder, { files: [png("a.png", 10 * MEBIBYTE)] })).status).toBe(201);
    const large = await post(builder, { body: "x", files: [png("a.png", 10 * MEBIBYTE + 1)] });
    expect([large.status, (await large.json()).words]).toEqual([413, expect.stringContaining("10 MB")]);
    const many = await post(builder, { files: Array.from({ length: 6 }, (_, n) => png(`${n}.png`)) });
    expect([many.status, (await many.json()).words]).toEqual([413, expect.stringContaining("At most 5")]);
    const script = await post(builder, { body: "x", files: [png("a.png"), new File(["<svg>"], "b.png")] });
    expect([script.status, (await script.json()).words]).toEqual([
      422,
      expect.stringMatching(/^b\.png: Attach/),
    ]);
    expect(await db.$count(messages)).toBe(1);
  });
});

describe("the link that turns mails off", () => {
  const press = async (token: string, method: "GET" | "POST") => {
    const { loader, action } = await import("~/routes/public/unsubscribe");
    const path = `/unsubscribe?token=${encodeURIComponent(token)}`;
    const body = method === "POST" ? "List-Unsubscribe=One-Click" : undefined;
    const args = await argsFor({
      person: null,
      path,
      pattern: "/unsubscribe",
      params: {},
      init: { method, body },
    });
    return method === "GET" ? loader(args) : action(args);
  };

  test("changes nothing when it is opened, and turns one kind off by one POST without signing in", async () => {
    const token = unsubscribeToken({ userId: builder.id, kind: "stage" });
    expect(await press(token, "GET")).toMatchObject({ label: "Stages" });
    expect((await findAddressee(db, builder.id))?.mutedMails).toEqual([]);
    expect(await press(token, "POST")).toEqual({ done: true });
    expect((await findAddressee(db, builder.id))?.mutedMails).toEqual(["stage"]);
  });

  test("of somebody who is gone, or not whole, is refused", async () => {
    const status = (token: string) => statusOf(press(token, "POST").then(() => new Response()));
    expect(await status(unsubscribeToken({ userId: "gone", kind: "stage" }))).toBe(404);
    expect(await status("no-such-token")).toBe(400);
  });
});
