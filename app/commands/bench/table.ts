import type { BenchRow } from "./topic";

const HEADINGS = ["name", "ours", "reference", "ratio", "unit"] as const;

const figure = (value: number | null): string => (value === null ? "" : String(Number(value.toPrecision(4))));

/** The rows under headings, numbers aligned to the right. */
export function benchTable(rows: readonly BenchRow[]): string {
  const cells = rows.map((row) => [
    row.name,
    figure(row.ours),
    figure(row.reference),
    figure(row.ratio),
    row.unit,
  ]);
  const all = [[...HEADINGS], ...cells];
  const widths = HEADINGS.map((_, column) => Math.max(...all.map((line) => line[column].length)));
  const isNumber = (column: number) => column >= 1 && column <= 3;
  return all
    .map((line) =>
      line
        .map((cell, column) =>
          isNumber(column) ? cell.padStart(widths[column]) : cell.padEnd(widths[column]),
        )
        .join("  ")
        .trimEnd(),
    )
    .join("\n");
}
