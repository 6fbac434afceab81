import { formatKilograms } from "~/domain/units";
import { code128, gs1Sscc, qr } from "./barcodes.server";
import { fitted, line, type Mark, type Page, ruleMarks, text, wrapped } from "./page";

export interface ShippingLabel {
  readonly shopName: string;
  readonly shopAddress: readonly string[];
  /** Lines as US Postal Service Publication 28 asks. */
  readonly shipTo: readonly string[];
  readonly reference: string;
  readonly number: number;
  readonly of: number;
  readonly kilograms: number;
  /** Millimetres. */
  readonly length: number;
  readonly width: number;
  readonly height: number;
  readonly service: string;
  readonly trackingNumber: string;
  readonly teamLift: boolean;
  /** 18 digits; null where the shop has no prefix of its own. */
  readonly sscc: string | null;
  /** Opaque. */
  readonly code: string;
  /** For the box, from the suppliers' papers; null where no board is under the rule or a paper is missing. */
  readonly formaldehyde: string | null;
}

/** Four by six inches. */
const WIDTH = 101.6;
const HEIGHT = 152.4;
const LEFT = 5;
const RIGHT = WIDTH - LEFT;
/** GS1 asks for bars at least 32 mm high. */
const BARS = 32;
/** A module of half a millimetre or less, whole dots at 203 dpi (0.125 mm), as wide as the label takes. */
const DOT = 25.4 / 203.2;
const QUIET_MODULES = 10;

const moduleFor = (runs: readonly number[]): number => {
  const modules = runs.reduce((sum, run) => sum + run, 0) + 2 * QUIET_MODULES;
  return Math.min(4, Math.floor(WIDTH / modules / DOT + 1e-9)) * DOT;
};

function barMarks(runs: readonly number[], y: number): Mark {
  const module = moduleFor(runs);
  const wide = runs.reduce((sum, run) => sum + run, 0) * module;
  return { kind: "bars", x: (WIDTH - wide) / 2, y, module, height: BARS, runs };
}

/** A 4 x 6 in label for one parcel. */
export function shippingLabelPage(label: ShippingLabel): Page {
  const code = qr(label.code);
  const module = 0.5;
  const side = code.length * module;
  const shipTo = label.shipTo.flatMap((one) => wrapped(one, 4.4, RIGHT - LEFT));
  const size = [label.length, label.width, label.height].map((side) => (side / 25.4).toFixed(1)).join(" x ");
  const lowest = label.sscc === null ? [] : ssccMarks(label.sscc);
  const tracking = label.sscc === null ? 103 : 67;
  return {
    width: WIDTH,
    height: HEIGHT,
    marks: [
      text(LEFT, 7, 2.6, `from ${label.shopName}`),
      ...label.shopAddress.map((one, index) =>
        text(LEFT, 10.4 + index * 3.2, 2.6, fitted(one, 2.6, RIGHT - LEFT - side - 4)),
      ),
      ...ruleMarks(LEFT, 23.4, RIGHT - LEFT),
      text(LEFT, 27.6, 2.4, "ship to"),
      ...shipTo.map((one, index) => text(LEFT, 33 + index * 5.2, 4.4, one, { bold: true })),
      ...(label.sscc === null ? tallMiddle(label, code, size) : flatMiddle(label, size)),
      text(WIDTH / 2, tracking - 2.2, 2.6, label.service.replaceAll("-", " ").toUpperCase(), {
        align: "middle",
        bold: true,
      }),
      barMarks(code128(label.trackingNumber), tracking),
      text(WIDTH / 2, tracking + BARS + 4.4, 3.6, label.trackingNumber, { align: "middle", bold: true }),
      ...lowest,
      ...wrapped(label.formaldehyde ?? "", 2.1, RIGHT - LEFT).map((one, index) =>
        text(LEFT, (label.sscc === null ? 146 : 20) + index * 2.8, 2.1, one),
      ),
    ],
  };
}

/** Reference, box and weight with the opaque code beside, where there is room. */
function tallMiddle(label: ShippingLabel, code: readonly string[], size: string): readonly Mark[] {
  const module = 0.5;
  const side = code.length * module;
  const y = 62;
  return [
    line([LEFT, y - 4], [RIGHT, y - 4], 0.35),
    text(LEFT, y + 4, 5.6, label.reference, { bold: true }),
    text(LEFT, y + 11, 5.6, `box ${label.number} of ${label.of}`, { bold: true }),
    text(LEFT, y + 17, 3.2, formatKilograms(label.kilograms)),
    text(LEFT, y + 21.5, 3.2, `${size} in`),
    ...(label.teamLift ? [...teamLiftMarks(LEFT, y + 25)] : []),
    { kind: "squares", x: RIGHT - side - 2, y: y - 0.5, module, rows: code },
    line([LEFT, 97.5], [RIGHT, 97.5], 0.35),
  ];
}

/** The same in one line, above two bar codes. */
const flatMiddle = (label: ShippingLabel, size: string): readonly Mark[] => [
  line([LEFT, 52.5], [RIGHT, 52.5], 0.35),
  text(LEFT, 57, 3.4, `${label.reference}  box ${label.number} of ${label.of}`, { bold: true }),
  text(RIGHT, 57, 2.6, formatKilograms(label.kilograms), { align: "right" }),
  text(RIGHT, 60.6, 2.6, `${size} in${label.teamLift ? "  TEAM LIFT" : ""}`, { align: "right" }),
];

const teamLiftMarks = (x: number, y: number): readonly Mark[] => [
  { kind: "box", x, y: y - 1, width: 46, height: 6.5, edge: 0.5 },
  text(x + 23, y + 3.6, 3.6, "TEAM LIFT, 2 PEOPLE", { align: "middle", bold: true }),
];

/** The container code stands lowest on a label. */
const ssccMarks = (sscc: string): readonly Mark[] => [
  line([LEFT, 107], [RIGHT, 107], 0.35),
  barMarks(gs1Sscc(sscc), 110),
  text(WIDTH / 2, 110 + BARS + 4.4, 3.6, `(00) ${sscc}`, { align: "middle", bold: true }),
];
