import type { Executor } from "~/db/client.server";
import type { Job, JobKind } from "~/models/jobs.server";

export interface JobContext {
  /** Aborts when the lease is lost or the job is cancelled. */
  readonly signal: AbortSignal;
  /** Tells how far the work is: 0 to 1, and what is being done. */
  report(progress: number, step: string): Promise<void>;
}

/** Writes a job's outcome in the transaction that ends it; gives what the job row keeps as its result. */
export type Settle = (tx: Executor) => Promise<Record<string, unknown>>;

export interface JobHandler {
  /** Does the work and writes nothing to the database itself. Rejects to be tried again. */
  run(job: Job, context: JobContext): Promise<Settle>;
  /** Writes the consequences when the last attempt has failed too. */
  giveUp(tx: Executor, job: Job, error: string): Promise<void>;
}

export type JobHandlers = Readonly<Record<JobKind, JobHandler>>;
