/**
 * Reads every drawing beside the project (`../shared/drawings`, never copied into it) and compares lengths,
 * loops, depths and open chains with an independent reader's values (`reference.json` there). Run from the
 * project's root: `npx tsx tests/bench/reading.ts`.
 */
import { existsSync, readFileSync } from "node:fs";
import path from "node:path";
import { readDrawing, scaleDrawing } from "~/domain/drawing";
import { findParts, type PartsReport } from "~/domain/parts";
import { LENGTH_UNITS, MM_PER_UNIT } from "~/domain/units";

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
  readonly seconds: number;
  readonly branches: number;
  /** What differs, by name, ours then theirs. */
  readonly differences: ReadonlyMap<string, readonly [string, string]>;
}

const folder = path.resolve("../shared/drawings");

function main(): void {
  const list = path.join(folder, "reference.json");
  if (!existsSync(list)) {
    console.error("No drawings at ../shared/drawings: nothing to compare with.");
    return;
  }
  const references = JSON.parse(readFileSync(list, "utf8")) as Partial<Reference>[];
  const compared: Compared[] = [];
  const unread: string[] = [];
  let slowest = { file: "", seconds: 0 };
  for (const reference of references) {
    const started = performance.now();
    const outcome = measure(reference);
    const seconds = (performance.now() - started) / 1000;
    if (seconds > slowest.seconds) slowest = { file: reference.file ?? "", seconds };
    if ("reason" in outcome) {
      unread.push(`${reference.file}: ${outcome.reason}`);
      continue;
    }
    if (isWhole(reference)) compared.push({ ...compare(outcome.report, reference), seconds });
  }
  print(compared, unread, slowest);
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

function compare({ drawn }: PartsReport, reference: Reference): Omit<Compared, "seconds"> {
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

function print(
  compared: readonly Compared[],
  unread: readonly string[],
  slowest: { file: string; seconds: number },
): void {
  const share = (name: string, among: readonly Compared[]): string => {
    const agreeing = among.filter(({ differences }) => !differences.has(name)).length;
    return `${agreeing} of ${among.length} (${((100 * agreeing) / Math.max(1, among.length)).toFixed(1)} %)`;
  };
  const plain = compared.filter(({ branches }) => branches === 0);
  const lines = [
    ...["length 0.1 %", "length 0.01 %", "unique length 0.01 %"].map((name) => [
      name,
      share(name, compared),
      "",
    ]),
    ...["loops", "depths", "open chains"].map((name) => [
      name,
      share(name, compared),
      `without branches ${share(name, plain)}`,
    ]),
  ].map(([name, all, rest]) => `${name.padEnd(22)}${all.padEnd(22)}${rest}`);
  const disagreements = compared.flatMap(({ file, branches, differences }) =>
    [...differences].map(
      ([name, [ours, theirs]]) => `${file} (${branches} branches): ${name}: ours ${ours}, theirs ${theirs}`,
    ),
  );
  const texts = [
    ...lines,
    `slowest: ${slowest.file} ${slowest.seconds.toFixed(2)} s`,
    "",
    "Not read:",
    ...unread,
    "",
    "Disagreements:",
    ...disagreements,
  ];
  process.stdout.write(`${texts.join("\n")}\n`);
}

main();
