import { EventEmitter } from "node:events";

/** Within this process; runners elsewhere find new work by asking the database. */
const shelf = globalThis as { kerfpostWake?: EventEmitter };

function bell(): EventEmitter {
  shelf.kerfpostWake ??= new EventEmitter().setMaxListeners(0);
  return shelf.kerfpostWake;
}

/** Tells this process's runners that there is work; call it after the transaction that queued it. */
export const wakeRunners = (): void => {
  bell().emit("work");
};

/** Resolves at the next wake, after `ms`, or when the signal aborts, whichever is first. */
export function sleepUntilWoken(ms: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const done = () => {
      clearTimeout(timer);
      bell().off("work", done);
      signal.removeEventListener("abort", done);
      resolve();
    };
    const timer = setTimeout(done, ms);
    bell().on("work", done);
    signal.addEventListener("abort", done);
    if (signal.aborted) done();
  });
}
