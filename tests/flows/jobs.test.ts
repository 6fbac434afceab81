import { afterAll, beforeEach, describe, expect, test } from "vitest";
import { db, transact } from "~/db/client.server";
import { jobs } from "~/db/schema";
import type { JobHandlers } from "~/jobs/handler";
import { closePool, runInPool } from "~/jobs/pool.server";
import { runDueJobs, runNextJob } from "~/jobs/run-job.server";
import {
  cancelJob,
  enqueueJob,
  failJob,
  findJob,
  finishJob,
  leaseJob,
  renewLease,
} from "~/models/jobs.server";
import { takeToken } from "~/models/rate-limits.server";
import { freshDatabase, resetDatabase } from "../support/database";
import trouble from "../support/workers/trouble.worker.ts?node-worker";

freshDatabase();
beforeEach(resetDatabase);
afterAll(closePool);

const KINDS = ["read-drawing"] as const;
const NOON = new Date("2027-03-01T12:00:00Z");
const later = (seconds: number) => new Date(NOON.getTime() + seconds * 1_000);
const queue = (more: Partial<Parameters<typeof enqueueJob>[1]> = {}) =>
  enqueueJob(db, { kind: "read-drawing", payload: {}, runAfter: NOON, ...more });
const handlers = (run: JobHandlers["read-drawing"]["run"], gaveUp: string[] = []): JobHandlers => ({
  "read-drawing": {
    run,
    async giveUp(_, job, error) {
      gaveUp.push(`${job.id}: ${error}`);
    },
  },
});

describe("the queue", () => {
  test("a cause has one live job, and can be queued again once that has ended", async () => {
    const first = await queue({ dedupeKey: "a" });
    expect(await queue({ dedupeKey: "a" })).toBe(first);
    expect(await queue({ dedupeKey: "b" })).not.toBe(first);
    await cancelJob(db, first, NOON);
    expect(await queue({ dedupeKey: "a" })).not.toBe(first);
  });

  test("a job queued in a transaction that is rolled back was never there", async () => {
    const rolledBack = transact(async (tx) => {
      await enqueueJob(tx, { kind: "read-drawing", payload: {} });
      throw new Error("no");
    });
    await expect(rolledBack).rejects.toThrow("no");
    expect(await db.$count(jobs)).toBe(0);
  });

  test("of many runners one gets a job", async () => {
    await queue();
    const leases = await Promise.all(
      Array.from({ length: 10 }, () => leaseJob(db, { kinds: KINDS, now: NOON, leaseMs: 1_000 })),
    );
    expect(leases.filter(Boolean)).toHaveLength(1);
  });

  test("a job is not due before its time", async () => {
    await queue({ runAfter: later(10) });
    expect(await leaseJob(db, { kinds: KINDS, now: later(9), leaseMs: 1_000 })).toBeUndefined();
    expect(await leaseJob(db, { kinds: KINDS, now: later(10), leaseMs: 1_000 })).toBeDefined();
  });

  test("when a lease runs out the next runner gets a newer fence, and the older one can no longer finish", async () => {
    await queue();
    const lease = { kinds: KINDS, leaseMs: 5_000 };
    const first = await leaseJob(db, { ...lease, now: NOON });
    expect(await leaseJob(db, { ...lease, now: later(4) })).toBeUndefined();
    const second = await leaseJob(db, { ...lease, now: later(6) });
    if (!first || !second) throw new Error("not leased");
    expect(second).toMatchObject({ id: first.id, fence: first.fence + 1, attempts: 2 });
    expect(await finishJob(db, first, { by: "first" }, later(7))).toBe(false);
    expect(await renewLease(db, first, { until: later(60) })).toBe(false);
    expect(await failJob(db, first, "late", later(7))).toBe(false);
    expect(await finishJob(db, second, { by: "second" }, later(8))).toBe(true);
    expect(await findJob(db, first.id)).toMatchObject({ status: "done", result: { by: "second" } });
  });

  test("a renewed lease holds longer and carries progress", async () => {
    await queue();
    const held = await leaseJob(db, { kinds: KINDS, now: NOON, leaseMs: 5_000 });
    if (!held) throw new Error("not leased");
    expect(await renewLease(db, held, { until: later(20), progress: 0.5, step: "Joining" })).toBe(true);
    expect(await leaseJob(db, { kinds: KINDS, now: later(10), leaseMs: 1_000 })).toBeUndefined();
    expect(await findJob(db, held.id)).toMatchObject({ progress: 0.5, step: "Joining" });
  });
});

