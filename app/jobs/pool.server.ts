import { type ChildProcess, fork } from "node:child_process";
import { availableParallelism } from "node:os";
import { fileURLToPath } from "node:url";
import type { Task, TaskResult } from "./task";
import { moduleFile } from "./worker-files.server";

interface PoolTask extends Omit<Task, "timeLimitMs"> {
  readonly timeLimitMs?: number;
  /** Ends the task; it then counts as broken off. */
  readonly signal?: AbortSignal;
}

const TIME_LIMIT_MS = 20_000;
/** How long after its time limit a host that does not answer is ended itself. */
const GRACE_MS = 5_000;
/** One processor stays with the server. */
const MOST_HOSTS = Math.max(1, availableParallelism() - 1);
/** What is kept of a host's last words. */
const LAST_WORDS = 2_000;

interface Pool {
  free: number;
  waiting: (() => void)[];
  idle: ChildProcess[];
}
const shelf = globalThis as { kerfpostPool?: Pool };

function pool(): Pool {
  shelf.kerfpostPool ??= { free: MOST_HOSTS, waiting: [], idle: [] };
  return shelf.kerfpostPool;
}

/**
 * Runs a task in a worker thread of a task host, with a limit of heap and of time, the latter counted from when a
 * host is free for it. A task that hangs, runs out of memory, throws or leaves ends its thread or its host, not this
 * process.
 */
export async function runInPool<Result>(task: PoolTask): Promise<TaskResult<Result>> {
  const release = await takeTurn();
  try {
    const host = restedHost() ?? (await startHost());
    const result = await runOn(host, task);
    if (host.connected && !host.killed) rest(host);
    return result as TaskResult<Result>;
  } finally {
    release();
  }
}

/** Ends the hosts that have nothing to do; the next task starts new ones. */
export function closePool(): void {
  for (const host of pool().idle.splice(0)) host.kill("SIGKILL");
}

/** One turn a host, first come, first served. */
async function takeTurn(): Promise<() => void> {
  const { waiting } = pool();
  if (pool().free > 0) pool().free -= 1;
  else await new Promise<void>((resolve) => waiting.push(resolve));
  return () => {
    const next = waiting.shift();
    if (next) next();
    else pool().free += 1;
  };
}

/** Source files are run through tsx, chunks of the build as they are. A host sees nothing of the environment's secrets. */
async function startHost(): Promise<ChildProcess> {
  const file = await moduleFile("task-host");
  const { PATH, TMPDIR, NODE_ENV } = process.env;
  const host = fork(fileURLToPath(file), [], {
    execArgv: file.endsWith(".ts") ? ["--import", "tsx"] : [],
    env: { PATH, TMPDIR, NODE_ENV },
    serialization: "advanced",
    stdio: ["ignore", "ignore", "pipe", "ipc"],
  });
  host.once("exit", () => {
    const { idle } = pool();
    const place = idle.indexOf(host);
    if (place >= 0) idle.splice(place, 1);
  });
  return host;
}

function restedHost(): ChildProcess | undefined {
  const { idle } = pool();
  for (let host = idle.pop(); host; host = idle.pop()) if (host.connected) return host;
  return undefined;
}

/** A host at rest keeps no process alive; when its parent ends, so does it. */
function rest(host: ChildProcess): void {
  host.unref();
  host.channel?.unref();
  pool().idle.push(host);
}

function runOn(host: ChildProcess, { file, input, signal, timeLimitMs = TIME_LIMIT_MS }: PoolTask) {
  host.ref();
  host.channel?.ref();
  return new Promise<TaskResult<unknown>>((resolve) => {
    let lastWords = "";
    let overdue = false;
    const hear = (words: Buffer) => {
      lastWords = `${lastWords}${words}`.slice(-LAST_WORDS);
    };
    const end = () => host.kill("SIGKILL");
    const backstop = setTimeout(() => {
      overdue = true;
      end();
    }, timeLimitMs + GRACE_MS);
    const settle = (result: TaskResult<unknown>) => {
      clearTimeout(backstop);
      host.off("message", settle).off("exit", exited).off("error", failed);
      host.stderr?.off("data", hear);
      signal?.removeEventListener("abort", end);
      resolve(result);
    };
    const exited = (code: number | null, by: NodeJS.Signals | null) => {
      const outOfMemory = by === "SIGABRT" || /heap out of memory/i.test(lastWords);
      const reason = overdue ? "too-long" : outOfMemory ? "too-much-memory" : "broke-off";
      settle({ ok: false, reason, detail: `The host ended (${by ?? code}). ${lastWords}` });
    };
    const failed = (error: Error) => settle({ ok: false, reason: "broke-off", detail: error.message });
    host.on("message", settle).on("exit", exited).on("error", failed);
    host.stderr?.on("data", hear);
    signal?.addEventListener("abort", end);
    if (signal?.aborted) end();
    else host.send({ file, input, timeLimitMs } satisfies Task);
  });
}
