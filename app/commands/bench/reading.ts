import { execFile } from "node:child_process";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { promisify } from "node:util";
import { generatedDrawing } from "../drawings/generated-drawing";
import type { ReadingMeasure } from "./reading-process";
import { compareShared } from "./shared-drawings";
import { type BenchRow, type BenchTopic, row } from "./topic";

const MEGABYTE = 1024 * 1024;
/** Sizes of the drawings in megabytes, and how often each is read: the best time counts. */
const SIZES = [
  { megabytes: 1, times: 5 },
  { megabytes: 10, times: 3 },
  { megabytes: 50, times: 1 },
];
/** Aims: 50 MB take at most six times what 10 MB take, and all of it less memory than this. */
const MOST_GROWTH = 6;
const MOST_MEGABYTES = 512;
/** Room for either reader to finish, so that its peak is measured and not a failure. */
const HEAP_LIMIT_MB = 4096;
const SEED = 1;

const run = promisify(execFile);

/** Bytes to parts beside raw dxf-parser on generated drawings, then agreement on the shared drawings where they are. */
export const reading: BenchTopic = {
  name: "reading",
  async run(say) {
    const folder = await mkdtemp(path.join(tmpdir(), "kerfpost-bench-"));
    try {
      return [...(await timesOfReading(folder, say)), ...compareShared(say)];
    } finally {
      await rm(folder, { recursive: true });
    }
  },
};

async function timesOfReading(folder: string, say: (words: string) => void): Promise<BenchRow[]> {
  const rows: BenchRow[] = [];
  const ours = new Map<number, ReadingMeasure>();
  for (const { megabytes, times } of SIZES) {
    const file = path.join(folder, `${megabytes}.dxf`);
    await writeFile(file, generatedDrawing(SEED, megabytes * MEGABYTE));
    say(`Reading ${megabytes} MB ...`);
    const parts = await measure("parts", file, times);
    const drawing = await measure("drawing", file, times);
    const parser = await measure("dxf-parser", file, times);
    ours.set(megabytes, parts);
    rows.push(row(`${megabytes} MB to parts, beside dxf-parser`, "s", parts.seconds, parser.seconds));
    rows.push(row(`${megabytes} MB to curves, beside dxf-parser`, "s", drawing.seconds, parser.seconds));
    rows.push(
      row(`${megabytes} MB to parts, peak of memory`, "MB", parts.peakMegabytes, parser.peakMegabytes),
    );
  }
  const [ten, fifty] = [ours.get(10), ours.get(50)];
  if (ten && fifty) {
    rows.push(row("50 MB over 10 MB, beside the aim", "times", fifty.seconds / ten.seconds, MOST_GROWTH));
    rows.push(row("50 MB peak of memory, beside the aim", "MB", fifty.peakMegabytes, MOST_MEGABYTES));
  }
  return rows;
}

/** One reader on one file in a process of its own. */
async function measure(reader: string, file: string, times: number): Promise<ReadingMeasure> {
  const { stdout } = await run(process.execPath, [
    ...["--import", "tsx", `--max-old-space-size=${HEAP_LIMIT_MB}`],
    fileURLToPath(new URL("./reading-process.ts", import.meta.url)),
    ...[reader, file, String(times)],
  ]);
  return JSON.parse(stdout) as ReadingMeasure;
}
