import type { PriceBook } from "~/domain/pricing";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "../table";
import { PRICE_SECTIONS, priceInWords, speedsInWords } from "./price-book-rows";

interface Version {
  readonly id: string;
  readonly number: number;
  readonly status: "draft" | "published" | "superseded";
  readonly content: PriceBook;
}

interface Line {
  readonly label: string;
  /** A value a version, in the versions' order; empty where one has no such line. */
  readonly values: readonly string[];
}

function sectionsOf(
  versions: readonly Version[],
): { readonly title: string; readonly lines: readonly Line[] }[] {
  const priced = PRICE_SECTIONS.map(({ title, rows }) => ({
    title,
    lines: rows.map((row) => ({
      label: row.label,
      values: versions.map(({ content }) => priceInWords(content, row)),
    })),
  }));
  const speeds = versions.map(({ content }) => speedsInWords(content));
  const labels = [...new Set(speeds.flatMap((list) => list.map(({ label }) => label)))];
  return [
    ...priced,
    {
      title: "Speeds, by nominal thickness",
      lines: labels.map((label) => ({
        label,
        values: speeds.map((list) => list.find((one) => one.label === label)?.value ?? ""),
      })),
    },
  ];
}

const STATUS_WORDS = { draft: "draft", published: "in force", superseded: "superseded" } as const;

/** The price book as a document, newer versions to the left of older ones; what a version changed is set heavier. */
export function PriceDocument({ versions }: { readonly versions: readonly Version[] }) {
  return (
    <Table caption="Prices by version">
      <TableHead>
        <HeadCell />
        {versions.map(({ id, number, status }) => (
          <HeadCell key={id} numeric>
            {number} {STATUS_WORDS[status]}
          </HeadCell>
        ))}
      </TableHead>
      {sectionsOf(versions).map(({ title, lines }) => (
        <tbody key={title}>
          <tr>
            <th
              scope="rowgroup"
              colSpan={versions.length + 1}
              className="pt-5 pb-1 text-left text-small font-semibold"
            >
              {title}
            </th>
          </tr>
          {lines.map(({ label, values }) => (
            <TableRow key={label}>
              <RowHead>{label}</RowHead>
              {values.map((value, place) => (
                <Cell key={versions[place]?.id} numeric>
                  <Value value={value} before={values[place + 1]} />
                </Cell>
              ))}
            </TableRow>
          ))}
        </tbody>
      ))}
    </Table>
  );
}

function Value({ value, before }: { readonly value: string; readonly before: string | undefined }) {
  if (before === undefined || before === value) return value || "—";
  return (
    <span className="font-semibold text-blue underline underline-offset-4">
      {value || "—"}
      <span className="sr-only">, changed</span>
    </span>
  );
}
