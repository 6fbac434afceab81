import { formatKilograms } from "~/domain/units";
import { qr } from "./barcodes.server";
import { fitted, line, type Mark, type Page, ruleMarks, text, wrapped } from "./page";

export interface PackingRow {
  readonly part: string;
  readonly name: string | null;
  /** Millimetres. */
  readonly width: number;
  readonly height: number;
  readonly ordered: number;
  readonly here: number;
  /** Ordered, and in none of the boxes. */
  readonly backOrdered: number;
  readonly material: string;
  readonly lot: string | null;
  /** Of those in this box together. */
  readonly kilograms: number;
}

export interface PackingBox {
  readonly number: number;
  readonly of: number;
  readonly rows: readonly PackingRow[];
  /** Closed, packing included; null for a pile that is picked up. Millimetres and kilograms. */
  readonly closed: {
    readonly length: number;
    readonly width: number;
    readonly height: number;
    readonly kilograms: number;
  } | null;
  readonly trackingNumber: string | null;
  readonly formaldehyde: string | null;
  readonly missingPapers: readonly string[];
}

export interface PackingList {
  readonly shopName: string;
  readonly shopAddress: readonly string[];
  readonly shopEmail: string;
  readonly shopPhone: string;
  readonly reference: string;
  readonly orderName: string;
  readonly revision: number;
  /** Lines of the address; or who picks it up. */
  readonly shipTo: readonly string[];
  readonly pickUp: boolean;
  readonly packer: string | null;
  readonly packedOn: string;
  readonly boxes: readonly PackingBox[];
  /** Where the order is followed; opaque. */
  readonly url: string;
}

/** US Letter, millimetres. */
const WIDTH = 215.9;
const HEIGHT = 279.4;
const LEFT = 16;
const RIGHT = WIDTH - LEFT;
const SMALL = 2.7;
const ROW = 5.4;
const FIRST_ROW = 92;
const LAST_ROW = 208;
const ROWS_TO_A_PAGE = Math.floor((LAST_ROW - FIRST_ROW) / ROW);

const COLUMNS = {
  part: LEFT,
  name: LEFT + 17,
  size: LEFT + 83,
  ordered: LEFT + 97,
  here: LEFT + 111,
  back: LEFT + 125,
  stock: LEFT + 129,
  weight: RIGHT,
} as const;

/** One list to each box, on as many pages as its rows need. */
export function packingListPages(list: PackingList): readonly Page[] {
  return list.boxes.flatMap((box) => {
    const chunks: (readonly PackingRow[])[] = [];
    for (let at = 0; at < Math.max(box.rows.length, 1); at += ROWS_TO_A_PAGE)
      chunks.push(box.rows.slice(at, at + ROWS_TO_A_PAGE));
    return chunks.map((rows, index) => ({
      width: WIDTH,
      height: HEIGHT,
      marks: [
        ...headMarks(list, box, { page: index + 1, of: chunks.length }),
        ...tableMarks(rows, list.revision),
        ...footMarks(list, box),
      ],
    }));
  });
}

function headMarks(
  list: PackingList,
  box: PackingBox,
  { page, of }: { readonly page: number; readonly of: number },
): readonly Mark[] {
  const code = qr(list.url);
  const module = 0.55;
  return [
    text(LEFT, 22, 6.4, list.pickUp ? "Pick-up list" : "Packing list", { bold: true }),
    text(LEFT, 29, 4, `${list.reference} rev ${list.revision}`, { bold: true }),
    text(LEFT, 34.4, SMALL, fitted(list.orderName, SMALL, 100)),
    {
      kind: "squares",
      x: RIGHT - code.length * module,
      y: 13,
      module,
      rows: code,
    },
    ...ruleMarks(LEFT, 41, RIGHT - LEFT),
    text(LEFT, 47.4, 2.4, list.pickUp ? "picked up by" : "ship to"),
    ...list.shipTo.map((one, index) =>
      text(LEFT, 52 + index * 4.4, 3.2, fitted(one, 3.2, 92), { bold: true }),
    ),
    text(112, 47.4, 2.4, "from"),
    ...[list.shopName, ...list.shopAddress].map((one, index) =>
      text(112, 52 + index * 4, SMALL, fitted(one, SMALL, RIGHT - 112)),
    ),
    text(LEFT, 76, 4.4, list.pickUp ? "the whole pile" : `Box ${box.number} of ${box.of}`, { bold: true }),
    ...(box.closed === null
      ? []
      : [
          text(
            LEFT + 44,
            76,
            SMALL,
            `${[box.closed.length, box.closed.width, box.closed.height].map((side) => side.toFixed(0)).join(" x ")} mm, ${formatKilograms(box.closed.kilograms)}${box.trackingNumber ? `, ${box.trackingNumber}` : ""}`,
          ),
        ]),
    text(RIGHT, 76, SMALL, of > 1 ? `page ${page} of ${of}` : "", { align: "right" }),
  ];
}

