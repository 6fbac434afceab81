import { gunzipSync } from "node:zlib";
import { db } from "~/db/client.server";
import { canonicalJson } from "~/documents/canonical-json";
import type { FileGeometry } from "~/documents/geometry";
import type { FileInterpretation, Interpretation } from "~/domain/orders";
import type { LengthUnit } from "~/domain/units";
import type { FindPartsInput } from "~/jobs/find-parts.worker";
import { runInPool } from "~/jobs/pool.server";
import type { TaskRefusal } from "~/jobs/task";
import { moduleFile } from "~/jobs/worker-files.server";
import type { OrderDrawing } from "~/models/drawing-files.server";
import type { Reading, ReadingSummary } from "~/models/readings.server";
import { storage } from "~/services/clients.server";
import { isGeometryStored, sha256Of, storeGeometry } from "./geometry-store.server";
import { orderInterpretation } from "./order-interpretation.server";
import { createReportShelf } from "./report-shelf";

/** Raise it with every change that finds other parts in some drawing: reports are then made anew. */
const FINDER_VERSION = "3";

/** A file of an order as far as it is read. */
export type FileParts = { readonly drawingId: string; readonly sha256: string; readonly fileName: string } & (
  | { readonly state: "queued" }
  /** In one plain sentence, why. */
  | { readonly state: "failed"; readonly words: string }
  | {
      readonly state: "read";
      readonly readingId: string;
      readonly summary: ReadingSummary;
      readonly geometry: FileGeometry;
      /** Under which its report is kept: equal keys mean equal reports. */
      readonly reportKey: string;
    }
);

export interface OrderParts {
  /** The interpretation it was found under: its row (null while nothing is saved), its number, all of it. */
  readonly interpretation: {
    readonly id: string | null;
    readonly number: number;
    readonly content: Interpretation;
  };
  readonly files: readonly FileParts[];
  /** Hash of the geometry document of the files that are read, null when none is. */
  readonly geometryKey: string | null;
}

interface FindOrderPartsOptions {
  readonly order: { readonly id: string; readonly builderId: string };
  /** Other choices than those saved, to look at before saving. */
  readonly content?: Interpretation;
}

/**
 * The parts in each file of an order under its current interpretation. Found in a worker thread once, then taken
 * from storage: the same bytes, reader, unit and layers give the same report. While no unit is confirmed, the
 * declared one is taken, or else millimetres, and the geometry says so.
 */
export async function findOrderParts({ order, content }: FindOrderPartsOptions): Promise<OrderParts> {
  const current = await orderInterpretation(db, order);
  const chosen = content ?? current.content;
  const files = await Promise.all(
    current.drawings.map(({ drawing, reading }) =>
      partsOfFile(
        drawing,
        reading,
        chosen.files.find(({ sha256 }) => sha256 === drawing.fileSha),
      ),
    ),
  );
  const read = files.filter((file) => file.state === "read");
  return {
    interpretation: { id: current.id, number: current.number, content: chosen },
    files,
    geometryKey: read.length > 0 ? await geometryKeyOf(read) : null,
  };
}

/** Hashing a large drawing's geometry takes a second; what it is made of says whether it was hashed before. */
const HASHES_KEPT = 1_000;
const hashes = new Map<string, string>();

async function geometryKeyOf(files: readonly Extract<FileParts, { state: "read" }>[]): Promise<string> {
  const made = files
    .map(({ sha256, reportKey, geometry }) => `${sha256} ${reportKey} ${geometry.confirmed}`)
    .join("\n");
  const known = hashes.get(made);
  if (known !== undefined && (await isGeometryStored(known))) return known;
  const key = await storeGeometry({ files: files.map(({ geometry }) => geometry) });
  if (hashes.size >= HASHES_KEPT) hashes.clear();
  hashes.set(made, key);
  return key;
}

const REFUSALS: Record<TaskRefusal, string> = {
  "too-long": "Finding the parts took too long. Upload a drawing with only the parts to be cut.",
  "too-much-memory": "The drawing is too large to find its parts. Split it into several files.",
  "broke-off": "The parts of this drawing could not be found. Send us a message; a person will look at it.",
};

async function partsOfFile(
  drawing: OrderDrawing,
  reading: Reading | undefined,
  chosen: FileInterpretation | undefined,
): Promise<FileParts> {
  const file = { drawingId: drawing.id, sha256: drawing.fileSha, fileName: drawing.fileName };
  if (!reading || reading.status === "queued") return { ...file, state: "queued" };
  if (reading.status === "failed" || !reading.summary || !reading.drawingKey)
    return { ...file, state: "failed", words: reading.failure ?? REFUSALS["broke-off"] };
  const { summary, drawingKey } = reading;
  const unit: LengthUnit = chosen?.unit ?? summary.declared ?? "mm";
  const layers = chosen?.layers ?? [];
  const found = await reportOf(drawingKey, { unit, layers });
  if (!found.ok) return { ...file, state: "failed", words: REFUSALS[found.reason] };
  const geometry: FileGeometry = {
    sha256: drawing.fileSha,
    unit,
    confirmed: chosen?.unit !== null && chosen?.unit !== undefined,
    layers,
    report: found.report,
  };
  return { ...file, state: "read", readingId: reading.id, summary, geometry, reportKey: found.key };
}

const shelf = createReportShelf();

/** The report from storage, or found now and stored. The key names everything the report depends on. */
async function reportOf(drawingKey: string, asked: Pick<FindPartsInput, "unit" | "layers">) {
  const key = `reports/${sha256Of(canonicalJson({ drawingKey, ...asked, finder: FINDER_VERSION }))}`;
  const recent = shelf.take(key);
  if (recent) return { ok: true, key, report: recent } as const;
  const known = await storage.get(key);
  if (known) return shelved(key, known);
  const drawing = await storage.get(drawingKey);
  if (!drawing) throw new Error(`The drawing ${drawingKey} is not in the storage.`);
  const input: FindPartsInput = { drawing, ...asked };
  const found = await runInPool<Uint8Array>({ file: await moduleFile("find-parts.worker"), input });
  if (!found.ok) return found;
  await storage.put(key, found.result, "application/gzip");
  return shelved(key, found.result);
}

function shelved(key: string, stored: Uint8Array) {
  const report = parseReport(stored);
  shelf.put(key, report, stored.byteLength);
  return { ok: true, key, report } as const;
}

const parseReport = (stored: Uint8Array): FileGeometry["report"] =>
  JSON.parse(gunzipSync(stored).toString("utf8"));
