import { setTimeout as pause } from "node:timers/promises";
import { reconcilePayments } from "~/flows/reconcile-payments.server";
import { jobHandlers } from "./handlers.server";
import { sendNextMail } from "./outbox.server";
import { runNextJob } from "./run-job.server";
import { sleepUntilWoken } from "./wake.server";

export interface Runners {
  /** Takes no more work and resolves when what runs has ended. */
  stop(): Promise<void>;
}

/** Jobs at once; the worker threads' own limit stands in the pool. */
const JOB_RUNNERS = 2;
const JOB_POLL_MS = 500;
const MAIL_POLL_MS = 1_000;
/** How often the payment service is asked about what may have been missed. */
const PAYMENTS_EVERY_MS = 60_000;
/** After an error of the database itself. */
const PAUSE_MS = 2_000;

/** Starts this process's runners of jobs, of outgoing mail and of payments whose news was missed. */
export function startRunners(): Runners {
  const stopping = new AbortController();
  const loops = [
    ...Array.from({ length: JOB_RUNNERS }, () =>
      loop(() => runNextJob(jobHandlers), JOB_POLL_MS, stopping.signal),
    ),
    loop(() => sendNextMail(), MAIL_POLL_MS, stopping.signal),
    loop(every(PAYMENTS_EVERY_MS, reconcilePayments), PAYMENTS_EVERY_MS, stopping.signal),
  ];
  return {
    async stop() {
      stopping.abort();
      await Promise.all(loops);
    },
  };
}

/** At most once in `ms`, however often the runner is woken in between. */
function every(ms: number, work: () => Promise<unknown>): () => Promise<boolean> {
  let next = 0;
  return async () => {
    if (Date.now() < next) return false;
    next = Date.now() + ms;
    await work();
    return false;
  };
}

/** Works while there is work, then sleeps until woken or until it is time to look again. */
async function loop(work: () => Promise<boolean>, pollMs: number, signal: AbortSignal): Promise<void> {
  while (!signal.aborted) {
    try {
      if (await work()) continue;
    } catch (error) {
      console.error("A runner failed:", error);
      await pause(PAUSE_MS, undefined, { signal }).catch(() => undefined);
      continue;
    }
    await sleepUntilWoken(pollMs, signal);
  }
}
