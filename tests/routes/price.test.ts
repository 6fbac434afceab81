import { beforeEach, describe, expect, test } from "vitest";
import { action } from "~/routes/api/price";
import { environment } from "~/server/environment.server";
import { makeReadyDraft } from "../support/chain";
import { resetDatabase } from "../support/database";
import { freshScene, makePerson, makeShop, type TestPerson, type TestShop } from "../support/scene";
import { argsFor, statusOf } from "../support/sign-in";

freshScene();
let builder: TestPerson;
let shop: TestShop;
beforeEach(async () => {
  await resetDatabase();
  builder = await makePerson();
  shop = await makeShop();
});

const ORIGIN = new URL(environment.APP_URL).origin;

async function price(
  person: TestPerson | null,
  orderId: string,
  body: unknown = {},
  origin: string | null = ORIGIN,
): Promise<Response> {
  const args = await argsFor({
    person,
    path: `/api/orders/${orderId}/price`,
    pattern: "/api/orders/:orderId/price",
    params: { orderId },
    init: {
      method: "POST",
      body: typeof body === "string" ? body : JSON.stringify(body),
      headers: { "Content-Type": "application/json", ...(origin === null ? {} : { Origin: origin }) },
    },
  });
  return action(args);
}

describe("the price of an order", () => {
  test("is answered with its lines, total and promise date", async () => {
    const order = await makeReadyDraft(builder, shop);
    const answer = await price(builder, order.id);
    expect(answer.status).toBe(200);
    const { ok, quote, currency, promisedFor, wouldExpireAt } = await answer.json();
    expect([ok, currency]).toEqual([true, "usd"]);
    expect(quote.total).toBe(
      quote.lines.reduce((sum: number, line: { amount: number }) => sum + line.amount, 0),
    );
    expect(quote.lines.every(({ how }: { how: string }) => how.length > 10)).toBe(true);
    expect(Date.parse(promisedFor)).toBeGreaterThan(Date.now());
    expect(Date.parse(wouldExpireAt)).toBeGreaterThan(Date.now());
    const pickedUp = await (
      await price(builder, order.id, { delivery: { delivery: "pick-up", region: null } })
    ).json();
    expect(pickedUp.quote.total).toBeLessThan(quote.total);
  });

  test("is refused in words when something is missing, and with 400 for what is no choice", async () => {
    const order = await makeReadyDraft(builder, shop);
    const unknown = await price(builder, order.id, { content: { files: [] } });
    expect(unknown.status).toBe(400);
    expect((await price(builder, order.id, "no json")).status).toBe(400);
    const nothing = { files: [], parts: [], sanding: "none", leaveTabs: false };
    const refusal = await price(builder, order.id, { content: nothing });
    expect(refusal.status).toBe(422);
    expect(await refusal.json()).toEqual({
      ok: false,
      reason: "incomplete",
      words: "Choose the stock of shelves.dxf.",
    });
  });

  test("is for its builder and the shop, asked from this site", async () => {
    const order = await makeReadyDraft(builder, shop);
    expect(await statusOf(price(null, order.id))).toBe(401);
    expect(await statusOf(price(await makePerson(), order.id))).toBe(404);
    expect(await statusOf(price(await makePerson({ roles: [] }), order.id))).toBe(403);
    expect(await statusOf(price(await makePerson({ roles: ["operator"] }), order.id))).toBe(200);
    expect(await statusOf(price(builder, order.id, {}, "https://elsewhere.example"))).toBe(403);
    expect(await statusOf(price(builder, order.id, {}, null))).toBe(403);
  });
});
