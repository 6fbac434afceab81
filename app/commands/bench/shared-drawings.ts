import { existsSync, readFileSync } from "node:fs";
import path from "node:path";
import { readDrawing, scaleDrawing } from "~/domain/drawing";
import { findParts, type PartsReport } from "~/domain/parts";
import { LENGTH_UNITS, MM_PER_UNIT } from "~/domain/units";
import { type BenchRow, row } from "./topic";

interface Reference {
  readonly file: string;
  readonly mmPerUnit: number;
  readonly curves: number;
  readonly duplicates: number;
  readonly lengthTotal: number;
  readonly lengthUnique: number;
  readonly loops: number;
  readonly depths: Readonly<Record<string, number>>;
  readonly openChains: number;
}

interface Compared {
  readonly file: string;
  readonly branches: number;
  /** What differs, by name, ours then theirs. */
  readonly differences: ReadonlyMap<string, readonly [string, string]>;
}

const folder = path.resolve("../shared/drawings");

/**
 * Reads every drawing beside the project (`../shared/drawings`, never copied into it) and compares lengths, loops,
 * depths and open chains with an independent reader's values (`reference.json` there): how many agree of how many.
 * Without the folder nothing is compared.
 */
export function compareShared(say: (words: string) => void): BenchRow[] {
  const list = path.join(folder, "reference.json");
  if (!existsSync(list)) {
    say("No drawings at ../shared/drawings: nothing to compare with.");
    return [];
  }
  const references = JSON.parse(readFileSync(list, "utf8")) as Partial<Reference>[];
  const compared: Compared[] = [];
  let slowest = { file: "", seconds: 0 };
  let read = 0;
  for (const reference of references) {
    const started = performance.now();
    const outcome = measure(reference);
    const seconds = (performance.now() - started) / 1000;
    if (seconds > slowest.seconds) slowest = { file: reference.file ?? "", seconds };
    if ("reason" in outcome) {
      say(`Not read: ${reference.file}: ${outcome.reason}`);
      continue;
    }
    read += 1;
    if (isWhole(reference)) compared.push(compare(outcome.report, reference));
  }
  for (const { file, branches, differences } of compared) {
    for (const [name, [ours, theirs]] of differences)
      say(`${file} (${branches} branches): ${name}: ours ${ours}, theirs ${theirs}`);
  }
  say(`The slowest of the shared drawings is ${slowest.file}, ${slowest.seconds.toFixed(2)} s.`);
  return [row("shared drawings read", "drawings", read, references.length), ...agreement(compared)];
}

/** How many agree, by what is compared; what branches leave open only where there are none. */
function agreement(compared: readonly Compared[]): BenchRow[] {
  const plain = compared.filter(({ branches }) => branches === 0);
  const agreeing = (name: string, among: readonly Compared[]) =>
    among.filter(({ differences }) => !differences.has(name)).length;
  return [
    ...["length 0.1 %", "length 0.01 %", "unique length 0.01 %"].map((name) =>
      row(`shared drawings agreeing: ${name}`, "drawings", agreeing(name, compared), compared.length),
    ),
    ...["loops", "depths", "open chains"].map((name) =>
      row(
        `shared drawings without branches agreeing: ${name}`,
        "drawings",
        agreeing(name, plain),
        plain.length,
      ),
    ),
  ];
}

const isWhole = (reference: Partial<Reference>): reference is Reference => reference.curves !== undefined;

function measure({
  file = "",
  mmPerUnit = 1,
}: Partial<Reference>): { report: PartsReport } | { reason: string } {
  const read = readDrawing(new Uint8Array(readFileSync(path.join(folder, "files", file))));
  if (!read.ok) return { reason: read.reason };
  const unit = LENGTH_UNITS.find((one) => MM_PER_UNIT[one] === mmPerUnit) ?? "mm";
  return { report: findParts(scaleDrawing(read.drawing, unit), { layers: [] }) };
}

const near = (ours: number, theirs: number, share: number): boolean =>
  Math.abs(ours - theirs) <= share * Math.max(Math.abs(theirs), 1e-9);

function compare({ drawn }: PartsReport, reference: Reference): Compared {
  const differences = new Map<string, readonly [string, string]>();
  const note = (name: string, agrees: boolean, ours: unknown, theirs: unknown) => {
    if (!agrees) differences.set(name, [JSON.stringify(ours), JSON.stringify(theirs)]);
  };
  const length = reference.lengthTotal * reference.mmPerUnit;
  const unique = reference.lengthUnique * reference.mmPerUnit;
  note("length 0.1 %", near(drawn.length, length, 1e-3), drawn.length, length);
  note("length 0.01 %", near(drawn.length, length, 1e-4), drawn.length, length);
  note("unique length 0.01 %", near(drawn.uniqueLength, unique, 1e-4), drawn.uniqueLength, unique);
  note("loops", drawn.loops === reference.loops, drawn.loops, reference.loops);
  note(
    "depths",
    JSON.stringify(drawn.depths) === JSON.stringify(reference.depths),
    drawn.depths,
    reference.depths,
  );
  note("open chains", drawn.openChains === reference.openChains, drawn.openChains, reference.openChains);
  return { file: reference.file, branches: drawn.branches, differences };
}
