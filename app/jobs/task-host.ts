/**
 * A process of its own that runs tasks in a worker thread with a limit of heap and of time. A thread that comes to
 * its heap limit is ended by itself, but one that asks for a large array there takes its whole process with it:
 * this one, not the server.
 */
import { Piscina } from "piscina";
import type { Task, TaskResult } from "./task";

/** Of the thread's heap. */
const HEAP_LIMIT_MB = 512;

const pool = new Piscina({
  minThreads: 0,
  maxThreads: 1,
  idleTimeout: 60_000,
  resourceLimits: { maxOldGenerationSizeMb: HEAP_LIMIT_MB },
});
pool.on("error", (error) => console.error("A worker thread failed:", error));

process.on("message", async (task: Task) => {
  process.send?.(await run(task));
});
process.on("disconnect", () => process.exit());

async function run({ file, input, timeLimitMs }: Task): Promise<TaskResult<unknown>> {
  const limit = AbortSignal.timeout(timeLimitMs);
  try {
    return { ok: true, result: await pool.run(input, { filename: file, signal: limit }) };
  } catch (error) {
    const detail = error instanceof Error ? error.message : String(error);
    if (limit.aborted) return { ok: false, reason: "too-long", detail };
    if (error instanceof Error && "code" in error && error.code === "ERR_WORKER_OUT_OF_MEMORY")
      return { ok: false, reason: "too-much-memory", detail };
    return { ok: false, reason: "broke-off", detail };
  }
}
