/** `npm run -s inspect -- FILE.dxf`: what is in a drawing, as one JSON document on standard output. */
import { readFile } from "node:fs/promises";
import { Piscina } from "piscina";
import { type InspectArguments, parseInspectArguments } from "./inspect-arguments";
import type { InspectInput, InspectOutput } from "./inspect-drawing.worker";

const DONE = 0;
const FAILED = 1;
const UNUSABLE = 2;
const TIME_LIMIT_MS = 30_000;
const HEAP_LIMIT_MB = 1024;
const LARGEST_BYTES = 32 * 1024 * 1024;

async function inspect(given: readonly string[]): Promise<number> {
  const parsed = parseInspectArguments(given);
  if (!parsed.ok) return refuse(parsed.reason);
  const { file, unit, thickness } = parsed.arguments;
  const bytes = await readBytes(file);
  if (typeof bytes === "string") return refuse(bytes);

  const result = await inspectInThread({ bytes, unit, thickness });
  if (!result.ok) return refuse(result.reason);
  for (const note of result.notes) console.error(note);
  process.stdout.write(`${result.json}\n`);
  return DONE;
}

/**
 * Reads in a thread of this process, so that a drawing that hangs reading or fills the memory is refused in words.
 * The server's pool is not used: its hosts are processes of their own, which a command need not wait for.
 */
async function inspectInThread(input: InspectInput): Promise<InspectOutput> {
  const pool = new Piscina<InspectInput, InspectOutput>({
    filename: new URL("./inspect-drawing.worker.ts", import.meta.url).href,
    maxThreads: 1,
    resourceLimits: { maxOldGenerationSizeMb: HEAP_LIMIT_MB },
  });
  const limit = AbortSignal.timeout(TIME_LIMIT_MS);
  try {
    return await pool.run(input, { signal: limit });
  } catch (error) {
    if (limit.aborted) return { ok: false, reason: "Reading the drawing took too long; it may be damaged." };
    if (error instanceof Error && "code" in error && error.code === "ERR_WORKER_OUT_OF_MEMORY")
      return { ok: false, reason: "The drawing needs more memory than reading is given." };
    throw error;
  } finally {
    await pool.destroy();
  }
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
  .then((code) => {
    process.exitCode = code;
  });
