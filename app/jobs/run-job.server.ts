import { db, transact } from "~/db/client.server";
import {
  failJob,
  finishJob,
  type Job,
  type JobKind,
  leaseJob,
  renewLease,
  requeueJob,
} from "~/models/jobs.server";
import type { JobHandlers } from "./handler";

export interface RunOptions {
  readonly now?: () => Date;
  /** A runner that does not renew its lease in this time has lost it. Milliseconds. */
  readonly leaseMs?: number;
}

const LEASE_MS = 30_000;
const FIRST_BACKOFF_MS = 2_000;
const LONGEST_BACKOFF_MS = 5 * 60_000;

/** A fence that has become stale inside the finishing transaction: roll back what was written beside it. */
class LostLease extends Error {}

/** Leases one due job and runs it to its end. False when none is due. */
export async function runNextJob(handlers: JobHandlers, options: RunOptions = {}): Promise<boolean> {
  const { now = () => new Date(), leaseMs = LEASE_MS } = options;
  const kinds = Object.keys(handlers) as JobKind[];
  const job = await leaseJob(db, { kinds, now: now(), leaseMs });
  if (!job) return false;
  if (job.attempts > job.maxAttempts) {
    await giveUp(handlers, job, job.error ?? "The work broke off without saying why.", now());
    return true;
  }
  const lost = new AbortController();
  const renew = async (told: { progress?: number; step?: string } = {}) => {
    const held = await renewLease(db, job, { until: new Date(now().getTime() + leaseMs), ...told });
    if (!held) lost.abort();
  };
  const heartbeat = setInterval(() => {
    renew().catch((error: unknown) => console.error("A lease could not be renewed:", error));
  }, leaseMs / 3);
  try {
    const settle = await handlers[job.kind].run(job, {
      signal: lost.signal,
      report: (progress, step) => renew({ progress, step }),
    });
    await transact(async (tx) => {
      const result = await settle(tx);
      if (!(await finishJob(tx, job, result, now()))) throw new LostLease();
    });
  } catch (error) {
    if (!(error instanceof LostLease) && !lost.signal.aborted)
      await tryLater(handlers, job, error instanceof Error ? error.message : String(error), now());
  } finally {
    clearInterval(heartbeat);
  }
  return true;
}

/** Runs due jobs one after the other until none is due: what commands and tests use instead of runners. */
export async function runDueJobs(handlers: JobHandlers, options: RunOptions = {}): Promise<number> {
  let done = 0;
  while (await runNextJob(handlers, options)) done += 1;
  return done;
}

async function tryLater(handlers: JobHandlers, job: Job, error: string, now: Date): Promise<void> {
  if (job.attempts >= job.maxAttempts) return giveUp(handlers, job, error, now);
  const backoff = Math.min(FIRST_BACKOFF_MS * 4 ** (job.attempts - 1), LONGEST_BACKOFF_MS);
  await requeueJob(db, job, { error, runAfter: new Date(now.getTime() + backoff) });
}

async function giveUp(handlers: JobHandlers, job: Job, error: string, now: Date): Promise<void> {
  await transact(async (tx) => {
    if (await failJob(tx, job, error, now)) await handlers[job.kind].giveUp(tx, job, error);
  });
}
