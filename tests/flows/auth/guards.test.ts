import { hashPassword } from "better-auth/crypto";
import { beforeEach, expect, test } from "vitest";
import { requireAct, requireOrder, requirePerson } from "~/auth/guards.server";
import { db, transact } from "~/db/client.server";
import { newId, orders, userRoles } from "~/db/schema";
import type { Role } from "~/domain/orders";
import { insertAccount } from "~/models/accounts.server";
import { freshDatabase, resetDatabase } from "../../support/database";
import { argsFor, cookieOf, thrownBy } from "./asking";

freshDatabase();
beforeEach(resetDatabase);

const PASSWORD = "square and true";
let people = 0;

async function somebody(...roles: Role[]) {
  people += 1;
  const email = `guarded-${people}@kerfpost.example`;
  const passwordHash = await hashPassword(PASSWORD);
  const id = await transact((tx) =>
    insertAccount(tx, { name: "Ann", email, passwordHash, emailVerified: true, roles, grantedBy: null }),
  );
  if (!id) throw new Error("The account was not made.");
  return { id, cookie: (await cookieOf(email, PASSWORD)) ?? "" };
}

async function orderOf(builderId: string): Promise<string> {
  const id = newId();
  await db.insert(orders).values({ id, reference: `KP-${id}`, builderId, name: "Locker", stage: "draft" });
  return id;
}

test("a visitor is sent to sign in, and back to the page afterwards", async () => {
  const sent = async (path: string, method = "GET") =>
    (await thrownBy(async () => requirePerson(await argsFor(path, { method })))).location;
  expect(await sent("/orders?page=2")).toBe("/sign-in?to=%2Forders%3Fpage%3D2");
  expect(await sent("/orders/7.data?page=2&_routes=routes%2Fx")).toBe("/sign-in?to=%2Forders%2F7%3Fpage%3D2");
  expect(await sent("/account", "POST")).toBe("/sign-in?to=%2F");
});

test("a visitor of an API route is told so", async () => {
  expect(
    await thrownBy(async () => requirePerson(await argsFor("/api/uploads", { method: "POST" }))),
  ).toEqual({
    status: 401,
    location: null,
  });
});

test("acts that are not a role's own answer 403", async () => {
  const builder = await somebody("builder");
  const clerk = await somebody("clerk");
  const nobody = await somebody();
  const asked = async (cookie: string, act: Parameters<typeof requireAct>[1]) =>
    (await thrownBy(async () => requireAct(await argsFor("/owner/staff", { cookie }), act))).status;
  expect(await asked(builder.cookie, "staff.invite")).toBe(403);
  expect(await asked(builder.cookie, "queue.read")).toBe(403);
  expect(await asked(clerk.cookie, "price-book.edit")).toBe(403);
  expect(await asked(clerk.cookie, "refund.make")).toBe(403);
  expect(await asked(nobody.cookie, "order.read")).toBe(403);
  const owner = await somebody("owner");
  const args = await argsFor("/owner/staff", { cookie: owner.cookie });
  expect(await requireAct(args, "staff.invite")).toMatchObject({ id: owner.id, roles: ["owner"] });
});

test("a role that is none gives no right", async () => {
  const { id, cookie } = await somebody();
  await db.insert(userRoles).values({ userId: id, role: "Owner" as Role });
  const args = await argsFor("/", { cookie });
  expect((await requirePerson(args)).roles).toEqual([]);
  expect((await thrownBy(() => requireAct(args, "order.read"))).status).toBe(403);
});

test("another builder's order does not exist; staff see it, but not as its builder", async () => {
  const ann = await somebody("builder");
  const bob = await somebody("builder");
  const operator = await somebody("operator");
  const both = await somebody("operator", "builder");
  const order = await orderOf(ann.id);
  const asked = async (cookie: string, act: Parameters<typeof requireOrder>[1], id = order) =>
    (await thrownBy(async () => requireOrder(await argsFor(`/orders/${id}`, { cookie }), act, id))).status;

  const own = await requireOrder(await argsFor("/", { cookie: ann.cookie }), "order.edit", order);
  expect(own).toMatchObject({ order: { id: order }, scope: { kind: "builder", userId: ann.id } });
  expect(await asked(bob.cookie, "order.read")).toBe(404);
  expect(await asked(bob.cookie, "order.edit")).toBe(404);
  expect(await asked(ann.cookie, "order.read", newId())).toBe(404);

  const seen = await requireOrder(await argsFor("/", { cookie: operator.cookie }), "order.read", order);
  expect(seen).toMatchObject({ order: { id: order }, scope: { kind: "staff" } });
  expect(await asked(operator.cookie, "order.approve")).toBe(403);
  expect(await asked(both.cookie, "order.approve")).toBe(404);
  expect(await asked(both.cookie, "order.edit")).toBe(404);
});