describe("running", () => {
  test("what a job settles is written with its end, or not at all", async () => {
    const id = await queue();
    await runDueJobs(
      handlers(async () => async (tx) => {
        await takeToken(tx, "settled", 1, 60);
        return { parts: 12 };
      }),
      { now: () => NOON },
    );
    expect(await findJob(db, id)).toMatchObject({ status: "done", result: { parts: 12 }, progress: 1 });
    expect(await takeToken(db, "settled", 1, 60)).toMatchObject({ ok: false });
  });

  test("a runner that lost its lease while working writes nothing of its result", async () => {
    const id = await queue();
    let inner: Promise<unknown> = Promise.resolve();
    await runNextJob(
      handlers(async () => {
        inner = runNextJob(
          handlers(async () => async () => ({ by: "second" })),
          { now: () => later(100) },
        );
        await inner;
        return async (tx) => {
          await takeToken(tx, "stale", 1, 60);
          return { by: "first" };
        };
      }),
      { now: () => NOON, leaseMs: 60_000 },
    );
    expect(await findJob(db, id)).toMatchObject({ status: "done", result: { by: "second" } });
    expect(await takeToken(db, "stale", 1, 60)).toEqual({ ok: true });
  });

  test("failures are tried again later and later, then given up", async () => {
    const id = await queue({ maxAttempts: 3 });
    const gaveUp: string[] = [];
    const failing = handlers(async () => {
      throw new Error("storage is away");
    }, gaveUp);
    const waits: (number | undefined)[] = [];
    let clock = NOON;
    for (let attempt = 0; attempt < 3; attempt++) {
      expect(await runNextJob(failing, { now: () => clock })).toBe(true);
      expect(await runNextJob(failing, { now: () => clock })).toBe(false);
      const job = await findJob(db, id);
      if (job?.status === "queued") waits.push((job.runAfter.getTime() - clock.getTime()) / 1_000);
      clock = new Date(clock.getTime() + 600_000);
    }
    expect(waits).toEqual([2, 8]);
    expect(gaveUp).toEqual([`${id}: storage is away`]);
    expect(await findJob(db, id)).toMatchObject({ status: "failed", attempts: 3, error: "storage is away" });
  });

  test("a job that kills its runner every time is given up without another run", async () => {
    const id = await queue({ maxAttempts: 2 });
    for (const seconds of [0, 100]) await leaseJob(db, { kinds: KINDS, now: later(seconds), leaseMs: 1_000 });
    const gaveUp: string[] = [];
    let ran = false;
    const running = handlers(async () => {
      ran = true;
      return async () => ({});
    }, gaveUp);
    await runNextJob(running, { now: () => later(200) });
    expect(ran).toBe(false);
    expect(gaveUp).toHaveLength(1);
    expect(await findJob(db, id)).toMatchObject({ status: "failed" });
  });

  test("a cancelled job stops at the next heartbeat and is not finished", async () => {
    const id = await queue();
    await runNextJob(
      handlers(async (_, { signal }) => {
        await cancelJob(db, id, NOON);
        await new Promise<void>((resolve) => signal.addEventListener("abort", () => resolve()));
        return async () => ({ finished: true });
      }),
      { now: () => NOON, leaseMs: 90 },
    );
    expect(await findJob(db, id)).toMatchObject({ status: "cancelled", result: null });
  });
});

describe("worker threads", () => {
  const run = (input: string, timeLimitMs?: number) =>
    runInPool<{ answer: number }>({
      file: trouble,
      input,
      ...(timeLimitMs === undefined ? {} : { timeLimitMs }),
    });

  test("a task's result comes back", async () => {
    expect(await run("answer")).toEqual({ ok: true, result: { answer: 42 } });
  });

  test("a task that hangs is ended at its time limit, and the next one runs", async () => {
    expect(await run("hang", 1_500)).toMatchObject({ ok: false, reason: "too-long" });
    expect(await run("answer")).toMatchObject({ ok: true });
  });

  test.each(["devour", "gorge"])(
    "a task that would %s the heap is ended, and the next one runs",
    async (how) => {
      expect(await run(how, 60_000)).toMatchObject({ ok: false, reason: "too-much-memory" });
      expect(await run("answer")).toMatchObject({ ok: true });
    },
  );

  test("a task that throws or leaves ends only itself", async () => {
    expect(await run("throw")).toMatchObject({
      ok: false,
      reason: "broke-off",
      detail: "thrown on purpose",
    });
    expect(await run("exit")).toMatchObject({ ok: false, reason: "broke-off" });
    expect(await run("answer")).toMatchObject({ ok: true });
  });

  test("a task that is called off ends at once", async () => {
    const calledOff = AbortSignal.timeout(1_000);
    const started = Date.now();
    const result = await runInPool({ file: trouble, input: "hang", signal: calledOff });
    expect(result).toMatchObject({ ok: false, reason: "broke-off" });
    expect(Date.now() - started).toBeLessThan(5_000);
  });

  test("waiting for a free thread is no part of a task's time", async () => {
    const results = await Promise.all([run("hang", 1_200), run("hang", 1_200), run("answer", 1_200)]);
    expect(results.map((result) => result.ok)).toEqual([false, false, true]);
  });
});

describe("rate limits", () => {
  test("a window lets its number through, then says how long to wait, then opens again", async () => {
    const at = (seconds: number) => takeToken(db, "upload:someone", 3, 60, later(seconds));
    expect([await at(0), await at(1), await at(2)]).toEqual([{ ok: true }, { ok: true }, { ok: true }]);
    expect(await at(20)).toEqual({ ok: false, retryAfterSeconds: 40 });
    expect(await takeToken(db, "upload:another", 3, 60, later(20))).toEqual({ ok: true });
    expect(await at(60)).toEqual({ ok: true });
  });

  test("many at once are all counted", async () => {
    const tokens = await Promise.all(Array.from({ length: 40 }, () => takeToken(db, "burst", 25, 60, NOON)));
    expect(tokens.filter(({ ok }) => ok)).toHaveLength(25);
  });
});
