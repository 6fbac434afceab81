import { qr } from "./barcodes.server";
import { fitted, LETTER, line, type Mark, moved, type Page, ruleMarks, text } from "./page";

/** What a part's label says. Nothing about the builder: a label lies about in the shop. */
export interface PartLabel {
  readonly reference: string;
  readonly revision: number;
  readonly part: string;
  /** Null where the drawing gave it no name of its own. */
  readonly partName: string | null;
  readonly number: number;
  readonly of: number;
  readonly remake: boolean;
  /** Which way the grain runs across the part as drawn. */
  readonly grain: "along-x" | "along-y" | "free";
  readonly hasGrain: boolean;
  /** Millimetres. */
  readonly width: number;
  readonly height: number;
  readonly material: string;
  readonly nominalThickness: number;
  readonly lot: string | null;
  /** `12 / 3`: nest and sheet; null while it lies on none. */
  readonly sheet: string | null;
  /** What is done to it after the router, in order. */
  readonly next: readonly string[];
  /** Opaque. */
  readonly code: string;
}

export type LabelPaper = "roll" | "letter" | "a4";

/** Millimetres. A continuous roll 62 wide, as thermal printers take. */
const LABEL = { width: 62, height: 40 } as const;
const PAPERS = {
  letter: { width: 215.9, height: 279.4 },
  a4: { width: 210, height: 297 },
} as const;

/** A QR module of half a millimetre reads from a scanner at arm's length; version 3 with its quiet zone is 18.5. */
const MODULE = 0.5;
const QUIET = 4 * MODULE;

/** Room of the grain arrow, millimetres. */
const ARROW = 12;
const PADDING = 2.5;
const INNER = LABEL.width - 2 * PADDING;

/** Labels one to a page of the roll, or as many as fit on a sheet of paper with lines to cut along. */
export function partLabelPages(labels: readonly PartLabel[], paper: LabelPaper): readonly Page[] {
  if (paper === "roll")
    return labels.map((label) => ({ width: LABEL.width, height: LABEL.height, marks: labelMarks(label) }));
  const size = PAPERS[paper];
  const columns = Math.floor((size.width - 10) / LABEL.width);
  const rows = Math.floor((size.height - 10) / LABEL.height);
  const left = (size.width - columns * LABEL.width) / 2;
  const top = (size.height - rows * LABEL.height) / 2;
  const pages: Page[] = [];
  for (let at = 0; at < labels.length; at += columns * rows)
    pages.push({
      ...size,
      marks: labels.slice(at, at + columns * rows).flatMap((label, index) => {
        const x = left + (index % columns) * LABEL.width;
        const y = top + Math.floor(index / columns) * LABEL.height;
        return [...cutLines(x, y), ...moved(labelMarks(label), x, y)];
      }),
    });
  return pages;
}

const cutLines = (x: number, y: number): readonly Mark[] => [
  line([x, y], [x + LABEL.width, y], 0.1, true),
  line([x, y + LABEL.height], [x + LABEL.width, y + LABEL.height], 0.1, true),
  line([x, y], [x, y + LABEL.height], 0.1, true),
  line([x + LABEL.width, y], [x + LABEL.width, y + LABEL.height], 0.1, true),
];

function labelMarks(label: PartLabel): readonly Mark[] {
  const code = qr(label.code);
  const side = code.length * MODULE;
  const codeLeft = LABEL.width - PADDING - QUIET / 2 - side;
  const left = PADDING;
  const edge = LABEL.width - PADDING;
  const room = codeLeft - QUIET - left;
  const arrowLeft = codeLeft - QUIET - ARROW;
  const big = Math.min(8, (arrowLeft - left - 1) / (LETTER * label.part.length));
  const small = (y: number, words: string) => text(left, y, 2.5, fitted(words, 2.5, room));
  return [
    text(left, 5.4, 3.4, label.reference, { bold: true }),
    text(left + 22, 5.4, 2.7, `rev ${label.revision}`),
    text(edge, 5.4, 2.7, label.sheet === null ? "no sheet" : `sheet ${label.sheet}`, { align: "right" }),
    ...ruleMarks(left, 9, INNER),
    text(left, 17.2, big, label.part, { bold: true }),
    text(left, 21.7, 3.4, `${label.number} of ${label.of}`, { bold: true }),
    small(25.6, [label.remake ? "remake" : "", label.partName ?? ""].filter(Boolean).join(", ")),
    small(28.9, `${label.width.toFixed(1)} x ${label.height.toFixed(1)} mm`),
    text(
      left,
      32.2,
      2.5,
      fitted(
        `${label.nominalThickness} mm ${label.material}${label.lot ? `, lot ${label.lot}` : ""}`,
        2.5,
        INNER,
      ),
    ),
    ...grainMarks(label, arrowLeft, 13.2),
    { kind: "squares", x: codeLeft, y: 12, module: MODULE, rows: code },
    line([left, 34.2], [edge, 34.2], 0.15),
    text(left, 37.6, 2.4, "face up"),
    text(edge, 37.6, 2.4, fitted(`next: ${label.next.join(", ")}`, 2.4, INNER - 12), { align: "right" }),
  ];
}

/** An arrow along the grain, in the part's own frame as drawn; a ring where it may lie as it likes. */
function grainMarks(
  { grain, hasGrain }: Pick<PartLabel, "grain" | "hasGrain">,
  x: number,
  y: number,
): readonly Mark[] {
  if (!hasGrain) return [text(x + 6, y + 6, 2.2, "no grain", { align: "middle" })];
  if (grain === "free") return [text(x + 6, y + 6, 2.2, "any grain", { align: "middle" })];
  const along: readonly Mark[] =
    grain === "along-x"
      ? [
          line([x, y + 4], [x + 12, y + 4], 0.5),
          line([x + 12, y + 4], [x + 9.5, y + 2.6], 0.5),
          line([x + 12, y + 4], [x + 9.5, y + 5.4], 0.5),
          line([x, y + 4], [x + 2.5, y + 2.6], 0.5),
          line([x, y + 4], [x + 2.5, y + 5.4], 0.5),
        ]
      : [
          line([x + 6, y - 1], [x + 6, y + 7], 0.5),
          line([x + 6, y - 1], [x + 4.6, y + 1.3], 0.5),
          line([x + 6, y - 1], [x + 7.4, y + 1.3], 0.5),
          line([x + 6, y + 7], [x + 4.6, y + 4.7], 0.5),
          line([x + 6, y + 7], [x + 7.4, y + 4.7], 0.5),
        ];
  return [...along, text(x + 6, y + 10.2, 2.2, "grain", { align: "middle" })];
}
