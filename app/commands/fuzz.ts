/** `npm run fuzz -- --runs N --seed S`: damaged drawings, each read in a worker thread with a limit of time and memory. */
import { parseArgs } from "node:util";
import { Piscina } from "piscina";
import { DAMAGE_NAMES } from "./drawings/damage";
import type { FuzzOutput } from "./fuzz-drawing.worker";

const DONE = 0;
const FAILED = 1;
const UNUSABLE = 2;
const TIME_LIMIT_MS = 10_000;
const HEAP_LIMIT_MB = 256;
const THREADS = 2;

type Outcome = FuzzOutput["outcome"] | "threw" | "hung" | "out of memory";
const OUTCOMES: readonly Outcome[] = ["read", "refused", "unsound", "threw", "hung", "out of memory"];
const FINE: ReadonlySet<Outcome> = new Set(["read", "refused"]);

interface Run {
  readonly seed: number;
  readonly damage: string;
  readonly outcome: Outcome;
  readonly seconds: number;
  readonly words: string | null;
}

async function fuzz(given: readonly string[]): Promise<number> {
  const { values } = parseArgs({
    args: [...given],
    options: {
      runs: { type: "string", default: "1000" },
      seed: { type: "string", default: "1" },
      json: { type: "boolean", default: false },
    },
  });
  const runs = Number(values.runs);
  const seed = Number(values.seed);
  if (!Number.isSafeInteger(runs) || runs < 1 || !Number.isSafeInteger(seed)) {
    console.error("Say: fuzz [--runs N] [--seed S] [--json], N and S whole numbers.");
    return UNUSABLE;
  }
  const began = performance.now();
  const done = await runAll(runs, seed);
  const summary = summaryOf(done, (performance.now() - began) / 1000);
  process.stdout.write(
    values.json ? `${JSON.stringify({ runs, seed, ...summary }, null, 1)}\n` : tableOf(summary),
  );
  return summary.bad.length === 0 ? DONE : FAILED;
}

async function runAll(runs: number, firstSeed: number): Promise<Run[]> {
  const pool = new Piscina<number, FuzzOutput>({
    filename: new URL("./fuzz-drawing.worker.ts", import.meta.url).href,
    minThreads: THREADS,
    maxThreads: THREADS,
    resourceLimits: { maxOldGenerationSizeMb: HEAP_LIMIT_MB },
  });
  const done: Run[] = [];
  let next = 0;
  const lane = async () => {
    while (next < runs) done.push(await runOne(pool, firstSeed + next++));
  };
  await Promise.all(Array.from({ length: THREADS }, lane));
  await pool.destroy();
  return done;
}

async function runOne(pool: Piscina<number, FuzzOutput>, seed: number): Promise<Run> {
  const began = performance.now();
  const limit = AbortSignal.timeout(TIME_LIMIT_MS);
  const ended = (damage: string, outcome: Outcome, words: string | null): Run => ({
    ...{ seed, damage, outcome, words },
    seconds: (performance.now() - began) / 1000,
  });
  try {
    const { damage, outcome } = await pool.run(seed, { signal: limit });
    return ended(damage, outcome, null);
  } catch (error) {
    if (limit.aborted) return ended("", "hung", null);
    const isFull = error instanceof Error && "code" in error && error.code === "ERR_WORKER_OUT_OF_MEMORY";
    return ended(
      "",
      isFull ? "out of memory" : "threw",
      error instanceof Error ? (error.stack ?? "") : String(error),
    );
  }
}

interface Summary {
  readonly seconds: number;
  readonly slowestSeconds: number;
  readonly outcomes: Readonly<Record<string, number>>;
  readonly damages: Readonly<Record<string, number>>;
  /** Runs that did not end well, each to be run again alone with `--runs 1 --seed` its own. */
  readonly bad: readonly Run[];
}

function summaryOf(done: readonly Run[], seconds: number): Summary {
  const count = (is: (run: Run) => boolean) => done.filter(is).length;
  return {
    seconds,
    slowestSeconds: done.reduce((most, run) => Math.max(most, run.seconds), 0),
    outcomes: Object.fromEntries(OUTCOMES.map((name) => [name, count(({ outcome }) => outcome === name)])),
    damages: Object.fromEntries(DAMAGE_NAMES.map((name) => [name, count(({ damage }) => damage === name)])),
    bad: done.filter(({ outcome }) => !FINE.has(outcome)),
  };
}

function tableOf({ seconds, slowestSeconds, outcomes, damages, bad }: Summary): string {
  const rows = [...Object.entries(damages), ...Object.entries(outcomes)];
  return [
    ...rows.map(([name, count]) => `${name.padEnd(16)}${String(count).padStart(8)}`),
    `slowest ${slowestSeconds.toFixed(2)} s, all ${seconds.toFixed(1)} s`,
    ...bad.map(({ seed, outcome, words }) => `seed ${seed}: ${outcome}${words === null ? "" : `: ${words}`}`),
    "",
  ].join("\n");
}

fuzz(process.argv.slice(2))
  .catch((error: unknown) => {
    console.error(error);
    return FAILED;
  })
  .then((code) => {
    process.exitCode = code;
  });
