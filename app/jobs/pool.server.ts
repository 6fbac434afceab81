import { availableParallelism } from "node:os";
import { Piscina } from "piscina";

/** Why a worker's task came to no result; the words are for the person who waits for it. */
export type PoolRefusal = "too-long" | "too-much-memory" | "broke-off";
export type PoolResult<Result> =
  | { readonly ok: true; readonly result: Result }
  | { readonly ok: false; readonly reason: PoolRefusal; readonly detail: string };

interface PoolTask {
  /** URL of a module whose default export takes the input and gives the result. */
  readonly file: string;
  readonly input: unknown;
  readonly timeLimitMs?: number;
  /** Cancels the task; it then counts as broken off. */
  readonly signal?: AbortSignal;
}

export const TIME_LIMIT_MS = 20_000;
/** Of each thread's heap. */
const HEAP_LIMIT_MB = 512;
/** One processor stays with the server. */
const THREADS = Math.max(1, availableParallelism() - 1);
const IDLE_MS = 30_000;

interface Shelf {
  kerfpostPools?: Map<string, Piscina>;
  kerfpostSlots?: { free: number; waiting: (() => void)[] };
}
const shelf = globalThis as Shelf;

/**
 * Runs a task in a worker thread with a limit of heap and of time, counted from when a thread is free for it. A task
 * that hangs, runs out of memory or throws ends its thread, not the process.
 */
export async function runInPool<Result>(task: PoolTask): Promise<PoolResult<Result>> {
  const release = await takeSlot();
  try {
    return await runNow(task);
  } finally {
    release();
  }
}

async function runNow<Result>(task: PoolTask): Promise<PoolResult<Result>> {
  const { file, input, timeLimitMs = TIME_LIMIT_MS, signal } = task;
  const limit = AbortSignal.timeout(timeLimitMs);
  try {
    const running = poolFor(file).run(input, {
      filename: file,
      signal: signal ? AbortSignal.any([limit, signal]) : limit,
    });
    return { ok: true, result: (await running) as Result };
  } catch (error) {
    const detail = error instanceof Error ? error.message : String(error);
    if (limit.aborted && !signal?.aborted) return { ok: false, reason: "too-long", detail };
    if (error instanceof Error && "code" in error && error.code === "ERR_WORKER_OUT_OF_MEMORY")
      return { ok: false, reason: "too-much-memory", detail };
    return { ok: false, reason: "broke-off", detail };
  }
}

/** Ends all threads; the next task starts new ones. */
export async function closePools(): Promise<void> {
  const pools = [...(shelf.kerfpostPools?.values() ?? [])];
  shelf.kerfpostPools?.clear();
  await Promise.all(pools.map((pool) => pool.destroy()));
}

/** One slot a thread, first come, first served, so that waiting in line is no part of a task's time. */
async function takeSlot(): Promise<() => void> {
  shelf.kerfpostSlots ??= { free: THREADS, waiting: [] };
  const slots = shelf.kerfpostSlots;
  if (slots.free > 0) slots.free -= 1;
  else await new Promise<void>((resolve) => slots.waiting.push(resolve));
  return () => {
    const next = slots.waiting.shift();
    if (next) next();
    else slots.free += 1;
  };
}

/** Source files are run through tsx, chunks of the build as they are; all tasks of one sort share the threads. */
function poolFor(file: string): Piscina {
  const sort = file.endsWith(".ts") ? "source" : "built";
  shelf.kerfpostPools ??= new Map();
  const known = shelf.kerfpostPools.get(sort);
  if (known) return known;
  const pool = new Piscina({
    minThreads: 0,
    maxThreads: THREADS,
    idleTimeout: IDLE_MS,
    execArgv: sort === "source" ? ["--import", "tsx"] : [],
    resourceLimits: { maxOldGenerationSizeMb: HEAP_LIMIT_MB },
  });
  pool.on("error", (error) => console.error("A worker thread failed:", error));
  shelf.kerfpostPools.set(sort, pool);
  return pool;
}
