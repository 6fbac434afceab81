import { beforeEach, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { followOrder } from "~/flows/follow-order.server";
import { eventsAfter, newestEventId, recordEvent } from "~/models/events.server";
import { freshDatabase, resetDatabase } from "../support/database";

freshDatabase();
beforeEach(resetDatabase);

const stage = (to: string, more: { orderId?: string; audience?: "staff" } = {}) =>
  recordEvent(db, { orderId: "order-1", kind: "stage", data: { to }, ...more });

/** Reads a stream in the background; `until` waits for text to have come. */
function listen(options: { reader?: "builder" | "staff"; after?: number | null; heartbeatMs?: number } = {}) {
  const leaving = new AbortController();
  const stream = followOrder({
    orderId: "order-1",
    reader: "builder",
    after: 0,
    pollMs: 20,
    signal: leaving.signal,
    ...options,
  });
  let heard = "";
  const ended = (async () => {
    const decoder = new TextDecoder();
    const reader = stream.getReader();
    for (let read = await reader.read(); !read.done; read = await reader.read())
      heard += decoder.decode(read.value);
  })();
  return {
    leave: () => leaving.abort(),
    ended,
    heard: () => heard,
    async until(text: string) {
      for (const started = Date.now(); !heard.includes(text); ) {
        if (Date.now() - started > 5_000) throw new Error(`"${text}" did not come; heard:\n${heard}`);
        await new Promise((resolve) => setTimeout(resolve, 10));
      }
    },
  };
}

test("events come in order after a given one, for the order alone", async () => {
  await stage("paid");
  await stage("paid", { orderId: "order-2" });
  await stage("received");
  const all = await eventsAfter(db, "order-1", 0, "builder");
  expect(all.map(({ data }) => data.to)).toEqual(["paid", "received"]);
  const [first] = all;
  expect((await eventsAfter(db, "order-1", first?.id ?? 0, "builder")).map(({ data }) => data.to)).toEqual([
    "received",
  ]);
  expect(await newestEventId(db, "order-1")).toBe(all[1]?.id);
  expect(await newestEventId(db, "order-9")).toBe(0);
});

test("an event that is rolled back with its cause was never there", async () => {
  const cause = transact(async (tx) => {
    await recordEvent(tx, { orderId: "order-1", kind: "stage" });
    throw new Error("no");
  });
  await expect(cause).rejects.toThrow("no");
  expect(await eventsAfter(db, "order-1", 0, "staff")).toEqual([]);
});

test("a page hears what happened since, and then what happens, with ids to go on from", async () => {
  await stage("paid");
  const page = listen();
  await page.until('"to":"paid"');
  await stage("received");
  await page.until('"to":"received"');
  page.leave();
  await page.ended;
  expect(page.heard()).toMatch(/^retry: 2000\n/);
  expect(page.heard()).toMatch(/\n\nid: \d+\nevent: stage\ndata: \{.*"to":"received".*\}\n\n$/);

  const [paid] = await eventsAfter(db, "order-1", 0, "builder");
  const reconnected = listen({ after: paid?.id ?? null });
  await reconnected.until('"to":"received"');
  expect(reconnected.heard()).not.toContain('"to":"paid"');
  reconnected.leave();
  await reconnected.ended;
});

test("a page that names no event hears only what is new", async () => {
  await stage("paid");
  const page = listen({ after: null });
  await page.until("following");
  await new Promise((resolve) => setTimeout(resolve, 60));
  await stage("received");
  await page.until('"to":"received"');
  expect(page.heard()).not.toContain('"to":"paid"');
  page.leave();
  await page.ended;
});

test("what is for staff never reaches a builder", async () => {
  const [builder, staff] = [listen(), listen({ reader: "staff" })];
  await stage("note for staff", { audience: "staff" });
  await stage("cut");
  await Promise.all([builder.until('"to":"cut"'), staff.until('"to":"cut"')]);
  expect(staff.heard()).toContain("note for staff");
  expect(builder.heard()).not.toContain("note for staff");
  for (const page of [builder, staff]) page.leave();
  await Promise.all([builder.ended, staff.ended]);
});

test("a quiet stream is kept alive, and ends when the page leaves", async () => {
  const page = listen({ heartbeatMs: 40 });
  await page.until(": still here");
  page.leave();
  await page.ended;
});
