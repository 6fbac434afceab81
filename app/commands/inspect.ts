/** `npm run -s inspect -- FILE.dxf`: what is in a drawing, as one JSON document on standard output. */
import { readFile } from "node:fs/promises";
import { closePool, runInPool } from "~/jobs/pool.server";
import { type InspectArguments, parseInspectArguments } from "./inspect-arguments";
import type { InspectInput, InspectOutput } from "./inspect-drawing.worker";

const DONE = 0;
const FAILED = 1;
const UNUSABLE = 2;
const TIME_LIMIT_MS = 30_000;
const LARGEST_BYTES = 32 * 1024 * 1024;

async function inspect(given: readonly string[]): Promise<number> {
  const parsed = parseInspectArguments(given);
  if (!parsed.ok) return refuse(parsed.reason);
  const { file, unit, thickness } = parsed.arguments;
  const bytes = await readBytes(file);
  if (typeof bytes === "string") return refuse(bytes);

  const input: InspectInput = { bytes, unit, thickness };
  const worker = new URL("./inspect-drawing.worker.ts", import.meta.url).href;
  const outcome = await runInPool<InspectOutput>({ file: worker, input, timeLimitMs: TIME_LIMIT_MS });
  if (!outcome.ok) {
    if (outcome.reason === "too-long") return refuse("Reading the drawing took too long; it may be damaged.");
    if (outcome.reason === "too-much-memory")
      return refuse("The drawing needs more memory than reading is given.");
    console.error(`Our own failure: ${outcome.detail}`);
    return FAILED;
  }
  const { result } = outcome;
  if (!result.ok) return refuse(result.reason);
  for (const note of result.notes) console.error(note);
  process.stdout.write(`${result.json}\n`);
  return DONE;
}

function refuse(reason: string): number {
  console.error(reason);
  return UNUSABLE;
}

/** The file's bytes, or one sentence on why there are none. */
async function readBytes(file: InspectArguments["file"]): Promise<Uint8Array | string> {
  let bytes: Uint8Array;
  try {
    bytes = new Uint8Array(await readFile(file));
  } catch (error) {
    return `The file ${file} cannot be read: ${error instanceof Error ? error.message : String(error)}`;
  }
  if (bytes.byteLength > LARGEST_BYTES) return `The file ${file} is over 32 MB.`;
  return bytes;
}

inspect(process.argv.slice(2))
  .catch((error: unknown) => {
    console.error(error);
    return FAILED;
  })
  .then(async (code) => {
    closePool();
    process.exitCode = code;
  });
