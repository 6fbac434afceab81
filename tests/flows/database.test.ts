import { execFile } from "node:child_process";
import { promisify } from "node:util";
import { eq, sql } from "drizzle-orm";
import { beforeEach, expect, test } from "vitest";
import { currentDatabase, db, transact } from "~/db/client.server";
import { migrateDatabase } from "~/db/migrate.server";
import { orderNumbers, orders, sessions, users } from "~/db/schema";
import { freshDatabase, resetDatabase } from "../support/database";

freshDatabase();
beforeEach(resetDatabase);

test("200 write transactions at once all count, and the event loop keeps turning", async () => {
  await db.insert(orderNumbers).values({ next: 0 });
  let longestStall = 0;
  let last = performance.now();
  const ticking = setInterval(() => {
    longestStall = Math.max(longestStall, performance.now() - last);
    last = performance.now();
  }, 1);
  await Promise.all(
    Array.from({ length: 200 }, () =>
      transact(async (tx) => {
        const [row] = await tx.select().from(orderNumbers);
        await new Promise((resolve) => setImmediate(resolve));
        await tx.update(orderNumbers).set({ next: (row?.next ?? 0) + 1 });
      }),
    ),
  );
  clearInterval(ticking);
  expect(await db.select().from(orderNumbers)).toEqual([{ id: "orders", next: 200 }]);
  expect(longestStall).toBeLessThan(1_000);
});

test("single writes and transactions mix without loss", async () => {
  await Promise.all(
    Array.from({ length: 50 }, async (_, index) => {
      const row = { name: `Person ${index}`, email: `${index}@kerfpost.example` };
      if (index % 2) await db.insert(users).values(row);
      else await transact((tx) => tx.insert(users).values(row));
    }),
  );
  expect(await db.$count(users)).toBe(50);
});

test("a transaction that rejects leaves nothing and lets the next one through", async () => {
  const failing = transact(async (tx) => {
    await tx.insert(users).values({ name: "Gone", email: "gone@kerfpost.example" });
    throw new Error("changed my mind");
  });
  await expect(failing).rejects.toThrow("changed my mind");
  expect(await db.$count(users)).toBe(0);
  await transact((tx) => tx.insert(users).values({ name: "Here", email: "here@kerfpost.example" }));
  expect(await db.$count(users)).toBe(1);
});

test("the outer database throws when it is used inside a transaction, and works again after it", async () => {
  const later: Promise<number>[] = [];
  await transact(async () => {
    await expect(db.select().from(users)).rejects.toThrow();
    await expect(transact(async () => 1)).rejects.toThrow("inside a transaction");
    later.push(new Promise((resolve) => setTimeout(resolve, 20)).then(() => db.$count(users)));
  });
  expect(await db.$count(users)).toBe(0);
  expect(await Promise.all(later)).toEqual([0]);
});

test("foreign keys hold on every connection and the file is in WAL mode", async () => {
  const orphan = { token: "t", userId: "nobody", expiresAt: new Date() };
  const tries = await Promise.allSettled(
    Array.from({ length: 8 }, (_, index) =>
      transact(async (tx) => {
        await tx.insert(sessions).values({ ...orphan, token: `t${index}` });
      }),
    ),
  );
  expect(tries.map(({ status }) => status)).toEqual(Array(8).fill("rejected"));
  expect(await db.get(sql`PRAGMA journal_mode`)).toEqual({ journal_mode: "wal" });
});

test("several processes write at once, and no order number is given twice or lost", async () => {
  const [builder] = await db
    .insert(users)
    .values({ name: "Ann", email: "ann@kerfpost.example" })
    .returning({ id: users.id });
  const run = promisify(execFile);
  const countUp = () =>
    run(process.execPath, ["--import", "tsx", "tests/support/workers/count-up.ts", "25", builder?.id ?? ""], {
      env: { ...process.env, DATABASE_URL: currentDatabase().url },
    });
  await Promise.all([countUp(), countUp()]);
  const references = await db.select({ reference: orders.reference }).from(orders);
  expect(new Set(references.map(({ reference }) => reference)).size).toBe(50);
  expect(await db.select().from(orderNumbers)).toEqual([{ id: "orders", next: 2051 }]);
});

test("migrating again changes nothing", async () => {
  await db.insert(users).values({ id: "kept", name: "Kept", email: "kept@kerfpost.example" });
  await Promise.all([migrateDatabase(currentDatabase()), migrateDatabase(currentDatabase())]);
  expect(await db.select({ id: users.id }).from(users).where(eq(users.id, "kept"))).toEqual([{ id: "kept" }]);
});