function tableMarks(rows: readonly PackingRow[], revision: number): readonly Mark[] {
  const heads = FIRST_ROW - 6;
  return [
    text(COLUMNS.part, heads, 2.3, "part"),
    text(COLUMNS.name, heads, 2.3, "name, revision"),
    text(COLUMNS.size, heads, 2.3, "size mm", { align: "right" }),
    text(COLUMNS.ordered, heads, 2.3, "ordered", { align: "right" }),
    text(COLUMNS.here, heads, 2.3, "here", { align: "right" }),
    text(COLUMNS.back, heads, 2.3, "back-ord", { align: "right" }),
    text(COLUMNS.stock, heads, 2.3, "material, lot"),
    text(COLUMNS.weight, heads, 2.3, "kg", { align: "right" }),
    line([LEFT, heads + 1.8], [RIGHT, heads + 1.8], 0.3),
    ...rows.flatMap((row, index) => {
      const y = FIRST_ROW + index * ROW;
      const right = (x: number, words: string): Mark => text(x, y, SMALL, words, { align: "right" });
      return [
        text(COLUMNS.part, y, 3, fitted(row.part, 3, 16), { bold: true }),
        text(COLUMNS.name, y, SMALL, fitted(`${row.name ? `${row.name}, ` : ""}rev ${revision}`, SMALL, 42)),
        right(COLUMNS.size, `${row.width.toFixed(0)} x ${row.height.toFixed(0)}`),
        right(COLUMNS.ordered, String(row.ordered)),
        text(COLUMNS.here, y, 3, String(row.here), { align: "right", bold: true }),
        right(COLUMNS.back, String(row.backOrdered)),
        text(
          COLUMNS.stock,
          y,
          2.4,
          fitted(`${row.material}${row.lot ? `, ${row.lot}` : ""}`, 2.4, COLUMNS.weight - COLUMNS.stock - 11),
        ),
        right(COLUMNS.weight, row.kilograms.toFixed(1)),
        line([LEFT, y + 1.7], [RIGHT, y + 1.7], 0.08),
      ];
    }),
  ];
}

function footMarks(list: PackingList, box: PackingBox): readonly Mark[] {
  const rows = [
    ...(box.formaldehyde ? [box.formaldehyde] : []),
    ...(box.missingPapers.length > 0
      ? [
          `No statement under TSCA Title VI is made for this box: the supplier's paper for ${box.missingPapers.join(", ")} is not on file.`,
        ]
      : []),
    list.pickUp
      ? "Count the parts before you sign. Missing or damaged: say so at the counter, or in the order's thread within 5 business days."
      : "Visible damage: write it on the carrier's receipt before you sign. Damage found inside: keep the packaging, photograph it, and tell us within 5 business days of delivery. Missing parts: count against this list and tell us within the same 5 days.",
    `Tell us in the order's thread (scan the code), at ${list.shopEmail}${list.shopPhone ? ` or ${list.shopPhone}` : ""}.`,
    "Panels are heavy and their edges sharp; wood dust is bad to breathe. Whether a design is strong and safe enough stays with its designer.",
  ].flatMap((words) => wrapped(words, SMALL, RIGHT - LEFT));
  const names = 262;
  return [
    line([LEFT, 216], [RIGHT, 216], 0.3),
    ...rows.map((one, index) => text(LEFT, 221.5 + index * 3.9, SMALL, one)),
    line([LEFT, names], [LEFT + 80, names], 0.2),
    text(LEFT, names + 3.6, 2.4, "packed by"),
    text(LEFT, names - 1.4, SMALL, list.packer ? `${list.packer}, ${list.packedOn}` : ""),
    line([RIGHT - 80, names], [RIGHT, names], 0.2),
    text(RIGHT - 80, names + 3.6, 2.4, list.pickUp ? "received complete" : "checked by"),
  ];
}
