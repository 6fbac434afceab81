import type { ReactNode } from "react";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "../table";

export interface BarRow {
  readonly key: string;
  readonly name: ReactNode;
  /** Lengths of the row's bars on one scale: the first light, a second one dark. */
  readonly bars: readonly number[];
  /** The numbers, in the order of the heads. */
  readonly numbers: readonly ReactNode[];
}

interface BarTableProps {
  readonly caption: string;
  readonly heads: readonly string[];
  readonly rows: readonly BarRow[];
}

const BAR = 9;

/** Numbers with their bars: grain with an ink outline, a second one dark, so that both read in black and white. */
export function BarTable({ caption, heads, rows }: BarTableProps) {
  const longest = Math.max(1e-9, ...rows.flatMap(({ bars }) => bars));
  return (
    <Table caption={caption}>
      <TableHead>
        <HeadCell />
        <HeadCell />
        {heads.map((head) => (
          <HeadCell key={head} numeric>
            {head}
          </HeadCell>
        ))}
      </TableHead>
      <tbody>
        {rows.map(({ key, name, bars, numbers }) => (
          <TableRow key={key}>
            <RowHead>{name}</RowHead>
            <Cell>
              <svg
                aria-hidden="true"
                width="100%"
                height={bars.length * (BAR + 3)}
                className="block min-w-24 overflow-visible"
                shapeRendering="crispEdges"
              >
                {bars.map((bar, place) => (
                  <rect
                    key={place === 0 ? "first" : "second"}
                    x="0.5"
                    y={place * (BAR + 3) + 1.5}
                    height={BAR}
                    width={`${Math.max((bar / longest) * 99, bar > 0 ? 0.5 : 0).toFixed(2)}%`}
                    className={place === 0 ? "fill-grain stroke-ink" : "fill-blue stroke-blue"}
                  />
                ))}
              </svg>
            </Cell>
            {numbers.map((number, place) => (
              <Cell key={heads[place]} numeric>
                {number}
              </Cell>
            ))}
          </TableRow>
        ))}
      </tbody>
    </Table>
  );
}
