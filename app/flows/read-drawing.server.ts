import type { Executor } from "~/db/client.server";
import type { JobHandler, Settle } from "~/jobs/handler";
import { runInPool } from "~/jobs/pool.server";
import type { ReadDrawingInput, ReadDrawingOutput } from "~/jobs/read-drawing.worker";
import type { TaskRefusal } from "~/jobs/task";
import { moduleFile } from "~/jobs/worker-files.server";
import { drawingKey, ordersWithFile } from "~/models/drawing-files.server";
import { recordEvent } from "~/models/events.server";
import { enqueueJob, type Job } from "~/models/jobs.server";
import { queueReading, type ReadingOutcome, readingKey, settleReading } from "~/models/readings.server";
import { storage } from "~/services/clients.server";

/** Raise it with every change that reads some file differently: files are then read anew, and earlier readings kept. */
export const READER_VERSION = "2";

interface ReadDrawingOptions {
  /** URL of the worker's module, if not the product's own. */
  workerUrl?: string;
  timeLimitMs?: number;
}

const REFUSALS: Record<TaskRefusal, string> = {
  "too-long":
    "The drawing took too long to read. Save it again as DXF with only the parts to be cut, and upload that.",
  "too-much-memory":
    "The drawing is too large to read. Split it into several files and upload them together.",
  "broke-off":
    "The drawing could not be read: the file seems to be damaged. Save it again as DXF and upload that.",
};
const GIVEN_UP =
  "The drawing could not be read just now, through no fault of the file. Upload it again in a while.";

/** Queues the reading of a file by this version of the reader, unless it has read it; in the caller's transaction. */
export async function queueDrawingReading(tx: Executor, sha256: string): Promise<boolean> {
  if (!(await queueReading(tx, sha256, READER_VERSION))) return false;
  await enqueueJob(tx, {
    kind: "read-drawing",
    payload: { sha256, readerVersion: READER_VERSION },
    dedupeKey: `read-drawing:${sha256}:${READER_VERSION}`,
  });
  return true;
}

/**
 * Reads a file in a worker thread and keeps the drawing. Whatever the file is, the reading ends: done, or failed
 * with one plain sentence. Only a failure of storage or database is tried again.
 */
export function readDrawingHandler(options: ReadDrawingOptions = {}): JobHandler {
  return {
    async run(job, { signal }): Promise<Settle> {
      const { sha256, readerVersion } = payloadOf(job);
      const bytes = await storage.get(drawingKey(sha256));
      if (!bytes) throw new Error(`The bytes of ${sha256} are not in the storage.`);
      const input: ReadDrawingInput = { bytes };
      const file = options.workerUrl ?? (await moduleFile("read-drawing.worker"));
      const read = await runInPool<ReadDrawingOutput>({
        file,
        input,
        signal,
        timeLimitMs: options.timeLimitMs,
      });
      signal.throwIfAborted();
      const outcome = await keep(
        sha256,
        readerVersion,
        read.ok ? read.result : { ok: false, reason: REFUSALS[read.reason] },
      );
      return (tx) => settle(tx, sha256, readerVersion, outcome);
    },
    async giveUp(tx, job) {
      const { sha256, readerVersion } = payloadOf(job);
      await settle(tx, sha256, readerVersion, { status: "failed", failure: GIVEN_UP });
    },
  };
}

async function keep(sha256: string, readerVersion: string, read: ReadDrawingOutput): Promise<ReadingOutcome> {
  if (!read.ok) return { status: "failed", failure: read.reason };
  const key = readingKey(sha256, readerVersion);
  await storage.put(key, read.drawing, "application/gzip");
  return { status: "done", summary: read.summary, drawingKey: key };
}

async function settle(
  tx: Executor,
  sha256: string,
  readerVersion: string,
  outcome: ReadingOutcome,
): Promise<Record<string, unknown>> {
  await settleReading(tx, sha256, readerVersion, outcome, new Date());
  for (const orderId of await ordersWithFile(tx, sha256))
    await recordEvent(tx, { orderId, kind: "reading", data: { sha256, status: outcome.status } });
  return outcome.status === "failed" ? { status: "failed", failure: outcome.failure } : { status: "done" };
}

function payloadOf(job: Job): { sha256: string; readerVersion: string } {
  const { sha256, readerVersion } = job.payload;
  if (typeof sha256 !== "string" || typeof readerVersion !== "string")
    throw new Error(`Job ${job.id} names no file to read.`);
  return { sha256, readerVersion };
}
