import { and, asc, eq, inArray, lte, or, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { jobs, newId } from "~/db/schema";

export type Job = typeof jobs.$inferSelect;
export type JobKind = Job["kind"];
/** A leased job by its fence: once another runner has leased it, or it was cancelled, the fence is stale. */
export type Lease = Pick<Job, "id" | "fence">;

interface NewJob {
  kind: JobKind;
  payload: Record<string, unknown>;
  orderId?: string;
  /** One live job per cause: while one with this key waits or runs, no second is queued. */
  dedupeKey?: string;
  maxAttempts?: number;
  runAfter?: Date;
}

/** Queues a job in the transaction of its cause. Returns the id of the job that will do it, the earlier one if it lives. */
export async function enqueueJob(executor: Executor, job: NewJob): Promise<string> {
  const [added] = await executor
    .insert(jobs)
    .values({ id: newId(), ...job })
    .onConflictDoNothing({ target: jobs.dedupeKey })
    .returning({ id: jobs.id });
  if (added) return added.id;
  const [live] = await executor
    .select({ id: jobs.id })
    .from(jobs)
    .where(eq(jobs.dedupeKey, job.dedupeKey ?? ""));
  if (!live) throw new Error("The job was neither queued nor found.");
  return live.id;
}

/**
 * Takes the job that has waited longest, or one whose runner has let its lease run out, with a new fence. A job
 * leased once more than `maxAttempts` says by its `attempts` that it must be given up instead of run.
 */
export async function leaseJob(
  executor: Executor,
  { kinds, now, leaseMs }: { kinds: readonly JobKind[]; now: Date; leaseMs: number },
): Promise<Job | undefined> {
  const due = executor
    .select({ id: jobs.id })
    .from(jobs)
    .where(
      and(
        inArray(jobs.kind, [...kinds]),
        or(
          and(eq(jobs.status, "queued"), lte(jobs.runAfter, now)),
          and(eq(jobs.status, "running"), lte(jobs.leasedUntil, now)),
        ),
      ),
    )
    .orderBy(asc(jobs.runAfter))
    .limit(1);
  if ((await due).length === 0) return undefined;
  const [job] = await executor
    .update(jobs)
    .set({
      status: "running",
      fence: sql`${jobs.fence} + 1`,
      attempts: sql`${jobs.attempts} + 1`,
      leasedUntil: new Date(now.getTime() + leaseMs),
    })
    .where(inArray(jobs.id, due))
    .returning();
  return job;
}

/** Prolongs a lease, with progress (0 to 1) and step if given. False when the fence is stale: stop working. */
export async function renewLease(
  executor: Executor,
  lease: Lease,
  { until, ...told }: { until: Date; progress?: number; step?: string },
): Promise<boolean> {
  const renewed = await executor
    .update(jobs)
    .set({ leasedUntil: until, ...told })
    .where(holds(lease))
    .returning({ id: jobs.id });
  return renewed.length === 1;
}

/** Ends a job well. False when the fence is stale: write nothing of the result. */
export async function finishJob(
  executor: Executor,
  lease: Lease,
  result: Record<string, unknown>,
  now: Date,
): Promise<boolean> {
  return end(executor, lease, { status: "done", result, progress: 1, finishedAt: now, error: null });
}

/** Ends a job for good without a result. */
export async function failJob(executor: Executor, lease: Lease, error: string, now: Date): Promise<boolean> {
  return end(executor, lease, { status: "failed", error, finishedAt: now });
}

/** Puts a job back in the queue for another attempt. */
export async function requeueJob(
  executor: Executor,
  lease: Lease,
  { error, runAfter }: { error: string; runAfter: Date },
): Promise<boolean> {
  const requeued = await executor
    .update(jobs)
    .set({ status: "queued", leasedUntil: null, progress: 0, step: null, error, runAfter })
    .where(holds(lease))
    .returning({ id: jobs.id });
  return requeued.length === 1;
}

/** Cancels a job that waits or runs; a runner notices at its next heartbeat and can no longer finish it. */
export async function cancelJob(executor: Executor, id: string, now: Date): Promise<boolean> {
  const cancelled = await executor
    .update(jobs)
    .set({
      status: "cancelled",
      fence: sql`${jobs.fence} + 1`,
      leasedUntil: null,
      dedupeKey: null,
      finishedAt: now,
    })
    .where(and(eq(jobs.id, id), inArray(jobs.status, ["queued", "running"])))
    .returning({ id: jobs.id });
  return cancelled.length === 1;
}

export async function findJob(executor: Executor, id: string): Promise<Job | undefined> {
  const [job] = await executor.select().from(jobs).where(eq(jobs.id, id));
  return job;
}

/** Ended jobs give their cause free, so that it can be queued anew. */
async function end(executor: Executor, lease: Lease, change: Partial<Job>): Promise<boolean> {
  const ended = await executor
    .update(jobs)
    .set({ ...change, leasedUntil: null, dedupeKey: null })
    .where(holds(lease))
    .returning({ id: jobs.id });
  return ended.length === 1;
}

const holds = (lease: Lease) =>
  and(eq(jobs.id, lease.id), eq(jobs.fence, lease.fence), eq(jobs.status, "running"));
